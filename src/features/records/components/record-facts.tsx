import { recordFacts } from '#shared/proof-test/record-facts'
import { HowLinks } from '../../../components/how-link'
import { LOCAL_DATES } from '../../../lib/dates'
import type { RecordView } from '../record-view'

/** What the figures rest on, a line each. */
export function RecordFacts({ record }: { record: RecordView }) {
  return (
    <div>
      <dl className="font-condensed">
        {recordFacts(record, LOCAL_DATES).map(([name, value]) => (
          <div key={name} className="grid grid-cols-[6rem_1fr] gap-x-2 border-b border-hairline py-0.5">
            <dt className="text-graphite">{name}</dt>
            <dd className="min-w-0">{value}</dd>
          </div>
        ))}
      </dl>
      <HowLinks
        className="mt-1 font-condensed"
        topics={[
          ['clearance', 'load'],
          ['ram-force', 'delivered'],
          ['gauge', 'gauge'],
          ['uncertainty', 'its ±'],
          ['stored-energy', 'energy'],
        ]}
      />
    </div>
  )
}

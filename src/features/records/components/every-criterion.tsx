import type { Criterion } from '#shared/proof-test/evaluate-climb'
import { uncertaintyWords } from '#shared/proof-test/criterion-words'
import { verdictWord } from '#shared/proof-test/record'
import { setPercent } from '../../../components/typeset'
import type { RecordView } from '../record-view'

interface Listed {
  key: string
  where: string
  criterion: Criterion
}

function listed(record: RecordView): Listed[] {
  const { climbs } = record.evaluation
  const several = climbs.length > 1
  return climbs.flatMap((climb) => {
    const leg = record.opened.legs.length > 1 ? `${record.opened.legs[climb.leg]?.label ?? ''}, ` : ''
    const again = several && climb.climb > 0 ? 'second climb, ' : ''
    const at = (where: string, criterion: Criterion): Listed => ({
      key: `${climb.leg}.${climb.climb}.${where}.${criterion.id}`,
      where: `${leg}${again}${where}`,
      criterion,
    })
    return [
      ...climb.stages.flatMap((stage) => stage.criteria.map((criterion) => at(`${stage.percent} %`, criterion))),
      ...(climb.set?.criteria ?? []).map((criterion) => at('set', criterion)),
    ]
  })
}

/** Each criterion of each stage: what was read, how sure, the limit, and where the limit comes from. */
export function EveryCriterion({ record }: { record: RecordView }) {
  const rows = listed(record)
  if (rows.length === 0) return null
  return (
    <details className="pt-5">
      <summary className="min-h-12 cursor-pointer py-2 text-18 font-semibold">Every criterion, {rows.length} in all</summary>
      <ul className="border-t border-ink font-condensed">
        {rows.map(({ key, where, criterion }) => (
          <li
            key={key}
            className="grid grid-cols-2 gap-x-4 border-b border-hairline py-1.5 tablet:grid-cols-[9rem_minmax(0,1fr)_7rem_6.5rem_6.5rem_9rem_minmax(0,1fr)]"
          >
            <span className="text-graphite">{setPercent(where)}</span>
            <span className="font-medium">{setPercent(criterion.label)}</span>
            <span>{verdictWord(criterion.verdict)}</span>
            <span className="font-semibold tablet:text-right">{setPercent(criterion.reading)}</span>
            <span className="tablet:text-right">{setPercent(uncertaintyWords(record.opened, criterion))}</span>
            <span className="tablet:text-right">{setPercent(criterion.limitText)}</span>
            <span className="max-tablet:col-span-2 text-graphite">
              limit from {criterion.source === '' ? 'the protocol' : criterion.source}
            </span>
          </li>
        ))}
      </ul>
    </details>
  )
}

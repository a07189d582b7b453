import { correctionLetter } from '#shared/proof-test/corrections'
import { correctedReadings, correctionsHeading, whichReading } from '#shared/proof-test/record-words'
import type { Correction } from '#shared/proof-test/state'
import { LOCAL_DATES, clockTime } from '../../../lib/dates'
import type { RecordView } from '../record-view'

function Readings({ correction }: { correction: Correction }) {
  const { first, counts, unit } = correctedReadings(correction)
  return (
    <>
      <del className="text-stop-ink decoration-2">{first}</del> {counts} {unit}
    </>
  )
}

/** Each correction with both readings, who made it, and why. */
export function Corrections({ record }: { record: RecordView }) {
  const { corrections } = record.state
  if (corrections.length === 0) return <p className="border-t border-ink py-2 text-graphite">No reading was corrected.</p>
  return (
    <section className="border-t border-ink pt-3">
      <h2 className="pb-1 text-20">{correctionsHeading(corrections.length)}</h2>
      <ol>
        {corrections.map((correction, index) => (
          <li
            key={correction.entryId}
            className="grid gap-x-4 border-t border-hairline py-1.5 tablet:grid-cols-[11rem_1fr] desktop:grid-cols-[11rem_minmax(0,5fr)_minmax(0,6fr)_auto]"
          >
            <p>
              <span className="mr-3 font-semibold">{correctionLetter(index)}</span>
              Entry {correction.seq} corrects {correction.correctsSeq}
            </p>
            <p>
              {whichReading(record, correction, LOCAL_DATES)}: <Readings correction={correction} />
            </p>
            <p className="tablet:col-start-2 desktop:col-start-auto">
              {correction.why}
              {!correction.underLoad && ' Corrected after release.'}
            </p>
            <p className="tablet:col-start-2 desktop:col-start-auto desktop:text-right">
              {record.nameOf(correction.by)}, {clockTime(correction.at)}
            </p>
          </li>
        ))}
      </ol>
    </section>
  )
}

import { correctionLetter } from '#shared/proof-test/corrections'
import { capital, countInWords } from '#shared/proof-test/record'
import type { Correction, Row } from '#shared/proof-test/state'
import { allRows } from '#shared/proof-test/apply'
import { groupDigits, unitLabel } from '#shared/units'
import { clockTime } from '../../../lib/dates'
import type { RecordView } from '../record-view'

/** "Right pin at 50 %", "G-02 at the datum": which reading of which row. */
function whichReading(record: RecordView, correction: Correction): string {
  const { opened, state, evaluation } = record
  const point = opened.points.find(({ id }) => id === correction.sourceId)
  const instrument = opened.instruments.find(({ id }) => id === correction.sourceId)
  const what = point?.label ?? instrument?.details.code ?? 'A reading'
  for (const climb of evaluation.climbs) {
    for (const stage of climb.stages) {
      const row = stage.attempt.rows.find((candidate) => candidate.entryId === correction.correctsEntryId)
      if (row) return `${what}, ${row.occasion}, ${stage.percent}\u202f%`
    }
    if (climb.set?.row.row.entryId === correction.correctsEntryId) return `${what}, set`
  }
  const row: Row | undefined = allRows(state).find((candidate) => candidate.entryId === correction.correctsEntryId)
  return row ? `${what}, read ${clockTime(row.mark.at)}` : what
}

function heading(count: number): string {
  if (count === 1) return 'One correction, both readings kept'
  return `${capital(countInWords(count))} corrections, ${count === 2 ? 'both' : 'all'} kept`
}

/** Each correction with both readings, who made it, and why. */
export function Corrections({ record }: { record: RecordView }) {
  const { corrections } = record.state
  if (corrections.length === 0) return <p className="border-t border-ink py-2 text-graphite">No reading was corrected.</p>
  return (
    <section className="border-t border-ink pt-3">
      <h2 className="pb-1 text-20">{heading(corrections.length)}</h2>
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
              {whichReading(record, correction)}: <del className="text-stop-ink decoration-2">{groupDigits(correction.from.text)}</del>{' '}
              {groupDigits(correction.to.text)} {unitLabel(correction.to.unit)}
              {correction.from.unit !== correction.to.unit && ` (first in ${unitLabel(correction.from.unit)})`}
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

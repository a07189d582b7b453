import { criteriaHeading, joinWords, verdictWord } from '#shared/proof-test/record'
import type { Criterion, CriterionVerdict } from '#shared/proof-test/evaluate-climb'
import { Mark, type MarkName } from '../../../components/marks'
import { setPercent } from '../../../components/typeset'
import type { RecordView } from '../record-view'

const MARKS: Record<CriterionVerdict, MarkName> = {
  within: 'within',
  beyond: 'beyond',
  undecided: 'undecided',
  wait: 'wait',
  'not-read': 'not-read',
}

function CriterionRow({ criterion }: { criterion: Criterion }) {
  const { verdict, label, reading, limitText } = criterion
  const away = verdict === 'within' ? '' : verdict === 'beyond' ? 'text-stop-ink' : 'text-graphite'
  return (
    <tr className="border-b border-hairline">
      <td className="w-8 py-1.5 align-middle">
        <Mark name={MARKS[verdict]} size={20} label={verdictWord(verdict)} />
      </td>
      <th scope="row" className="py-1.5 pr-3 text-left font-normal">
        {label}
        {verdict !== 'within' && <span className={`font-medium ${away}`}>, {verdictWord(verdict)}</span>}
      </th>
      <td className="py-1.5 pr-3 text-right font-semibold">{setPercent(reading)}</td>
      <td className="py-1.5 text-right text-graphite">{setPercent(limitText)}</td>
    </tr>
  )
}

/** Every criterion at its worst, with number, limit and verdict on one line, and what nobody measured. */
export function CriteriaTable({ record }: { record: RecordView }) {
  const { evaluation, opened } = record
  const unmeasured = opened.notMeasured
  return (
    <section>
      <h2 className="pb-2 text-20">{criteriaHeading(evaluation)}</h2>
      <table className="w-full border-collapse">
        <thead>
          <tr className="border-b border-rule text-14 text-graphite">
            <td />
            <th scope="col" className="pb-1 text-left font-medium">
              Criterion
            </th>
            <th scope="col" className="pr-3 pb-1 text-right font-medium">
              Read
            </th>
            <th scope="col" className="pb-1 text-right font-medium">
              Limit
            </th>
          </tr>
        </thead>
        <tbody>
          {evaluation.criteria.map((criterion) => (
            <CriterionRow key={`${criterion.id} ${criterion.label}`} criterion={criterion} />
          ))}
          {unmeasured.length > 0 && (
            <tr className="border-b border-hairline">
              <td className="w-8 py-1.5 align-middle">
                <Mark name="not-read" size={20} label="not measured" />
              </td>
              <td colSpan={3} className="py-1.5 font-semibold">
                {joinWords(unmeasured.map((name, index) => (index === 0 ? name : name.toLowerCase())))} not measured
              </td>
            </tr>
          )}
        </tbody>
      </table>
    </section>
  )
}

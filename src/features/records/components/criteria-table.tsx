import { criteriaHeading, verdictWord } from '#shared/proof-test/record'
import { notMeasuredText, verdictMark } from '#shared/proof-test/record-words'
import type { Criterion } from '#shared/proof-test/evaluate-climb'
import { HowLinks } from '../../../components/how-link'
import { Mark } from '../../../components/marks'
import { setPercent } from '../../../components/typeset'
import type { RecordView } from '../record-view'

function CriterionRow({ criterion }: { criterion: Criterion }) {
  const { verdict, label, reading, limitText } = criterion
  const away = verdict === 'within' ? '' : verdict === 'beyond' ? 'text-stop-ink' : 'text-graphite'
  return (
    <tr className="border-b border-hairline max-tablet:grid max-tablet:grid-cols-[2rem_1fr_1fr] max-tablet:py-1.5">
      <td className="w-8 align-middle max-tablet:row-span-2 max-tablet:self-center tablet:py-1.5">
        <Mark name={verdictMark(verdict)} size={20} label={verdictWord(verdict)} />
      </td>
      <th scope="row" className="pr-3 text-left font-condensed font-normal max-tablet:col-span-2 tablet:py-1.5">
        {label}
        {verdict !== 'within' && <span className={`font-medium ${away}`}>, {verdictWord(verdict)}</span>}
      </th>
      <td className="pr-3 font-condensed font-semibold whitespace-nowrap tablet:py-1.5 tablet:text-right">{setPercent(reading)}</td>
      <td className="text-right font-condensed text-graphite max-tablet:w-auto tablet:w-36 tablet:py-1.5">{setPercent(limitText)}</td>
    </tr>
  )
}

/** Every criterion at its worst, with number, limit and verdict on one line, and what nobody measured. */
export function CriteriaTable({ record }: { record: RecordView }) {
  const { evaluation, opened, broken } = record
  return (
    <section>
      <h2 className="pb-2 text-20">{broken === null ? criteriaHeading(evaluation) : 'Worked out from altered entries'}</h2>
      <table className="w-full border-collapse">
        <thead className="max-tablet:sr-only">
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
          {opened.notMeasured.length > 0 && (
            <tr className="border-b border-hairline max-tablet:grid max-tablet:grid-cols-[2rem_1fr]">
              <td className="w-8 py-1.5 align-middle">
                <Mark name="not-read" size={20} label="not measured" />
              </td>
              <td colSpan={3} className="py-1.5 font-semibold">
                {notMeasuredText(opened)}
              </td>
            </tr>
          )}
        </tbody>
      </table>
      <HowLinks
        className="mt-1 font-condensed"
        topics={[
          ['line', 'deflection'],
          ['softening', 'softening'],
          ['hold', 'pressure and creep'],
          ['permanent-set', 'set'],
          ['decision-rule', 'verdicts'],
        ]}
      />
    </section>
  )
}

import { budgetTexts, fullestForce } from '#shared/proof-test/budget'
import { formatForce } from '#shared/units'
import { setPercent } from '../../../components/typeset'
import type { RecordView } from '../record-view'

/** Where the uncertainty of the load comes from, at the fullest stage. */
export function ForceBudget({ record }: { record: RecordView }) {
  const fullest = fullestForce(record.evaluation)
  if (!fullest) return null
  const { force, percent } = fullest
  return (
    <section className="pt-5 break-inside-avoid">
      <h2 className="pb-1 text-20">Where ± comes from</h2>
      <p className="pb-2 font-condensed text-graphite">
        {setPercent(
          `At ${percent} %: ${formatForce(force.force, 'kN')}, U = ${formatForce(force.U, 'kN')} with k = 2. Every stage is in the spreadsheet.`,
        )}
      </p>
      <table className="w-full border-collapse font-condensed">
        <thead>
          <tr className="border-b border-ink text-left text-graphite">
            <th scope="col" className="py-1 font-normal">
              Source
            </th>
            <th scope="col" className="py-1 pl-3 text-right font-normal">
              ± kN
            </th>
            <th scope="col" className="py-1 pl-3 text-right font-normal max-tablet:hidden">
              Distribution
            </th>
            <th scope="col" className="py-1 pl-3 text-right font-normal">
              u, kN
            </th>
            <th scope="col" className="py-1 pl-3 text-right font-normal">
              Share
            </th>
          </tr>
        </thead>
        <tbody>
          {budgetTexts(force).map((line) => (
            <tr key={line.name} className="border-b border-hairline">
              <th scope="row" className="py-1 pr-3 text-left font-normal first-letter:uppercase">
                {line.name}
              </th>
              <td className="py-1 pl-3 text-right">{line.value}</td>
              <td className="py-1 pl-3 text-right max-tablet:hidden">{line.distribution}</td>
              <td className="py-1 pl-3 text-right font-semibold">{line.u}</td>
              <td className="py-1 pl-3 text-right">{setPercent(line.share)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  )
}

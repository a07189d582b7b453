import { demandWords, usedWords, weakestOfEach } from '#shared/structure/check-words'
import type { CheckResult, LoadPathCheck } from '#shared/structure/load-path-check'
import type { ForceUnit } from '#shared/units'
import { capital } from '../../lib/words'
import { Mark } from '../marks'
import { setPercent } from '../typeset'

/** The bar's right end, in shares of what is allowed: past 100 % there is room to see by how much. */
const END = 1.25

/** Used of allowed, to scale: a rule at 100 %, hatched past it. */
function Bar({ utilisation }: { utilisation: number | null }) {
  const used = Math.min(utilisation ?? END, END)
  const beyond = utilisation === null || utilisation > 1
  return (
    <svg viewBox="0 0 100 10" preserveAspectRatio="none" aria-hidden="true" className="h-3 w-full overflow-visible">
      <rect x="0" y="1" width="100" height="8" fill="none" stroke="var(--hairline)" vectorEffect="non-scaling-stroke" />
      <rect x="0" y="1" width={(Math.min(used, 1) / END) * 100} height="8" fill={beyond ? 'var(--stop-ink)' : 'var(--ink)'} />
      {used > 1 && <rect x={100 / END} y="1" width={((used - 1) / END) * 100} height="8" fill="var(--stop-ink)" />}
      <line x1={100 / END} x2={100 / END} y1="-2" y2="12" stroke="var(--ink)" strokeWidth="2" vectorEffect="non-scaling-stroke" />
    </svg>
  )
}

function BarRow({ result, forceUnit }: { result: CheckResult; forceUnit: ForceUnit }) {
  const beyond = result.verdict === 'beyond'
  return (
    <li className="grid grid-cols-[1.75rem_minmax(0,1fr)] items-center gap-x-2 gap-y-1 border-b border-hairline py-2 tablet:grid-cols-[1.75rem_minmax(0,1fr)_minmax(3rem,7rem)_auto] tablet:gap-x-4">
      <Mark name={beyond ? 'beyond' : 'within'} size={20} />
      <p className="min-w-0">
        <span className="font-semibold">{capital(result.name)}</span> <span className="text-graphite">{result.check}</span>
      </p>
      <div className="max-tablet:col-start-2">
        <Bar utilisation={result.utilisation} />
      </div>
      <p className="max-tablet:col-start-2 tablet:w-74 tablet:text-right">
        <span className={beyond ? 'font-semibold text-stop-ink' : 'font-semibold'}>
          {result.verdict} {setPercent(usedWords(result))}
        </span>
        , {demandWords(result, forceUnit)}
      </p>
    </li>
  )
}

/** How much of what it may carry each member and joint uses, the weakest first; of each its own weakest check. */
export function CheckBars({ check, forceUnit, most }: { check: LoadPathCheck; forceUnit: ForceUnit; most?: number }) {
  const each = weakestOfEach(check.results).slice(0, most)
  if (each.length === 0) return null
  return (
    <ol aria-label="How much of what it may carry each one uses, the weakest first" className="border-t border-hairline">
      {each.map((result) => (
        <BarRow key={`${result.about.kind}${result.about.id}`} result={result} forceUnit={forceUnit} />
      ))}
    </ol>
  )
}

/** Names of what shares one reason, the check said once. */
interface Unchecked {
  names: string[]
  check: string
  why: string
}

function byReason(results: readonly CheckResult[]): Unchecked[] {
  const groups = new Map<string, Unchecked>()
  for (const { name, check, notChecked } of results) {
    if (notChecked === null) continue
    const group = groups.get(check + notChecked) ?? { names: [], check, why: notChecked }
    group.names.push(name)
    groups.set(check + notChecked, group)
  }
  return [...groups.values()]
}

/** What is not checked, each with its reason: no figure is no pass. */
export function NotChecked({ check }: { check: LoadPathCheck }) {
  const groups = byReason(check.results)
  if (groups.length === 0) return null
  return (
    <ul aria-label="Not checked" className="border-t border-hairline">
      {groups.map(({ names, check: what, why }) => (
        <li
          key={what + why}
          className="grid grid-cols-[1.75rem_minmax(0,1fr)] items-start gap-x-2 border-b border-hairline py-2 tablet:grid-cols-[1.75rem_minmax(0,1fr)_minmax(0,1.3fr)] tablet:gap-x-4"
        >
          <span className="mt-0.5">
            <Mark name="not-read" size={20} />
          </span>
          <p className="min-w-0">
            <span className="font-semibold">NOT CHECKED</span> <span className="font-medium">{what}</span>. {why}
          </p>
          <p className="text-graphite max-tablet:col-start-2">{names.map(capital).join('; ')}</p>
        </li>
      ))}
    </ul>
  )
}

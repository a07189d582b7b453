import { normalCdf } from './student-t'

export type Verdict = 'within' | 'beyond' | 'undecided'
export type DecisionRule = 'simple' | 'guard-band'
/** Limits in the unit of the value; at least one. */
export type Limit = { max?: number | undefined; min?: number | undefined }

/** A value on the limit but for rounding in the last digits counts as on it. */
const LIMIT_SLACK = 1e-9

function judgeUpper(value: number, U: number, max: number, rule: DecisionRule): Verdict {
  const edge = max + LIMIT_SLACK * Math.abs(max)
  if (value - U > edge) return 'beyond'
  if (rule === 'simple' ? value <= edge : value + U <= edge) return 'within'
  return 'undecided'
}

/**
 * A value with its expanded uncertainty against a limit, all in one unit.
 * `simple`: within when the value is not past the limit. `guard-band`: within only when the value and
 * its U are not past it. Either way beyond when the value is past the limit by more than U, and
 * undecided in between. With two limits the worse verdict counts.
 * Source: JCGM 106:2012, clause 8; ILAC-G8:09/2019, 4.2.
 * @throws RangeError when there is no limit, U is below zero or not a number, or the value isn't one.
 */
export function judge(input: { value: number; U: number; limit: Limit; rule: DecisionRule }): Verdict {
  const { value, U, limit, rule } = input
  if (Number.isNaN(value)) throw new RangeError('The value to judge isn’t a number.')
  if (!(U >= 0)) throw new RangeError('An uncertainty can’t be below zero.')
  if (limit.max === undefined && limit.min === undefined) throw new RangeError('There is no limit to judge by.')
  const verdicts: Verdict[] = []
  if (limit.max !== undefined) verdicts.push(judgeUpper(value, U, limit.max, rule))
  if (limit.min !== undefined) verdicts.push(judgeUpper(-value, U, -limit.min, rule))
  if (verdicts.includes('beyond')) return 'beyond'
  return verdicts.includes('undecided') ? 'undecided' : 'within'
}

/**
 * Probability that the true value is inside the limits, for a normal distribution of standard
 * uncertainty u about the value; all in one unit. A limit not given is no limit.
 * Source: JCGM 106:2012, 7.3 and 7.4.
 * @throws RangeError when u is not above zero.
 */
export function conformanceProbability(input: { value: number; u: number; limit: Limit }): number {
  const { value, u, limit } = input
  if (!(u > 0)) throw new RangeError('The standard uncertainty must be above zero.')
  const below = limit.max === undefined ? 1 : normalCdf((limit.max - value) / u)
  const under = limit.min === undefined ? 0 : normalCdf((limit.min - value) / u)
  return below - under
}

import { canonicalText } from '../ledger/canonical'
import type { LedgerEntry } from '../ledger/envelope'
import type { StoredEnergy } from '../structure/stored-energy'
import { formatForce, formatNumber, groupDigits, toUnit, unitLabel } from '../units'
import { clearedKilonewtons } from '../press/clearance-words'
import { foldProofTest } from './apply'
import type { Opened } from './entries'
import { evaluateTest, freezeEvaluation, type TestEvaluation } from './evaluate'
import type { CriterionVerdict } from './evaluate-climb'
import type { ProofTestState } from './state'

/** Where a record stands: what its headline says. */
export type RecordStanding = 'not opened' | 'under way' | 'stopped' | 'to sign' | 'to countersign' | 'accepted' | 'rejected' | 'abandoned'

/** Where a record stands, by its ledger alone. A declined countersignature returns it to the lead: to sign. */
export function standingOf(state: ProofTestState): RecordStanding {
  if (!state.opened) return 'not opened'
  if (!state.conclusion) return state.stopped ? 'stopped' : 'under way'
  if (!state.signed) return 'to sign'
  if (!state.countersigned) return 'to countersign'
  return state.conclusion.conclusion
}

/** The calendar day (UTC) that lies a number of months after a moment; the last day of a shorter month. */
export function monthsAfter(moment: string, months: number): string {
  const start = new Date(moment)
  const day = start.getUTCDate()
  const end = new Date(Date.UTC(start.getUTCFullYear(), start.getUTCMonth() + months, 1))
  const lastDay = new Date(Date.UTC(end.getUTCFullYear(), end.getUTCMonth() + 1, 0)).getUTCDate()
  end.setUTCDate(Math.min(day, lastDay))
  return end.toISOString().slice(0, 10)
}

/** What a countersigned, accepted test cleared the press to; null while there is nothing to say. */
export interface ClearedLoad {
  /** "11.7 short tons". */
  load: string
  /** The stated load in kN, rounded down: "104.0 kN". */
  newton: string
  gauge: string | null
  rated: string
  where: string
  /** Calendar day. */
  until: string
  on: string
  by: string
  staticLoads: number
}

/** How many climbs were held at full load to the end, all legs together. */
export function staticLoadsOf(evaluation: TestEvaluation): number {
  return evaluation.climbs.filter((climb) => climb.stages.some((stage) => stage.percent >= 100 && stage.end !== null)).length
}

const NUMBER_WORDS = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine']

/** "one", "two" … up to nine, figures from ten on. */
export function countInWords(count: number): string {
  return NUMBER_WORDS[count] ?? String(count)
}

/** "one static load", "two static loads". */
export function staticLoadsText(count: number): string {
  return `${countInWords(count)} static ${count === 1 ? 'load' : 'loads'}`
}

/** The bed holes and ram positions that were loaded, in words: "Bed hole 4, ram central". */
export function placesTested(opened: Opened): string {
  const holes = [...new Set(opened.legs.map((leg) => leg.bedHole))]
  const rams = [...new Set(opened.legs.map((leg) => leg.ramPosition))]
  return `Bed ${holes.length === 1 ? 'hole' : 'holes'} ${holes.join(' and ')}, ram ${rams.join(' and ')}`
}

function quantityText(typed: { text: string; unit: Parameters<typeof unitLabel>[0] }): string {
  return `${groupDigits(typed.text.replace(',', '.'))}\u00a0${unitLabel(typed.unit, { plural: typed.text !== '1' })}`
}

/** A typed quantity in print: "12 short tons", "7 650 psi". Digits as typed, thousands set apart. */
export const inPrint = quantityText

/** What the test cleared the press to, from an evaluation and the countersigned conclusion. */
export function clearedLoad(state: ProofTestState, evaluation: TestEvaluation): ClearedLoad | null {
  const { opened, conclusion, countersigned, signed } = state
  const figures = evaluation.clearance
  if (!opened || !figures || conclusion?.conclusion !== 'accepted') return null
  const on = countersigned?.signedAt ?? signed?.signedAt ?? conclusion.at
  const gauge = opened.instruments.find((instrument) => instrument.id === opened.forceInstrumentIds[0])
  return {
    load: quantityText({ text: figures.text, unit: figures.unit }),
    newton: clearedKilonewtons({ text: figures.text, unit: figures.unit }),
    gauge: figures.gaugePressure && gauge ? `Gauge ${gauge.details.code} not past ${quantityText(figures.gaugePressure)}` : null,
    rated: quantityText(opened.press.ratedLoad),
    where: placesTested(opened),
    until: monthsAfter(on, opened.protocol.content.examinationMonths),
    on,
    by: opened.people.lead.name,
    staticLoads: staticLoadsOf(evaluation),
  }
}

/** The one line a record is known by. Never "safe", "yes" or "approved": what was done, and what it came to. */
export function headlineOf(state: ProofTestState, evaluation: TestEvaluation): string {
  const standing = standingOf(state)
  const cleared = clearedLoad(state, evaluation)
  switch (standing) {
    case 'not opened':
      return 'This test has not been opened'
    case 'under way':
      return 'Under way. Nothing is concluded'
    case 'stopped':
      return state.stopped?.atPercent === null || state.stopped?.atPercent === undefined
        ? 'Stopped before load. Not concluded'
        : `Stopped at ${state.stopped.atPercent}\u202f%. Not concluded`
    case 'to sign':
      return `Concluded ${state.conclusion?.conclusion ?? ''}. Not signed`
    case 'to countersign':
      return `Concluded ${state.conclusion?.conclusion ?? ''}. To countersign`
    case 'accepted':
      return cleared ? `Accepted. Cleared up to ${cleared.load}` : 'Accepted. No load is cleared'
    case 'rejected':
      return state.stopped?.atPercent ? `Rejected. Stopped at ${state.stopped.atPercent}\u202f%` : 'Rejected. Do not use'
    case 'abandoned':
      return 'Abandoned. Nothing is cleared'
  }
}

const VERDICT_WORDS: Record<CriterionVerdict, string> = {
  within: 'within',
  beyond: 'beyond',
  undecided: 'undecided',
  wait: 'outside, with a reason',
  'not-read': 'not read',
}

/** The word that goes with a verdict's mark. */
export function verdictWord(verdict: CriterionVerdict): string {
  return VERDICT_WORDS[verdict]
}

/** Heading of the criteria: what they came to, taken together. */
export function criteriaHeading(evaluation: TestEvaluation): string {
  const leading = evaluation.criteria.filter((criterion) => criterion.leads || criterion.verdict === 'beyond')
  const beyond = leading.filter((criterion) => criterion.verdict === 'beyond').length
  if (beyond > 0) return `Beyond ${countInWords(beyond)} ${beyond === 1 ? 'limit' : 'limits'}`
  if (leading.some((criterion) => criterion.verdict === 'undecided')) return 'One or more limits undecided'
  if (leading.some((criterion) => criterion.verdict === 'not-read')) return 'Not every limit was checked'
  return 'Within every limit checked'
}

/** What limits the record, in order of weight (DOMAIN 6). `static` loads are those held at full load. */
export function cautionsOf(state: ProofTestState, evaluation: TestEvaluation): string[] {
  const loads = staticLoadsOf(evaluation)
  const unmeasured = state.opened?.notMeasured ?? []
  const dye = state.joints.some((joint) => [joint.before, joint.after].some((examined) => examined?.method === 'dye penetrant'))
  return [
    'These figures are an aid, not a design approval. Local law and codes, and a licensed engineer where they require one, come first.',
    `${loads === 0 ? 'No load was held at full load. A static load' : `${capital(staticLoadsText(loads))}`} ${loads > 1 ? 'say' : 'says'} nothing of fatigue, cold, other bed holes${
      unmeasured.length > 0 ? `, ${joinWords(unmeasured.map((name) => name.toLowerCase()))} (not measured)` : ', unmeasured members'
    } or faces nobody examined.`,
    ...(dye ? ['Dye penetrant finds cracks that are open to the surface only.'] : []),
    'Nobody in line with pins, ram or tooling; no hand near a leak under pressure: oil under the skin is an emergency.',
    'Never above the lowest rating in the train. Release first, look after.',
  ]
}

/** "a", "a and b", "a, b and c". */
export function joinWords(words: readonly string[]): string {
  if (words.length <= 1) return words[0] ?? ''
  return `${words.slice(0, -1).join(', ')} and ${words.at(-1) ?? ''}`
}

/** First letter upper case, the rest as it is. */
export function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1)
}

/** Stored energy in words: "At least 93 J at full load, as 9.5 kg dropped 1 m"; two figures, for it is "at least". */
export function energyText(energy: StoredEnergy): string {
  const two = (value: number): string => groupDigits(String(Number(value.toPrecision(2))))
  return `At least ${two(energy.total)} J at full load, as ${two(energy.massDroppedOneMetre)} kg dropped 1 m`
}

/** The clearance's arithmetic on one line: "Lowest 11.79, less U 0.08 short tons, rounded down". */
export function clearanceArithmetic(opened: Opened, evaluation: TestEvaluation): string | null {
  const figures = evaluation.clearance
  if (!figures) return null
  const lowest = formatNumber(toUnit(figures.lowestForce, figures.unit), figures.unit === 'kN' ? 1 : 2)
  const margin = opened.protocol.content.marginDivisor
  return `Lowest ${lowest}, less U ${formatForce(figures.U, figures.unit)}${margin > 1 ? `, divided by ${margin}` : ''}, rounded down`
}

/** One difference between the evaluation frozen at the conclusion and what today's arithmetic makes of the same entries. */
export interface FrozenDifference {
  what: string
  frozen: string
  today: string
}

interface FrozenCriterion {
  id?: unknown
  label?: unknown
  reading?: unknown
  verdict?: unknown
}

function criteriaOf(frozen: Record<string, unknown>): FrozenCriterion[] {
  return Array.isArray(frozen['criteria']) ? (frozen['criteria'] as FrozenCriterion[]) : []
}

function said(criterion: FrozenCriterion | undefined): string {
  if (!criterion) return '—'
  return `${String(criterion.reading)}, ${verdictWord(criterion.verdict as CriterionVerdict)}`
}

/**
 * Whether today's arithmetic, run over the entries that stood at the conclusion, still gives the frozen
 * figures: an empty list when it does. Takes entries in order; without a conclusion there is nothing to differ.
 */
export function frozenDifferences(id: string, entries: readonly LedgerEntry[]): FrozenDifference[] {
  const end = entries.findLastIndex((entry) => entry.kind === 'concluded')
  const concluded = entries[end]
  if (!concluded) return []
  const frozen = concluded.payload['evaluation'] as Record<string, unknown>
  const now = freezeEvaluation(evaluateTest(foldProofTest(id, entries.slice(0, end))))
  if (canonicalText(frozen) === canonicalText(now)) return []
  const before = criteriaOf(frozen)
  const after = criteriaOf(now)
  const ids = [...new Set([...before, ...after].map((criterion) => String(criterion.id)))]
  const found = ids.flatMap((criterionId): FrozenDifference[] => {
    const old = before.find((criterion) => String(criterion.id) === criterionId)
    const fresh = after.find((criterion) => String(criterion.id) === criterionId)
    if (said(old) === said(fresh)) return []
    return [{ what: String(fresh?.label ?? old?.label), frozen: said(old), today: said(fresh) }]
  })
  if (found.length > 0) return found
  return [
    {
      what: 'Figures behind the criteria',
      frozen: `core version ${String(concluded.payload['coreVersion'])}`,
      today: 'other in the last digits',
    },
  ]
}

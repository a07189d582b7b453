import { clearanceLoad, clearancePressure } from '../hydraulics/clearance'
import { ramInput } from '../press/ratings'
import type { StoredEnergy } from '../structure/stored-energy'
import { decimalsOf, FORCE_DECIMALS, toSI, toUnit, type ForceUnit, type PressureUnit } from '../units'
import { evaluateClimb, type ClimbEvaluation, type Criterion, type StageEvaluation } from './evaluate-climb'
import { withoutLifting } from './corrections'
import { energyAt } from './energy'
import type { Opened } from './entries'
import { leadInstrument, stageForce } from './force'
import { witnessReads } from './protocol'
import type { ProofTestState } from './state'

/** Version of the arithmetic; a record shows the figures of the version it was concluded with. */
export const CORE_VERSION = '1'

/** What the press may carry after this test, if it is countersigned as accepted (DOMAIN 3.12). */
export interface ClearanceFigures {
  lowestForce: number
  U: number
  load: number
  text: string
  unit: ForceUnit
  gaugePressure: { text: string; unit: PressureUnit } | null
}

export interface TestEvaluation {
  climbs: ClimbEvaluation[]
  criteria: Criterion[]
  /** Sentences that say what stands against the conclusion "accepted"; empty when nothing does. */
  against: string[]
  clearance: ClearanceFigures | null
  /** Energy stored at full load: at least this much (DOMAIN 3.11). */
  energy: StoredEnergy | null
}

/** All climbs of a leg, evaluated in order. */
export function evaluateLeg(state: ProofTestState, leg: number): ClimbEvaluation[] {
  return (state.legs[leg]?.climbs ?? []).flatMap((_climb, climb) => evaluateClimb(state, leg, climb) ?? [])
}

/** Whether a leg's first set asks for a second climb, by the protocol (DOMAIN 3.8). */
export function repeatClimbWanted(opened: Opened, climbs: readonly ClimbEvaluation[]): boolean {
  const rule = opened.protocol.content.repeatClimb
  const first = climbs[0]?.set
  if (!first || rule === 'never') return false
  return rule === 'always' || first.visible
}

function worst(criteria: readonly Criterion[], id: string, label: string): Criterion[] {
  const rank = (criterion: Criterion): number => {
    const order = { beyond: 3e6, undecided: 2e6, wait: 1e6, 'not-read': 0, within: 0 }[criterion.verdict]
    return order + (criterion.value ?? 0) / Math.max(criterion.limit ?? 1, 1e-12)
  }
  const candidates = criteria.filter((criterion) => criterion.id === id)
  const [first, ...rest] = candidates
  if (!first) return []
  return [{ ...rest.reduce((top, candidate) => (rank(candidate) > rank(top) ? candidate : top), first), label }]
}

/** How near every stage came to its target, as one line: "98.9 to 99.8 %" of what was asked. */
function stagesReached(opened: Opened, all: readonly Criterion[]): Criterion[] {
  const reached = all.filter((criterion) => criterion.id === 'stage-reached' && criterion.value !== null)
  const [first] = worst(all, 'stage-reached', 'Stages reached')
  if (!first || reached.length === 0) return []
  const shares = reached.map((criterion) => (criterion.value ?? 0) * 100)
  const [low, high] = [Math.min(...shares).toFixed(1), Math.max(...shares).toFixed(1)]
  const { stageLowerPercent, stageUpperPercent } = opened.protocol.content.limits
  const verdict = reached.some((criterion) => criterion.verdict === 'wait') ? 'wait' : 'within'
  const reading = low === high ? `${low} %` : `${low} to ${high} %`
  return [{ ...first, verdict, reading, limitText: `${100 - stageLowerPercent} to ${100 + stageUpperPercent} %` }]
}

function everyStage(climbs: readonly ClimbEvaluation[]): StageEvaluation[] {
  return climbs.flatMap((climb) => climb.stages)
}

function independentReadings(state: ProofTestState, stages: readonly StageEvaluation[]): Criterion[] {
  const opened = state.opened
  if (!opened) return []
  return stages
    .filter((stage) => stage.percent >= 100)
    .flatMap((stage): Criterion[] => {
      const independent = stage.attempt.independent
      const common = {
        id: 'independent',
        label: 'Lead and witness gauge',
        value: null,
        limit: null,
        U: null,
        stops: false,
        leads: true,
        limitText: 'the same within one increment',
        source: 'common practice, no source',
      }
      if (!independent) return [{ ...common, verdict: 'not-read', reading: '—' }]
      if (independent.notTaken !== null) return [{ ...common, verdict: 'not-read', reading: `not taken: ${independent.notTaken}` }]
      const match = independentMatches(opened, stage, independent.readings)
      const own = independent.readings.map((reading) => `${reading.text} ${reading.unit}`).join(', ')
      return [{ ...common, verdict: match ? 'within' : 'beyond', reading: own }]
    })
}

/** Whether the witness's reading agrees with some row of the hold within one increment of the gauge. */
export function independentMatches(
  opened: Opened,
  stage: StageEvaluation,
  readings: readonly { sourceId: string; text: string; unit: PressureUnit | string }[],
): boolean {
  return readings.every((reading) => {
    const instrument = opened.instruments.find((candidate) => candidate.id === reading.sourceId)
    if (!instrument || instrument.details.kind === 'indicator') return false
    const increment = toSI(instrument.details.increment)
    const theirs = toSI(reading as Parameters<typeof toSI>[0])
    const rows = stage.attempt.rows.flatMap((row) =>
      row.readings.filter((own) => own.sourceId === reading.sourceId).map((own) => toSI(own)),
    )
    const low = Math.min(...rows)
    const high = Math.max(...rows)
    return rows.length > 0 && theirs >= low - increment * 1.0001 && theirs <= high + increment * 1.0001
  })
}

/** Decimals a clearance is rounded down to, by unit: never more than the gauge could tell. */
const CLEARANCE_DECIMALS: Record<ForceUnit, number> = { N: 0, kN: 1, lbf: 0, 'short-ton': 1, 'long-ton': 1, 'metric-ton-force': 1 }

function clearanceFigures(state: ProofTestState, stages: readonly StageEvaluation[]): ClearanceFigures | null {
  const opened = state.opened
  // An instrument used out of calibration, for a reason, prints that reason and gives no clearance (DOMAIN 3.2).
  if (!opened || opened.instrumentOverride !== null) return null
  const full = stages.filter((stage) => stage.percent >= 100 && stage.end !== null)
  const rows = full.flatMap((stage) => stage.rows).flatMap((row) => row.force ?? [])
  const [first, ...rest] = rows
  if (!first) return null
  const lowest = rest.reduce((low, force) => (force.force < low.force ? force : low), first)
  const unit = opened.forceUnit
  const { load, text } = clearanceLoad({
    lowestForce: lowest.force,
    U: lowest.U,
    margin: opened.protocol.content.marginDivisor,
    ratedLoad: toSI(opened.press.ratedLoad),
    unit,
    decimals: CLEARANCE_DECIMALS[unit],
  })
  if (load <= 0) return null
  const instrument = leadInstrument(opened)
  let gaugePressure: ClearanceFigures['gaugePressure'] = null
  if (instrument?.details.kind === 'gauge') {
    const { increment } = instrument.details
    const step = toSI(increment)
    const { pressure } = clearancePressure({ load, rams: opened.press.rams.map(ramInput), increment: step })
    gaugePressure = { text: toUnit(pressure, increment.unit).toFixed(decimalsOf(increment)), unit: increment.unit }
  }
  return { lowestForce: lowest.force, U: lowest.U, load, text, unit, gaugePressure }
}

/** A correction that may lift no stop raises no clearance either: the lower one of those with it and without it. */
function lowerClearance(state: ProofTestState, stages: readonly StageEvaluation[]): ClearanceFigures | null {
  const given = clearanceFigures(state, stages)
  const unlifted = given && withoutLifting(state)
  if (!unlifted) return given
  const without = clearanceFigures(unlifted, everyStage(unlifted.legs.flatMap((_leg, index) => evaluateLeg(unlifted, index))))
  return without === null || without.load < given.load ? without : given
}

function jointsAfter(state: ProofTestState): Criterion {
  const accepted = state.joints.filter((joint) => joint.after?.result === 'accepted').length
  const rejected = state.joints.filter((joint) => joint.after?.result === 'rejected').length
  const all = state.joints.length
  return {
    id: 'joints-after',
    label: 'Joints after load',
    verdict: rejected > 0 ? 'beyond' : accepted === all && all > 0 ? 'within' : 'not-read',
    value: accepted,
    limit: all,
    U: null,
    reading: `${accepted} of ${all}`,
    limitText: `${all} of ${all}`,
    source: 'walk-down after load',
    stops: false,
    leads: true,
  }
}

/**
 * The whole test: criteria at their worst, what stands against "accepted", and the load that the readings
 * would clear the press to. Figures only; the conclusion is the lead's.
 */
export function evaluateTest(state: ProofTestState): TestEvaluation {
  const opened = state.opened
  if (!opened) return { climbs: [], criteria: [], against: ['The test has not been opened.'], clearance: null, energy: null }
  const legs = state.legs.map((_leg, index) => evaluateLeg(state, index))
  const climbs = legs.flat()
  const stages = everyStage(climbs)
  const all = stages.flatMap((stage) => stage.criteria)
  const sets = climbs.flatMap((climb) => climb.set?.criteria ?? [])
  const independent = independentReadings(
    state,
    stages.filter((stage) => witnessReads(stage.percent, stage.at.climb)),
  )
  const criteria = [
    ...stagesReached(opened, all),
    ...worst(all, 'rating', 'Lowest rating in the train'),
    ...worst(all, 'prediction', 'Deflection as the line predicted'),
    ...worst(all, 'softening', 'Softening, worst step'),
    ...worst(all, 'pressure-loss', 'Pressure lost, worst hold'),
    ...worst(all, 'creep', 'Creep, worst hold'),
    ...worst(sets, 'set', 'Permanent set'),
    ...worst(independent, 'independent', 'Lead and witness gauge'),
    ...[...all, ...sets].filter((criterion) => !criterion.leads && criterion.verdict === 'beyond'),
    jointsAfter(state),
  ]
  const full = stages.filter((stage) => stage.percent >= 100).at(-1)
  const { start } = full ?? {}
  const energy =
    start?.lead && start.force
      ? energyAt(state, { force: start.force.force, opening: start.lead.deflection, pressure: start.force.pressure })
      : null
  return { climbs, criteria, against: standsAgainst(state, opened, legs, criteria), clearance: lowerClearance(state, stages), energy }
}

function standsAgainst(
  state: ProofTestState,
  opened: Opened,
  legs: readonly ClimbEvaluation[][],
  criteria: readonly Criterion[],
): string[] {
  const against: string[] = []
  if (state.stopped) against.push(`The test was stopped: ${state.stopped.why}`)
  if (state.loaded) against.push('The press is still loaded. Release it, then look.')
  legs.forEach((climbs, index) => {
    const label = opened.legs[index]?.label ?? `Leg ${index + 1}`
    const wanted = repeatClimbWanted(opened, climbs) ? 2 : 1
    for (let climb = 0; climb < wanted; climb += 1) {
      const what = climb === 0 ? label : `${label}, second climb`
      const evaluated = climbs[climb]
      const open = state.legs[index]?.climbs[climb]?.stages.find((_stage, stageIndex) => {
        const stage = evaluated?.stages.find((candidate) => candidate.at.stage === stageIndex)
        return stage?.attempt.decided?.decision !== 'go-on' || stage.suggestion === 'stop'
      })
      if (open) against.push(`${what}: the stage at ${open.percent} % is not finished.`)
      else if (!evaluated?.set) against.push(`${what}: the set has not been read.`)
    }
  })
  for (const criterion of criteria) {
    if (criterion.id === 'prediction' || criterion.id === 'stage-reached' || criterion.id === 'independent') continue
    if (criterion.verdict === 'beyond') against.push(`${criterion.label}: ${criterion.reading}, limit ${criterion.limitText}.`)
    if (criterion.verdict === 'undecided' && criterion.leads)
      against.push(`${criterion.label}: ${criterion.reading} cannot be told from the limit ${criterion.limitText}.`)
  }
  const missing = state.joints.filter((joint) => joint.after?.result !== 'accepted')
  if (missing.length > 0 && !against.some((line) => line.startsWith('Joints after'))) {
    against.push(`Joints after load: ${state.joints.length - missing.length} of ${state.joints.length} accepted.`)
  }
  return against
}

/** The rated load in N, and the force of full load. */
export function fullLoad(opened: Opened): number {
  return stageForce(opened, 100)
}

/** The evaluation as a conclusion freezes it: every number a decimal string, nothing that a later version could recompute. */
export function freezeEvaluation(evaluation: TestEvaluation): Record<string, unknown> {
  const strings = (value: unknown): unknown => {
    if (typeof value === 'number')
      return Number.isFinite(value) ? String(Number(value.toPrecision(12))) : value > 0 ? 'unbounded' : 'unknown'
    if (Array.isArray(value)) return value.map(strings)
    if (value !== null && typeof value === 'object') {
      return Object.fromEntries(
        Object.entries(value)
          .filter(([, member]) => typeof member !== 'function')
          .map(([key, member]) => [key, strings(member)]),
      )
    }
    return value ?? null
  }
  const { criteria, against, clearance, energy } = evaluation
  const climbs = evaluation.climbs.map((climb) => ({
    leg: climb.leg,
    climb: climb.climb,
    fit: climb.fit,
    stages: climb.stages.map((stage) => ({
      at: stage.at,
      percent: stage.percent,
      criteria: stage.criteria,
      step: stage.step,
      prediction: stage.prediction,
      rows: stage.rows.map(({ row, force, deflections }) => ({ entryId: row.entryId, force, deflections })),
    })),
    set: climb.set ? { entryId: climb.set.row.row.entryId, deflections: climb.set.row.deflections, criteria: climb.set.criteria } : null,
  }))
  return strings({ criteria, against, clearance, energy, climbs }) as Record<string, unknown>
}

/** Decimals a force is shown with in a unit. */
export function forceDecimals(unit: ForceUnit): number {
  return FORCE_DECIMALS[unit]
}

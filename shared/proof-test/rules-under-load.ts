import { toSI } from '../units'
import { currentAttempt } from './current-attempt'
import { elapsedBetween, LONGEST_PAUSE_SECONDS } from './clock'
import { deflectionsOf, NET } from './deflection'
import type { Opened, Position, Reading } from './entries'
import { evaluateLeg, repeatClimbWanted } from './evaluate'
import { evaluateClimb, predict, type StageEvaluation } from './evaluate-climb'
import { predictFromBand } from './expected'
import { forceOf } from './force'
import { witnessReads } from './protocol'
import { ROWS, rule, UNDER_LOAD, type ProofTestRule } from './rule'
import { climbComplete, datumStanding, nextStep } from './steps'
import type { ProofTestState, StageRow } from './state'

function samePlace(at: Position, state: ProofTestState): boolean {
  const place = state.position
  return place !== null && place.leg === at.leg && place.climb === at.climb && place.stage === at.stage && place.attempt === at.attempt
}

function stageNow(state: ProofTestState): StageEvaluation | null {
  const current = currentAttempt(state)
  if (!current) return null
  const climb = evaluateClimb(state, current.place.leg, current.place.climb)
  return climb?.stages.find((stage) => stage.at.stage === current.place.stage && stage.at.attempt === current.place.attempt) ?? null
}

/** The sources a row must hold, no more and no fewer. */
export function sourcesOfRow(opened: Opened): string[] {
  return [...opened.forceInstrumentIds, ...opened.points.map((point) => point.id)]
}

/** The points to type again when the leading figure is outside: those outside by themselves, else all it is made of. */
function suspects(opened: Opened, lead: string, outside: readonly string[]): string[] {
  if (lead !== NET || !opened.net) return [lead]
  const parts = [opened.net.plus, ...opened.net.minus]
  const own = parts.filter((id) => outside.includes(id))
  return own.length > 0 ? own : parts
}

/** Readings of a row that lie far from what the line predicts, or outside its prediction: they are typed again. */
export function surprising(state: ProofTestState, at: Position, readings: readonly Reading[]): string[] {
  const opened = state.opened
  const climb = state.legs[at.leg]?.climbs[at.climb]
  const datum = climb?.datum.at(-1)
  if (!opened || !climb || !datum) return []
  const evaluated = evaluateClimb(state, at.leg, at.climb)
  const force = forceOf(opened, readings)
  if (!evaluated || !force) return []
  const found: string[] = []
  const before = evaluated.stages.filter((stage) => stage.at.stage < at.stage && stage.start)
  const target = evaluated.stages.find((stage) => stage.at.stage === at.stage)?.target
  const instrument = opened.forceInstrumentIds[0]
  if (target && instrument && (force.force > target.force * 1.5 || force.force < target.force * 0.5)) found.push(instrument)
  const outside: string[] = []
  for (const figure of deflectionsOf(opened, readings, datum.readings)) {
    const points = [evaluated.datum, ...before.map((stage) => stage.start)].flatMap((row) => {
      const own = row?.deflections.find((candidate) => candidate.id === figure.id)
      return row?.force && own
        ? [{ force: row.force.force, deflection: own.deflection, uForce: row.force.uIndependent, uDeflection: own.uReading }]
        : []
    })
    const leads = figure.id === evaluated.datum?.lead?.id
    const prediction =
      predict(opened, points, force.force) ?? (leads ? predictFromBand(opened, at.leg, force.force, figure.uReading) : null)
    if (!prediction || (figure.deflection >= prediction.from && figure.deflection <= prediction.to)) continue
    outside.push(figure.id)
    const far = Math.max(Math.abs(figure.deflection), Math.abs(prediction.deflection)) > 10 * figure.increment
    const ratio = prediction.deflection === 0 ? Number.POSITIVE_INFINITY : figure.deflection / prediction.deflection
    if (figure.id !== NET && far && (ratio >= 5 || ratio <= 0.2)) found.push(figure.id)
  }
  const lead = evaluated.datum?.lead?.id
  if (lead !== undefined && outside.includes(lead)) found.push(...suspects(opened, lead, outside))
  return [...new Set(found)]
}

function stepSays(state: ProofTestState): string {
  const step = nextStep(state)
  const words: Partial<Record<typeof step.name, string>> = {
    'walk-down': 'The walk-down is not finished.',
    'set-up': 'The set-up has not been confirmed.',
    'begin-leg': 'The leg has not been begun.',
    seating: 'The seating load comes first.',
    'seating-release': 'The seating load has not been released.',
    datum: 'The datum has not been read.',
    'datum-watch': 'The datum is still being watched for drift.',
    hold: 'The hold is not finished.',
    wait: 'A reading lies outside. Read it again first.',
    'stop-now': 'A limit is passed. Open the release valve slowly.',
    independent: 'The witness has not read the gauge.',
    decide: 'The stage has not been decided.',
    release: 'The climb is done. Release the press.',
    recovery: 'The set has not been read.',
    'after-walk-down': 'The load is off. Examine the joints.',
    conclude: 'The test waits for its conclusion.',
  }
  return words[step.name] ?? 'This does not come next.'
}

/** Rules of load: R20 to R36. */
export const UNDER_LOAD_RULES: readonly ProofTestRule[] = [
  rule(
    'R20',
    'A stopped test never goes back under load.',
    UNDER_LOAD,
    (_asked, state) =>
      state.stopped
        ? 'This test was stopped and cannot go back under load. Conclude it, find the joint, repair, then start again from the walk-down.'
        : null,
    { interlock: true },
  ),
  rule('R21', 'Legs are begun in order, each when the one before has its set.', ['leg-begun'], ({ payload }, state) => {
    const step = nextStep(state)
    if (step.name === 'begin-leg' && step.leg === payload.leg) return null
    return `Leg ${payload.leg + 1} does not come next. ${stepSays(state)}`
  }),
  rule('R22', 'A seating load is put on once, in its leg, before the datum.', ['seated'], ({ payload }, state) => {
    const step = nextStep(state)
    if (step.name === 'seating' && step.leg === payload.leg) return null
    return `The seating load does not come next. ${stepSays(state)}`
  }),
  rule(
    'R23',
    'A datum or a set is read with the load off: gauge zero and ram clear of the stack.',
    ['datum-read', 'set-read'],
    (_asked, state) =>
      state.loaded
        ? 'The press is still loaded. Release it until the gauge reads zero and the ram is clear of the stack, then read.'
        : null,
  ),
  rule(
    'R24',
    'A datum is read after the seating load, or after the set of the climb before.',
    ['datum-read'],
    ({ payload }, state, opened) => {
      const leg = state.legs[payload.leg]
      if (!leg || state.position?.leg !== payload.leg) return `This leg is not under way. ${stepSays(state)}`
      if (leg.climbs[payload.climb]?.stages.some((stage) => stage.attempts.length > 0)) return 'The climb has begun. Its datum stands.'
      if (payload.climb === 0) return leg.seated && leg.seatingReleasedAt ? null : stepSays(state)
      return payload.climb === 1 && repeatClimbWanted(opened, evaluateLeg(state, payload.leg)) ? null : 'No repeat climb is called for.'
    },
  ),
  rule('R25', 'The first stage waits until the datum was watched and stood still.', ['stage-begun'], ({ payload }, state, opened) => {
    const climb = state.legs[payload.at.leg]?.climbs[payload.at.climb]
    if (!climb) return stepSays(state)
    const standing = datumStanding(opened, climb)
    if (standing === 'steady') return null
    if (standing === 'drifted') return 'The datum drifted by more than one increment. Find out why, then watch it again.'
    return `The datum has not been watched for ${opened.protocol.content.datumWatchSeconds} s. Read it, wait, read it again.`
  }),
  rule(
    'R26',
    'Stages are taken in order; none is skipped, and each waits for the decision on the one before.',
    ['stage-begun'],
    ({ payload: { at } }, state) => {
      const climb = state.legs[at.leg]?.climbs[at.climb]
      const stage = climb?.stages[at.stage]
      if (!climb || !stage || state.position?.leg !== at.leg || state.position.climb !== at.climb)
        return `This stage does not come next. ${stepSays(state)}`
      if (at.attempt !== stage.attempts.length) return `This would be attempt ${stage.attempts.length + 1} at ${stage.percent} %.`
      if (climb.released && !climbComplete(climb))
        return at.stage === 0 ? null : 'The load came off. The climb starts again from its first stage.'
      if (climb.released) return stepSays(state)
      const same = state.position.stage === at.stage
      if (same) return null
      const expected = state.position.stage === null ? 0 : state.position.stage + 1
      if (at.stage !== expected)
        return `The stage at ${climb.stages[expected]?.percent ?? 0} % comes next. None is skipped, and none is lowered.`
      const before = expected > 0 ? climb.stages[expected - 1]?.attempts.at(-1) : undefined
      return expected === 0 || before?.decided?.decision === 'go-on' ? null : stepSays(state)
    },
  ),
  rule(
    'R27',
    'A row belongs to the stage and attempt under way.',
    ['row-read', 'topped-up', 'independent-read', 'decided'],
    ({ payload }, state) =>
      samePlace(payload.at, state) && currentAttempt(state) ? null : `This row belongs to another stage. ${stepSays(state)}`,
  ),
  rule('R28', 'A row holds one reading of every gauge and every point, each in a unit of its kind.', ROWS, (asked, _state, opened) => {
    const wanted = asked.kind === 'seated' || asked.kind === 'topped-up' ? opened.forceInstrumentIds : sourcesOfRow(opened)
    const given = asked.payload.readings.map((reading) => reading.sourceId)
    const missing = wanted.filter((source) => !given.includes(source))
    if (missing.length > 0) return `${missing.length} of ${wanted.length} readings of this row are missing. A row is entered whole.`
    return new Set(given).size === given.length ? null : 'A source is read twice in this row.'
  }),
  rule(
    'R29',
    'A reading outside its prediction, or five times off, is typed again before it is entered.',
    ['row-read'],
    ({ payload }, state, opened) => {
      const again = surprising(state, payload.at, payload.readings).filter((source) => !payload.typedAgain.includes(source))
      if (again.length === 0) return null
      const names = again.map((source) => opened.points.find((point) => point.id === source)?.label ?? 'the gauge').join(' and ')
      return `What was read at ${names} is not what the line predicts. Look again and type it again.`
    },
  ),
  rule('R30', 'A hold ends when its time from the mark is over.', ['row-read'], ({ payload }, state) => {
    if (payload.occasion !== 'hold end') return null
    const current = currentAttempt(state)
    const start = current?.attempt.rows.filter((row: StageRow) => row.occasion === 'hold start').at(-1)
    if (!current || !start) return 'The hold has not begun. Mark and enter a row first.'
    const left = current.stage.holdSeconds - elapsedBetween(start.mark, payload.mark).seconds
    return left > 0.5 ? `${Math.ceil(left)} s of the hold are left.` : null
  }),
  rule('R31', 'A top-up restarts the hold; a second one at full load stops the test.', ['topped-up'], ({ payload }, state) => {
    const current = currentAttempt(state)
    if (!current || current.attempt.rows.length === 0) return 'There is no hold to top up.'
    const full = current.stage.percent >= 100 && payload.at.stage === current.place.stage
    return full && current.attempt.topUps >= 1
      ? 'A second top-up at full load: the press does not hold its pressure. Stop and release.'
      : null
  }),
  rule(
    'R32',
    'Never “go on” past a limit, or where a limit cannot be told from the reading.',
    ['decided'],
    ({ payload }, state) => {
      if (payload.decision !== 'go-on') return null
      const stage = stageNow(state)
      if (!stage) return stepSays(state)
      const beyond = stage.criteria.find((criterion) => criterion.stops && criterion.verdict === 'beyond')
      if (beyond) return `${beyond.label}: ${beyond.reading}, limit ${beyond.limitText}. Open the release valve slowly.`
      const undecided = stage.criteria.find((criterion) => criterion.leads && criterion.verdict === 'undecided')
      if (undecided)
        return `${undecided.label}: ${undecided.reading} cannot be told from the limit ${undecided.limitText}. Read it again, then release.`
      if (stage.suggestion === 'stop') return 'This stage says stop. Open the release valve slowly.'
      return stage.end ? null : 'The hold is not finished. Read the row at its end first.'
    },
    { interlock: true },
  ),
  rule(
    'R33',
    'Outside the prediction or the stage: read again, then go on only with a reason.',
    ['decided'],
    ({ payload }, state) => {
      if (payload.decision !== 'go-on') return null
      const waiting = stageNow(state)?.criteria.find((criterion) => criterion.verdict === 'wait')
      return waiting ? `${waiting.label}: ${waiting.reading}, expected ${waiting.limitText}. Write down why you go on.` : null
    },
    { severity: 'reason' },
  ),
  rule('R34', 'A reading outside is read again before a reason counts.', ['decided'], ({ payload }, state) => {
    if (payload.decision !== 'go-on') return null
    const stage = stageNow(state)
    const waiting = stage?.criteria.some((criterion) => criterion.verdict === 'wait')
    return waiting && !stage?.attempt.rows.some((row) => row.occasion === 'again') ? 'Read the row again first.' : null
  }),
  rule('R35', 'At full load the witness reads the gauge, or it is written down why not.', ['decided'], ({ payload }, state) => {
    const current = currentAttempt(state)
    if (payload.decision !== 'go-on' || !current || !witnessReads(current.stage.percent, current.place.climb)) return null
    return current.attempt.independent
      ? null
      : 'The witness has not read the gauge. Hand over the tablet, or write down why it was not taken.'
  }),
  rule(
    'R36',
    'A pause under load lasts five minutes at most, then the press is released.',
    ['resumed', 'stage-begun'],
    (_asked, state, _opened, { mark }) => {
      if (!state.paused || !state.loaded) return null
      return elapsedBetween(state.paused.mark, mark).seconds > LONGEST_PAUSE_SECONDS
        ? 'The pause under load lasted more than five minutes. Release the press.'
        : null
    },
  ),
  rule(
    'R37',
    'The set is read after the climb is released and has had its time to recover.',
    ['set-read'],
    ({ payload }, state, opened, { mark }) => {
      const climb = state.legs[payload.leg]?.climbs[payload.climb]
      if (!climb?.released) return 'The climb has not been released. Release it, wait, then read.'
      if (!climbComplete(climb) && !state.stopped) return stepSays(state)
      const left = opened.protocol.content.recoverySeconds - elapsedBetween(climb.released.mark, mark).seconds
      return left > 0.5 ? `${Math.ceil(left)} s of recovery are left.` : null
    },
  ),
  rule(
    'R38',
    'A joint is examined after load only when the load is off.',
    ['joint-examined', 'joint-worked'],
    (_asked, state) => (state.loaded ? 'The press is loaded. Release first, look after.' : null),
    { interlock: true },
  ),
  rule(
    'R39',
    'The witness’s reading is in the unit of the gauge, or says why it was not taken.',
    ['independent-read'],
    ({ payload }, _state, opened) => {
      if (payload.notTaken !== null) return payload.readings.length === 0 ? null : 'Either a reading or a reason, not both.'
      const every = opened.forceInstrumentIds.every((id) =>
        payload.readings.some((reading) => reading.sourceId === id && Number.isFinite(toSI(reading))),
      )
      return every ? null : 'The witness reads every gauge that the lead reads.'
    },
  ),
]

import { creepLimit } from '#shared/statistics/hold'
import type { Opened, Position, Reading } from '#shared/proof-test/entries'
import { evaluateClimb, lengthText, predict, type StageEvaluation } from '#shared/proof-test/evaluate-climb'
import { forceOf, stageForce, stageTarget } from '#shared/proof-test/force'
import { surprising } from '#shared/proof-test/rules-under-load'
import { turnMiscount } from '#shared/proof-test/turns'
import type { ProofTestState } from '#shared/proof-test/state'
import { lowestLimit } from '#shared/press/ratings'
import { formatForce, groupDigits, toSI } from '#shared/units'
import { deflectionsOf } from '#shared/proof-test/deflection'
import { valueOf, type Surprise } from './row-model'

function whole(opened: Opened, readings: readonly Reading[]): boolean {
  return [...opened.forceInstrumentIds, ...opened.points.map((point) => point.id)].every((id) =>
    readings.some((reading) => reading.sourceId === id),
  )
}

/** The line speaks of the row as a whole: it is asked once all of it is there. */
function notPredicted(state: ProofTestState, opened: Opened, at: Position, id: string, readings: readonly Reading[]): string | null {
  if (!whole(opened, readings)) return null
  const own = ownLine(state, opened, at, id, readings)
  const off = own !== null && Math.abs(own.deflection - own.prediction.deflection) > Math.max(own.prediction.halfWidth, 5 * own.increment)
  if (!off && !surprising(state, at, readings).includes(id)) return null
  const turn = own ? turnMiscount(opened, id, own.deflection, own.prediction) : null
  return turn ?? 'That is not what the line predicts.'
}

/** Of several points one may be misread: what the line of its own readings predicts for a point, beside what was read. */
function ownLine(state: ProofTestState, opened: Opened, at: Position, id: string, readings: readonly Reading[]) {
  const climb = evaluateClimb(state, at.leg, at.climb)
  const force = forceOf(opened, readings)
  const figure = climb?.datum ? deflectionsOf(opened, readings, climb.datum.row.readings).find((one) => one.id === id) : undefined
  if (!climb || !force || !figure) return null
  const rows = [climb.datum, ...climb.stages.filter((stage) => stage.at.stage < at.stage).map((stage) => stage.start)]
  const points = rows.flatMap((row) => {
    const own = row?.deflections.find((one) => one.id === id)
    return row?.force && own
      ? [{ force: row.force.force, deflection: own.deflection, uForce: row.force.uIndependent, uDeflection: own.uReading }]
      : []
  })
  const prediction = predict(opened, points, force.force)
  return prediction && { prediction, deflection: figure.deflection, increment: figure.increment }
}

function pastRating(opened: Opened, readings: readonly Reading[]): string | null {
  const force = forceOf(opened, readings)
  const lowest = lowestLimit(opened.press)
  if (!force || !lowest || force.force <= lowest.force * 1.0005) return null
  return `That would be ${formatForce(force.force, opened.forceUnit)}, above ${lowest.name}.`
}

/** Surprises of a row at a stage's target: outside the stage's window, or not what the line predicts. */
export function atTarget(state: ProofTestState, opened: Opened, at: Position, percent: number): Surprise {
  const target = stageTarget(opened, percent)
  return (source, readings) => {
    if (source.kind === 'force') {
      const value = valueOf(readings, source.id)
      if (!target || value === null) return null
      const { window, unit } = target
      if (value >= window.from - 1e-6 && value <= window.to + 1e-6) return null
      return pastRating(opened, readings) ?? `That is outside ${groupDigits(window.fromText)} to ${groupDigits(window.toText)} ${unit}.`
    }
    return notPredicted(state, opened, at, source.id, readings)
  }
}

/** Surprises at the end of a hold: more pressure lost, or more movement, than the hold allows. */
export function atHoldEnd(state: ProofTestState, opened: Opened, stage: StageEvaluation, datum: readonly Reading[]): Surprise {
  const { limits } = opened.protocol.content
  const start = stage.rows.filter(({ row }) => 'occasion' in row && row.occasion === 'hold start').at(-1) ?? stage.start
  return (source, readings) => {
    if (!start) return null
    if (source.kind === 'force') {
      const before = valueOf(start.row.readings, source.id)
      const now = valueOf(readings, source.id)
      if (before === null || now === null || before <= 0) return null
      if (now > before) return 'That is more than at the start of the hold.'
      return (before - now) / before > limits.pressureLossPercent / 100
        ? `That is a loss of more than ${limits.pressureLossPercent} % in the hold.`
        : null
    }
    const figure = deflectionsOf(opened, readings, datum).find((candidate) => candidate.id === source.id)
    const first = start.deflections.find((candidate) => candidate.id === source.id)
    if (!figure || !first) return null
    const limit = creepLimit({
      fraction: limits.creepPercent / 100,
      stageDeflection: Math.abs(first.deflection),
      increment: first.increment,
    })
    if (Math.abs(figure.deflection - first.deflection) > limit) return `That moved by more than ${lengthText(opened, limit)} in the hold.`
    return notPredicted(state, opened, stage.at, source.id, readings)
  }
}

/** Surprises of the seating load: well above what was to be put on. */
export function atSeating(opened: Opened): Surprise {
  const most = stageForce(opened, opened.protocol.content.seatingPercent) * 2
  return (_source, readings) => {
    const force = forceOf(opened, readings)
    if (!force || force.force <= most) return null
    return `That would be ${formatForce(force.force, opened.forceUnit)}, more than twice the seating load.`
  }
}

/** With the load off the gauge reads zero; the second reading of a datum stands where the first stood. */
export function atRest(opened: Opened, before: readonly Reading[] | null): Surprise {
  return (source, readings) => {
    const value = valueOf(readings, source.id)
    if (value === null) return null
    if (source.kind === 'force') return value === 0 ? null : 'With the load off the gauge should read zero.'
    const point = opened.points.find((candidate) => candidate.id === source.id)
    const details = opened.instruments.find((candidate) => candidate.id === point?.instrumentId)?.details
    const was = before ? valueOf(before, source.id) : null
    if (was === null || details?.kind !== 'indicator') return null
    return Math.abs(value - was) > toSI(details.increment) * 1.0001 ? 'That is more than one increment from the reading before.' : null
  }
}

import { gaugeErrorLimit } from '../hydraulics/gauge'
import { deliveredAtLeast, ramForce, type RamInput } from '../hydraulics/ram'
import { readableTarget, targetPressure } from '../hydraulics/target'
import { addForces, forceUncertainty, loadCellUncertainty, type BudgetLine, type ForceUncertainty } from '../hydraulics/uncertainty'
import type { FrozenInstrument, GaugeDetails, LoadCellDetails } from '../instruments/model'
import { lowestLimit, ramInput } from '../press/ratings'
import { decimalsOf, parseDecimal, toSI, toUnit, type Unit } from '../units'
import type { Opened, Reading } from './entries'

/** A force with its uncertainty (N). `uIndependent` is the reading's own part, which steps don't share. */
export interface ForceFigure {
  force: number
  U: number
  u: number
  uIndependent: number
  /** Pa; null where a load cell reads force itself. */
  pressure: number | null
  /** The force after the seal-friction allowance: "delivered at least". */
  deliveredAtLeast: number
  budget: BudgetLine[]
}

/** A target for one stage, in the unit of the gauge that reads it. */
export interface StageTarget {
  percent: number
  force: number
  exactText: string
  /** What to pump to: rounded down to what can be read. */
  text: string
  unit: Unit
  readable: number
  readableForce: number
  /** The span of readings that reaches the stage, in SI and as text. */
  window: { from: number; to: number; fromText: string; toText: string }
  belowTolerance: boolean
  sentence: string | null
}

export function instrumentOf(opened: Opened, id: string): FrozenInstrument | undefined {
  return opened.instruments.find((instrument) => instrument.id === id)
}

interface Circuit {
  gauge: GaugeDetails
  instrument: FrozenInstrument
  rams: RamInput[]
}

function circuits(opened: Opened): Circuit[] {
  const rams = opened.press.rams.map(ramInput)
  const gauges = opened.forceInstrumentIds.flatMap((id) => {
    const instrument = instrumentOf(opened, id)
    return instrument && instrument.details.kind === 'gauge' ? [{ instrument, gauge: instrument.details }] : []
  })
  if (gauges.length <= 1) return gauges.map((one) => ({ ...one, rams }))
  return gauges.map((one, index) => ({ ...one, rams: rams.slice(index, index + 1) }))
}

function loadCell(opened: Opened): { instrument: FrozenInstrument; cell: LoadCellDetails } | null {
  for (const id of opened.forceInstrumentIds) {
    const instrument = instrumentOf(opened, id)
    if (instrument && instrument.details.kind === 'load-cell') return { instrument, cell: instrument.details }
  }
  return null
}

function valueOf(readings: readonly Reading[], id: string): number | null {
  const reading = readings.find((candidate) => candidate.sourceId === id)
  if (!reading || !parseDecimal(reading.text, { signed: true }).ok) return null
  return toSI(reading)
}

/** The force a row of readings stands for, or null while a gauge of the row is missing. */
export function forceOf(opened: Opened, readings: readonly Reading[]): ForceFigure | null {
  const cell = loadCell(opened)
  if (cell) {
    const force = valueOf(readings, cell.instrument.id)
    if (force === null) return null
    const result = loadCellUncertainty({
      reading: force,
      errorLimit: (cell.cell.errorPercentOfSpan / 100) * toSI(cell.cell.fullScale),
      certificate: certificateOf(cell.instrument),
      increment: toSI(cell.cell.increment),
    })
    return { ...result, pressure: null, deliveredAtLeast: force }
  }
  const manifolds: ForceUncertainty[] = []
  let pressure = 0
  for (const circuit of circuits(opened)) {
    const read = valueOf(readings, circuit.instrument.id)
    if (read === null) return null
    pressure = Math.max(pressure, read)
    manifolds.push(
      forceUncertainty({
        rams: circuit.rams,
        pressure: read,
        errorLimit: gaugeErrorLimit({
          accuracy: circuit.gauge.accuracy,
          spanMin: 0,
          spanMax: toSI(circuit.gauge.fullScale),
          reading: read,
        }),
        certificate: certificateOf(circuit.instrument),
        readableIncrement: toSI(circuit.gauge.increment),
      }),
    )
  }
  const [only] = manifolds
  if (!only) return null
  const total = manifolds.length === 1 ? only : addForces(manifolds)
  return { ...total, pressure, deliveredAtLeast: deliveredAtLeast(total.force, opened.protocol.content.frictionPercent / 100) }
}

function certificateOf(instrument: FrozenInstrument): { U: number; k: number } | undefined {
  const uncertainty = instrument.calibration?.uncertainty
  return uncertainty ? { U: toSI(uncertainty.value), k: uncertainty.k } : undefined
}

/** The instrument that the lead pumps to: the load cell, else the first gauge. */
export function leadInstrument(opened: Opened): FrozenInstrument | null {
  const cell = loadCell(opened)
  if (cell) return cell.instrument
  return circuits(opened)[0]?.instrument ?? null
}

/** The force that a percentage of the rated load stands for (N). */
export function stageForce(opened: Opened, percent: number): number {
  return (percent / 100) * toSI(opened.press.ratedLoad)
}

/**
 * What to read on the lead's instrument for a percentage of the rated load: exact, rounded down to what
 * can be read, and the window of the stage's tolerance, whose top ends at the lowest rating in the train.
 */
export function stageTarget(opened: Opened, percent: number): StageTarget | null {
  const { limits } = opened.protocol.content
  const lower = limits.stageLowerPercent / 100
  const upper = limits.stageUpperPercent / 100
  const force = stageForce(opened, percent)
  const cap = lowestLimit(opened.press)?.force ?? Number.POSITIVE_INFINITY
  const instrument = leadInstrument(opened)
  if (!instrument || instrument.details.kind === 'indicator') return null
  const { increment } = instrument.details
  const unit = increment.unit
  const step = toSI(increment)
  const decimals = decimalsOf(increment)
  const text = (si: number): string => toUnit(si, unit).toFixed(decimals)
  const down = (si: number): number => Math.floor(si / step + 1e-9) * step
  const up = (si: number): number => Math.ceil(si / step - 1e-9) * step
  if (instrument.details.kind === 'load-cell') {
    const from = up(force * (1 - lower))
    const to = down(Math.min(force * (1 + upper), cap))
    const readable = down(force)
    return {
      percent,
      force,
      exactText: text(force),
      text: text(readable),
      unit,
      readable,
      readableForce: readable,
      window: { from, to, fromText: text(from), toText: text(to) },
      belowTolerance: readable < force * (1 - lower),
      sentence: null,
    }
  }
  // Rams on one manifold share the pressure; isolated ones are pumped to the same, each on its own gauge.
  const rams = opened.press.rams.map(ramInput)
  const pressureFor = (total: number): number => targetPressure({ force: total, rams })
  const target = readableTarget({
    force,
    rams,
    increment: step,
    lowerTolerance: lower,
    upperTolerance: upper,
    capPressure: pressureFor(cap),
    units: { pressure: instrument.details.increment.unit, force: opened.forceUnit },
  })
  const from = up(pressureFor(force * (1 - lower)))
  const to = down(pressureFor(Math.min(force * (1 + upper), cap)))
  return {
    percent,
    force,
    exactText: text(target.exact),
    text: text(target.readable),
    unit,
    readable: target.readable,
    readableForce: ramForce(rams.map((ram) => ({ ram, pressure: target.readable, rodPressure: 0 }))),
    window: { from, to, fromText: text(from), toText: text(to) },
    belowTolerance: target.belowTolerance,
    sentence: target.sentence,
  }
}

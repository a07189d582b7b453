import { gaugeErrorLimit } from '#shared/hydraulics/gauge'
import { areaToleranceOfBore, pistonArea, ramForce, type RamInput } from '#shared/hydraulics/ram'
import { forceUncertainty, deflectionUncertainty, type ForceUncertainty } from '#shared/hydraulics/uncertainty'
import { FIRST_LOAD_BY_QUARTERS } from '#shared/proof-test/protocol'
import type { ClimbPoint } from '#shared/statistics/softening'
import { formatNumber, formatQuantity, toSI, weightOf, type Typed, type Unit } from '#shared/units'

/**
 * One press, invented, for the worked examples of every page: what is typed here is what somebody would have measured
 * and read. Everything else is worked out from it by the functions that work out a test.
 */
const typed = <U extends Unit>(text: string, unit: U): Typed<U> => ({ text, unit })

/** The protocol it was tested by, as it ships: its limits are the ones on these pages. */
export const PROTOCOL = FIRST_LOAD_BY_QUARTERS
const { limits } = PROTOCOL
export const MOST_SET = limits.setPercent / 100
export const MOST_CREEP = limits.creepPercent / 100
export const MOST_LOSS = limits.pressureLossPercent / 100
export const MOST_SOFTENING = limits.softeningPercent / 100
/** How far under and over its load a stage counts as reached. */
export const STAGE_UNDER = limits.stageLowerPercent / 100
export const STAGE_OVER = limits.stageUpperPercent / 100

export const RATED = typed('100', 'kN')
export const BORE = typed('50', 'mm')
export const BORE_TOLERANCE = typed('0.05', 'mm')
export const SPRINGS = typed('200', 'N')
export const SPRINGS_TOLERANCE = typed('60', 'N')
export const CARRIED = typed('20', 'kg')
export const CARRIED_TOLERANCE = typed('1', 'kg')
export const FULL_SCALE = typed('700', 'bar')
export const GAUGE_STEP = typed('5', 'bar')
export const GAUGE_CLASS = { standard: 'en-837-1', class: 1 } as const
export const INDICATOR_STEP = typed('0.001', 'mm')
export const INDICATOR_LIMIT = typed('0.003', 'mm')

/** A row as read: gauge, and the indicators at the middle of the bed and over its two pins. */
export interface ReadRow {
  what: string
  gauge: Typed<'bar'>
  middle: Typed<'mm'>
  left: Typed<'mm'>
  right: Typed<'mm'>
}

const row = (what: string, gauge: string, middle: string, left: string, right: string): ReadRow => ({
  what,
  gauge: typed(gauge, 'bar'),
  middle: typed(middle, 'mm'),
  left: typed(left, 'mm'),
  right: typed(right, 'mm'),
})

export const DATUM = row('Datum', '0', '1.204', '0.512', '0.498')
export const STAGES = [
  row('25 %', '125', '1.544', '0.574', '0.556'),
  row('50 %', '250', '1.824', '0.633', '0.617'),
  row('75 %', '380', '2.114', '0.695', '0.679'),
  row('100 %', '505', '2.404', '0.755', '0.739'),
] as const
export const FULL = STAGES[3]
export const HOLD_END = row('100 %, end of the hold', '500', '2.397', '0.754', '0.738')
export const SET = row('Set, after the release', '0', '1.227', '0.516', '0.500')
export const SECOND_SET = row('Second set', '0', '1.229', '0.516', '0.501')

export const ramOfExample = (): RamInput => ({
  area: pistonArea(toSI(BORE)),
  relativeAreaTolerance: areaToleranceOfBore(toSI(BORE), toSI(BORE_TOLERANCE)),
  rodArea: 0,
  springReturn: toSI(SPRINGS),
  springReturnTolerance: toSI(SPRINGS_TOLERANCE),
  carriedWeight: weightOf(toSI(CARRIED)),
  carriedWeightTolerance: weightOf(toSI(CARRIED_TOLERANCE)),
})

/** Force (N) at a gauge reading. */
export const forceAt = (gauge: Typed<'bar'>): number => ramForce([{ ram: ramOfExample(), pressure: toSI(gauge), rodPressure: 0 }])

export function forceWithU(gauge: Typed<'bar'>): ForceUncertainty {
  const pressure = toSI(gauge)
  return forceUncertainty({
    rams: [ramOfExample()],
    pressure,
    errorLimit: gaugeErrorLimit({ accuracy: GAUGE_CLASS, spanMin: 0, spanMax: toSI(FULL_SCALE), reading: pressure }),
    readableIncrement: toSI(GAUGE_STEP),
  })
}

/** How far each indicator moved from its datum, and the net of the bed: the middle less the mean of its pins; m. */
export function deflectionsOf(read: ReadRow, datum: ReadRow = DATUM): { middle: number; left: number; right: number; net: number } {
  const moved = (point: 'middle' | 'left' | 'right') => toSI(read[point]) - toSI(datum[point])
  const [middle, left, right] = [moved('middle'), moved('left'), moved('right')]
  return { middle, left, right, net: middle - (left + right) / 2 }
}

/** Sensitivities of the net: the middle counts once, each pin by half. */
export const NET_TERMS = [1, -1 / 2, -1 / 2] as const

/** Uncertainty of a net figure: of one row, or of the difference of two with the datum's row. */
export const netUncertainty = (rows: 1 | 2) =>
  deflectionUncertainty({
    increment: toSI(INDICATOR_STEP),
    errorLimit: toSI(INDICATOR_LIMIT),
    terms: rows === 1 ? NET_TERMS : [...NET_TERMS, ...NET_TERMS],
  })

/** The climb as the line and the softening see it: the datum first, then the stages that were read. */
export function climb(stages: readonly ReadRow[] = STAGES): ClimbPoint[] {
  return [DATUM, ...stages].map((read) => ({
    force: forceAt(read.gauge),
    deflection: deflectionsOf(read).net,
    uForce: forceWithU(read.gauge).uIndependent,
    uDeflection: netUncertainty(1).u,
  }))
}

/** "380 bar" as it was typed. */
export const asTyped = ({ text, unit }: Typed<Unit>): string => formatQuantity(toSI({ text, unit }), unit, text.split('.')[1]?.length ?? 0)

export const kN = (newton: number, decimals = 2): string => formatQuantity(newton, 'kN', decimals)
export const mm = (metre: number, decimals = 3): string => formatQuantity(metre, 'mm', decimals)
export const percent = (share: number, decimals = 1): string => `${formatNumber(share * 100, decimals)}\u202f%`
/** Stiffness (N/m) in kN/mm. */
export const perMillimetre = (stiffness: number): string => `${formatNumber(stiffness / 1e6, 1)}\u00a0kN/mm`

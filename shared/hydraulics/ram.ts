import { toSI } from '../units'
import type { ForceUnit } from '../units'

/** A ram as the arithmetic sees it; SI throughout. */
export type RamInput = {
  /** Total effective piston area, m². */
  area: number
  /** Half-width of the area as a fraction of it, rectangular; 2·Δd/d for a measured bore. */
  relativeAreaTolerance: number
  /** Area of the rod, m², on which `rodPressure` pushes back; 0 for a single-acting ram. */
  rodArea: number
  /** Pull of the return springs at this extension, N. */
  springReturn: number
  /** Half-width of that pull, N, rectangular. */
  springReturnTolerance: number
  /** Weight that moves with the ram, N: positive when it comes down with it, negative when it is lifted. */
  carriedWeight: number
  /** Half-width of that weight, N, rectangular. */
  carriedWeightTolerance: number
}

/** A ram with the pressure on its piston and on its rod side (0 when vented), Pa. */
export type RamUnderPressure = { ram: RamInput; pressure: number; rodPressure: number }

/**
 * Area of a round piston, m², from its bore, m: A = π·d²/4.
 * @throws RangeError when the bore is not above zero.
 */
export function pistonArea(bore: number): number {
  if (!(bore > 0)) throw new RangeError('The bore must be above zero.')
  return (Math.PI * bore * bore) / 4
}

/**
 * Half-width of a piston area as a fraction, from the half-width of its bore: 2·Δd/d. Both in m.
 * Source: first-order propagation, JCGM 100:2008, 5.1.2.
 */
export function areaToleranceOfBore(bore: number, tolerance: number): number {
  return (2 * tolerance) / bore
}

/**
 * Theoretical force of all rams together, N, no friction: Σ(P·A − P_rod·A_rod − F_ret + W).
 * Rams on one manifold are given the same pressure; isolated ones each their own gauge's.
 * Source: F = p·π·d²/4, as cylinder makers print it.
 */
export function ramForce(rams: readonly RamUnderPressure[]): number {
  return rams.reduce(
    (sum, { ram, pressure, rodPressure }) => sum + pressure * ram.area - rodPressure * ram.rodArea - ram.springReturn + ram.carriedWeight,
    0,
  )
}

/**
 * The least force delivered when seals take a share of the theoretical force, N: fixed and
 * one-sided, 0 to 5 % unless a measured share is given. It doesn't lower a clearance, because the
 * press is later used by the same ram and gauge. Common practice, from memory, no source.
 */
export function deliveredAtLeast(force: number, frictionShare = 0.05): number {
  return force * (1 - frictionShare)
}

export type FittingReading =
  | { kind: 'bore'; bore: number; area: number }
  | { kind: 'rated-pressure'; pressure: number }
  | { kind: 'ton'; unit: ForceUnit; capacity: number }

export type RamCrossCheck = {
  /** Rated capacity ÷ (rated pressure × area). */
  ratio: number
  consistent: boolean
  /** What could be read again, with the value that would fit; empty when consistent. */
  readings: FittingReading[]
}

const LEAST_RATIO = 0.97
const MOST_RATIO = 1.03
/** Newtons in one of each ton. */
const TONS = (['short-ton', 'metric-ton-force', 'long-ton'] as const).map((unit) => ({
  unit,
  newtons: toSI({ text: '1', unit }),
}))

/**
 * Whether a ram's rated capacity (N), rated pressure (Pa) and area (m²) belong together: their ratio
 * within 0.97 to 1.03. If not, the bore, the rating or the ton is wrong, and the readings that would
 * fit are listed. A ton is proposed only when the rating was marked in tons (`markedUnit`) and the
 * other ton is smaller: a larger ton than marked is never proposed.
 * Common practice, no source.
 * @throws RangeError when a value is not above zero.
 */
export function crossCheckRam(input: {
  ratedCapacity: number
  ratedPressure: number
  area: number
  markedUnit?: ForceUnit | undefined
}): RamCrossCheck {
  const { ratedCapacity, ratedPressure, area } = input
  if (!(ratedCapacity > 0 && ratedPressure > 0 && area > 0)) {
    throw new RangeError('Rated capacity, rated pressure and area must be above zero.')
  }
  const ratio = ratedCapacity / (ratedPressure * area)
  const fits = (value: number) => value >= LEAST_RATIO && value <= MOST_RATIO
  if (fits(ratio)) return { ratio, consistent: true, readings: [] }
  const fittingArea = ratedCapacity / ratedPressure
  const marked = TONS.find((ton) => ton.unit === input.markedUnit)
  const smallerTons = marked ? TONS.filter((ton) => ton.newtons < marked.newtons) : []
  const tonReadings = smallerTons.flatMap((ton): FittingReading[] => {
    const share = ton.newtons / (marked?.newtons ?? ton.newtons)
    return fits(ratio * share) ? [{ kind: 'ton', unit: ton.unit, capacity: ratedCapacity * share }] : []
  })
  return {
    ratio,
    consistent: false,
    readings: [
      { kind: 'bore', bore: Math.sqrt((4 * fittingArea) / Math.PI), area: fittingArea },
      { kind: 'rated-pressure', pressure: ratedCapacity / area },
      ...tonReadings,
    ],
  }
}

import { deflectionUncertainty } from '../hydraulics/uncertainty'
import type { IndicatorDetails } from '../instruments/model'
import { parseDecimal, toSI } from '../units'
import type { MeasuringPoint, Opened, Reading } from './entries'
import { instrumentOf } from './force'

/** Deflection of one point, or of the net figure (m), positive in the direction of loading. */
export interface DeflectionFigure {
  id: string
  label: string
  deflection: number
  /** Expanded, k = 2. */
  U: number
  /** Standard uncertainty of one reading, without the datum's share. */
  uReading: number
  increment: number
}

export const NET = 'net'

function indicatorOf(opened: Opened, point: MeasuringPoint): IndicatorDetails | null {
  const details = instrumentOf(opened, point.instrumentId)?.details
  return details?.kind === 'indicator' ? details : null
}

function difference(opened: Opened, point: MeasuringPoint, readings: readonly Reading[], datum: readonly Reading[]): number | null {
  const now = readings.find((reading) => reading.sourceId === point.id)
  const zero = datum.find((reading) => reading.sourceId === point.id)
  if (!now || !zero || !indicatorOf(opened, point)) return null
  if (!parseDecimal(now.text, { signed: true }).ok || !parseDecimal(zero.text, { signed: true }).ok) return null
  return (toSI(now) - toSI(zero)) * (point.risesWithLoad ? 1 : -1)
}

function uncertaintyOf(
  opened: Opened,
  points: readonly { point: MeasuringPoint; sensitivity: number }[],
): { u: number; U: number; uReading: number; increment: number } {
  const terms = points.flatMap(({ point, sensitivity }) => {
    const details = indicatorOf(opened, point)
    if (!details) return []
    const increment = toSI(details.increment)
    return [{ sensitivity, increment, errorLimit: details.errorLimit ? toSI(details.errorLimit) : increment }]
  })
  const reading = deflectionUncertainty({ increment: 0, terms })
  const withDatum = deflectionUncertainty({ increment: 0, terms: [...terms, ...terms] })
  return { u: withDatum.u, U: withDatum.U, uReading: reading.u, increment: Math.max(...terms.map((term) => term.increment), 0) }
}

/**
 * Every deflection a row yields against its datum: each raw point, and the net of combined points when the
 * test has one (reading of `plus` less the mean of `minus`). The net stands first: it carries the line.
 */
export function deflectionsOf(opened: Opened, readings: readonly Reading[], datum: readonly Reading[]): DeflectionFigure[] {
  const raw = opened.points.flatMap((point): DeflectionFigure[] => {
    const deflection = difference(opened, point, readings, datum)
    if (deflection === null) return []
    const { U, uReading, increment } = uncertaintyOf(opened, [{ point, sensitivity: 1 }])
    return [{ id: point.id, label: point.label, deflection, U, uReading, increment }]
  })
  const net = opened.net
  if (!net) return raw
  const plus = raw.find((figure) => figure.id === net.plus)
  const minus = net.minus.map((id) => raw.find((figure) => figure.id === id))
  if (!plus || minus.length === 0 || minus.some((figure) => !figure)) return raw
  const mean = minus.reduce((sum, figure) => sum + (figure?.deflection ?? 0), 0) / minus.length
  const combined = opened.points.flatMap((point) => {
    if (point.id === net.plus) return [{ point, sensitivity: 1 }]
    return net.minus.includes(point.id) ? [{ point, sensitivity: 1 / minus.length }] : []
  })
  const { U, uReading, increment } = uncertaintyOf(opened, combined)
  return [{ id: NET, label: net.label, deflection: plus.deflection - mean, U, uReading, increment }, ...raw]
}

/** The figure that carries the line: the net, else the first point. */
export function leadFigure(figures: readonly DeflectionFigure[]): DeflectionFigure | null {
  return figures[0] ?? null
}

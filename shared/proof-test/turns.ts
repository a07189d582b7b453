import { decimalsOf, formatQuantity, toSI } from '../units'
import type { Opened } from './entries'
import { instrumentOf } from './force'

/**
 * A sentence when a point's deflection (m) is one whole revolution of its dial off what the line predicts
 * (m, within `halfWidth` m), else null: a turn that was not counted. Common practice, no source.
 */
export function turnMiscount(
  opened: Opened,
  pointId: string,
  deflection: number,
  prediction: { deflection: number; halfWidth: number },
): string | null {
  const point = opened.points.find((candidate) => candidate.id === pointId)
  const details = point ? instrumentOf(opened, point.instrumentId)?.details : undefined
  if (details?.kind !== 'indicator' || !details.revolution) return null
  const turn = toSI(details.revolution)
  const off = Math.abs(deflection - prediction.deflection)
  if (turn <= 0 || Math.abs(off - turn) > Math.max(prediction.halfWidth, 2 * toSI(details.increment)) || off <= prediction.halfWidth)
    return null
  const size = formatQuantity(turn, details.revolution.unit, decimalsOf(details.revolution))
  return `That is one whole turn of the dial (${size}) off what the line predicts. Count the turns.`
}

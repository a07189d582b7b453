import type { Point } from './drawing'
import type { LineChartSpec } from './line-spec'
import { axisTicks, tidy } from './ticks'
import type { AxisTicks } from './ticks'

export interface LoadScale {
  zero: number
  top: number
  /** px from the panel's top for a percentage of rated load. */
  at: (percent: number) => number
}

/**
 * Where the scale that ladder and line share starts and ends inside a panel of a given height (px from its top);
 * `yMax` in percent of rated load. A chart that labels its own stages stands closer to its edges.
 */
export function loadScale(height: number, yMax: number, setting: LineChartSpec['setting'] = 'beside'): LoadScale {
  const roomy = height >= 560
  const top = setting === 'alone' ? 68 : roomy ? 80 : 62
  const zero = height - (setting === 'alone' ? 62 : roomy ? 84 : 70)
  return { zero, top, at: (percent) => zero - ((zero - top) * percent) / yMax }
}

/** Pixel frame of the plot. */
export interface LineFrame {
  left: number
  right: number
  zero: number
  top: number
  /** Where lines that run on past the last stage are cut. */
  ceiling: number
  axis: AxisTicks
  x: (deflection: number) => number
  y: (percent: number) => number
}

/** The frame in px of a chart; the axis takes in every point, the band at the top and the prediction. */
export function lineFrame(spec: LineChartSpec): LineFrame {
  const alone = spec.setting === 'alone'
  const narrow = spec.width < 360
  const scale = loadScale(spec.height, spec.yMax, spec.setting)
  const left = alone ? Math.min(205, spec.width * 0.42) : narrow ? 35 : 40
  const right = spec.width - (alone ? 32 : narrow ? 35 : 40)
  const axis = axisTicks(spec.xMax, right - left < 200 ? 3 : 4)
  return {
    left,
    right,
    zero: scale.zero,
    top: scale.top,
    ceiling: scale.top - (alone ? 14 : 20),
    axis,
    x: (deflection) => left + ((right - left) * deflection) / axis.max,
    y: scale.at,
  }
}

/** A straight line of deflection (intercept, and slope per percent) as the stroke (px) that the frame leaves of it. */
export function cutAtFrame(frame: LineFrame, intercept: number, slope: number): [Point, Point] {
  const yTop = (frame.zero - frame.ceiling) / (frame.zero - frame.y(1))
  const end = { x: frame.x(intercept + slope * yTop), y: frame.ceiling }
  const start = { x: frame.x(Math.max(0, intercept)), y: frame.y(intercept < 0 && slope > 0 ? -intercept / slope : 0) }
  const limit = frame.right + 30
  if (end.x <= limit) return [start, end]
  const share = (limit - start.x) / (end.x - start.x)
  return [start, { x: limit, y: start.y + (end.y - start.y) * share }]
}

/** Edges of the expected band (px): the low one, stiffer, lies left. */
export function bandEdges(spec: LineChartSpec, frame: LineFrame): { low: [Point, Point]; high: [Point, Point] } | null {
  if (spec.band === null) return null
  return {
    low: cutAtFrame(frame, 0, spec.band.low / 100),
    high: cutAtFrame(frame, 0, spec.band.high / 100),
  }
}

/** Top of the shared scale for given stages: the highest one, 100 % at the least. */
export function topOfScale(stages: readonly { percent: number }[]): number {
  return tidy(Math.max(100, ...stages.map((stage) => stage.percent)))
}

/** One line of load across the chart. `percent` is of rated load; `load` is shown where the chart labels its stages. */
export interface LineStage {
  percent: number
  label: string
  load?: string
}

/**
 * One reading. `x` is deflection in the chart's display unit, `y` load in percent of rated load; `ux` and `uy` are
 * their uncertainties in the same. `mark: 'stop'` says that the step arriving here is beyond its limit.
 */
export interface LinePoint {
  x: number
  y: number
  ux: number
  uy: number
  mark?: 'stop' | 'wait'
  /** Letters of the corrections that the reading took; it is then drawn with them. */
  corrected?: string
}

/** What the next reading should be: from–to in deflection, at load `y` (percent). */
export interface LinePrediction {
  y: number
  from: number
  to: number
  /** The figures, for example "1.25 to 1.44 mm". */
  text: string
  /** The words above them, for example "Next: expect". */
  caption?: string
  /** Chalk while it is the next thing to read, scribe once it has been read. */
  tone?: 'chalk' | 'scribe'
}

export interface LineNote {
  at: { x: number; y: number }
  tone: 'scribe' | 'chalk' | 'stop'
  /** The first line is the statement, the others are its reasons. */
  lines: string[]
  mark?: 'wait' | 'stop'
}

export interface LineChartSpec {
  width: number
  height: number
  stages: LineStage[]
  points: LinePoint[]
  /** Deflection = intercept + slope × percent. */
  fit: { slope: number; intercept: number } | null
  /** Expected deflection at 100 %, low and high. */
  band: { low: number; high: number } | null
  prediction: LinePrediction | null
  /** At most three are drawn, the prediction's own included. */
  notes: LineNote[]
  /** Set or release reading on the axis, in deflection. */
  setPoint?: { x: number; ux: number; corrected?: string }
  /** Readings on the way down or of a repeat climb, drawn as a dotted line. */
  comparison?: { x: number; y: number; corrected?: string }[]
  /** The line of the test that is repeated, under the new one, and what it is called. */
  earlier?: { label: string; points: { x: number; y: number }[] } | undefined
  xLabel: string
  xUnit: string
  /** Deflection the axis has to reach; rounded up to a labelled step. */
  xMax: number
  /** Percent at the top of the shared scale. */
  yMax: number
  title?: string
  aside?: string
  /** What the letters mean, at the foot of a chart that stands alone. */
  footnote?: string
  /** `beside` shares the ladder's scale and leaves the stages to it; `alone` labels its own. */
  setting?: 'beside' | 'alone'
}

import type { ReactElement } from 'react'
import { lineDrawing, loadScale } from '#shared/chart/line-geometry'
import type { LineChartSpec } from '#shared/chart/line-geometry'
import { setPercent } from '../typeset'
import { MarkShape } from '../marks'
import type { MarkName } from '../marks'
import { DrawingView } from './drawing-view'

export type { LineChartSpec } from '#shared/chart/line-geometry'

interface LineChartProps extends LineChartSpec {
  /** Said instead of the list of readings. */
  label?: string
  /** Marks before the stages' names; only where the chart labels its own stages. */
  stageMarks?: { percent: number; mark: MarkName }[]
}

/** The readings in words, in the order they were taken. */
function inWords(spec: LineChartSpec): string {
  const readings = spec.points.map((point) => {
    const bad = point.mark === 'stop' ? ', step beyond its limit' : ''
    const corrected = point.corrected === undefined ? '' : `, corrected (${point.corrected})`
    return `${point.x} ${spec.xUnit} at ${Math.round(point.y)} percent${bad}${corrected}`
  })
  const next = spec.prediction === null ? [] : [`${spec.prediction.caption ?? 'Expected'} ${spec.prediction.text}`]
  const notes = spec.notes.map((note) => note.lines.join(', '))
  const old = spec.earlier?.points.map((point) => `${point.x.toFixed(2)} ${spec.xUnit} at ${Math.round(point.y)} percent`) ?? []
  const earlier = spec.earlier ? [`${spec.earlier.label}: ${old.join(', ')}`] : []
  return [`${spec.xLabel} against load`, ...readings, ...next, ...notes, ...earlier].join('. ')
}

/** Load up, deflection right: readings with their uncertainty, the line through them, and what comes next. */
export function LineChart({ label, stageMarks = [], ...spec }: LineChartProps): ReactElement {
  const typeset: LineChartSpec = {
    ...spec,
    stages: spec.stages.map((stage) => ({ ...stage, label: setPercent(stage.label) })),
    notes: spec.notes.map((note) => ({ ...note, lines: note.lines.map(setPercent) })),
  }
  const scale = loadScale(spec.height, spec.yMax, spec.setting)
  return (
    <div className="relative">
      <DrawingView drawing={lineDrawing(typeset)} label={label ?? inWords(spec)} />
      {spec.setting === 'alone' && (
        <svg aria-hidden width={46} height={spec.height} className="absolute left-0 top-0">
          {stageMarks.map(({ percent, mark }) => (
            <MarkShape key={percent} name={mark} x={32} y={scale.at(percent)} size={17} tone="dye" />
          ))}
        </svg>
      )}
    </div>
  )
}

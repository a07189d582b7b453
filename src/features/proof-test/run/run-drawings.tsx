import type { ReactElement } from 'react'
import { withEarlier } from '#shared/chart/earlier-line'
import type { LineChartSpec } from '#shared/chart/line-spec'
import type { Opened } from '#shared/proof-test/entries'
import { evaluateClimb } from '#shared/proof-test/evaluate-climb'
import { toSI, type TypedLength } from '#shared/units'
import type { DrawnPress } from '#shared/drawing/frame'
import { holeInUse } from '#shared/drawing/drawn-press'
import { JointDrawing } from '../../../components/instruments/joint-drawing'
import { LineChart } from '../../../components/instruments/line-chart'
import { LoadLadder } from '../../../components/instruments/load-ladder'
import { usePanZoom } from '../../../components/instruments/use-pan-zoom'
import { ZoomKeys, ZoomWindow } from '../../../components/instruments/zoom-window'
import type { Size } from '../../../components/fit'
import { Mark } from '../../../components/marks'
import type { RunShape } from '../../../components/run/run-frame'
import { useEarlierLine } from '../../../lib/use-earlier-line'
import { jointAtHand, jointMark, orderWalked, walkedWords, type Occasion } from '../joint-words'
import { ladderStages, levelPercent } from '../ladder-model'
import { lineSpec } from '../line-model'
import type { Run } from '../use-run'
import { useChosenJoint } from './step-walk-down'
import { WalkDownLegend } from './walk-down-legend'

interface DrawingProps {
  run: Run
  opened: Opened
  size: Size
  shape: RunShape
}

/** The ladder of load; its ram is hidden while the witness reads. */
export function RunLadder({ run, opened, size, shape, covered }: DrawingProps & { covered: boolean }): ReactElement {
  return (
    <LoadLadder
      scale={shape === 'phone' ? 'strip' : 'vertical'}
      words={false}
      stages={ladderStages(run.state, opened, run.step).map((stage) => (covered ? { ...stage, load: '' } : stage))}
      levelPercent={covered ? null : levelPercent(run.state, opened, run.evaluation)}
      {...size}
    />
  )
}

function Covered({ size, name }: { size: Size; name: string }): ReactElement {
  return (
    <div className="flex flex-col items-center justify-center gap-3 px-6 text-center" style={size}>
      <Mark name="to-come" tone="dye" size={48} />
      <p className="text-20 font-semibold">Covered</p>
      <p className="text-18 text-faint-scribe">Until {name} has read the gauge.</p>
    </div>
  )
}

const metres = (length: TypedLength | null): number | null => (length ? toSI(length) : null)

export function drawnPress(opened: Opened): DrawnPress {
  const { kind, dimensions } = opened.press
  const { height, opening, throat, holePitch, holes } = dimensions
  return {
    kind,
    dimensions: {
      height: metres(height),
      width: metres(opening),
      throat: metres(throat),
      holes,
      holePitch: metres(holePitch),
      bedHole: holeInUse(opened.legs[0]?.bedHole),
    },
  }
}

/** Under the drawing: how far the walk came, and keys to enlarge it. */
const STRIP = 56

/** The drawing of the walk-down: every balloon a button. */
function WalkDownDrawing({ run, opened, size, shape }: DrawingProps): ReactElement {
  const occasion: Occasion = run.step.name === 'after-walk-down' ? 'after load' : 'before load'
  const [{ jointId }, choose] = useChosenJoint(run.testId)
  const zoom = usePanZoom()
  const { joints } = run.state
  const legend = shape === 'portrait' && size.width >= 700
  const width = legend ? Math.round(size.width * 0.65) : size.width
  const height = Math.max(STRIP, size.height - STRIP)
  const last = orderWalked(joints, occasion).at(-1)
  return (
    <div className={legend ? 'grid grid-cols-[65%_35%]' : ''}>
      <div style={{ width }}>
        <div style={{ width, height }}>
          <ZoomWindow zoom={zoom}>
            <JointDrawing
              press={drawnPress(opened)}
              joints={joints.map((joint) => ({
                id: joint.joint.id,
                number: joint.joint.number,
                name: joint.joint.name,
                place: joint.joint.place,
                state: jointMark(joint, occasion),
              }))}
              points={opened.points.map(({ letter, place }) => ({ letter, place }))}
              selectedId={jointAtHand(opened.press.kind, joints, occasion, jointId)?.joint.id ?? null}
              onSelect={(id) => choose({ jointId: id })}
              size={{ width, height }}
            />
          </ZoomWindow>
        </div>
        <div className="flex items-center justify-between gap-3 pl-4" style={{ height: STRIP }}>
          <p className="min-w-0 font-condensed text-16 text-faint-scribe">
            {last && `Last: joint ${last.joint.joint.number}, ${walkedWords(last, joints.length)}`}
          </p>
          <ZoomKeys zoom={zoom} />
        </div>
      </div>
      {legend && <WalkDownLegend opened={opened} height={size.height} />}
    </div>
  )
}

/** The line that is drawn, over that of the test it repeats where that is here: it is never asked for under load. */
function RunLine({ opened, leg, unloaded, spec }: { opened: Opened; leg: number; unloaded: boolean; spec: LineChartSpec }): ReactElement {
  const earlier = useEarlierLine(opened, leg, unloaded)
  return <LineChart {...withEarlier(spec, earlier)} />
}

/** At the right of the bench, or over it: the line, or on a walk-down the drawing of the press. */
export function RunPicture(props: DrawingProps & { covered: boolean }): ReactElement {
  const { run, opened, size, shape, covered } = props
  if (covered) return <Covered size={size} name={opened.people.witness.name} />
  if (run.step.name === 'walk-down' || run.step.name === 'after-walk-down') return <WalkDownDrawing {...props} />
  const place = run.state.position
  const leg = place?.leg ?? 0
  const before = place && place.climb > 0 ? evaluateClimb(run.state, place.leg, place.climb - 1) : null
  const percent = 'percent' in run.step ? run.step.percent : null
  const spec = lineSpec(opened, run.evaluation, { ...size, percent, alone: shape === 'phone', before, leg })
  return <RunLine opened={opened} leg={leg} unloaded={run.state.loaded === null} spec={spec} />
}

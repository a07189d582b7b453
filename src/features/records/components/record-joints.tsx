import { orderWalked, jointMark, type Occasion } from '#shared/proof-test/walked'
import type { JointState } from '#shared/proof-test/state'
import { Fit } from '../../../components/fit'
import { drawnPress, holeInUse } from '#shared/drawing/drawn-press'
import { JointDrawing, PrintedElevation } from '../../../components/instruments/joint-drawing'
import { usePanZoom } from '../../../components/instruments/use-pan-zoom'
import { ZoomKeys, ZoomWindow } from '../../../components/instruments/zoom-window'
import { JointBalloon, jointStateWord } from '../../../components/marks'
import { clockTime } from '../../../lib/dates'
import { capital } from '../../../lib/words'
import type { RecordView } from '../record-view'

/** What a joint's balloon says on the record: the last that was found of it, after load where it was looked at again. */
const occasionOf = (joint: JointState): Occasion => (joint.after ? 'after load' : 'before load')

function Found({ record, joint, rank }: { record: RecordView; joint: JointState; rank: number | undefined }) {
  const said = [joint.before, joint.after].flatMap((examined, index) => {
    if (!examined) return []
    const words = [
      `${capital(examined.result)} ${index === 0 ? 'before' : 'after'} load at ${clockTime(examined.at)}, ${examined.method}, by ${record.nameOf(examined.by)}`,
      examined.remark,
    ]
    return [words.filter(Boolean).join(': ')]
  })
  const { number, name } = joint.joint
  const mark = jointMark(joint, occasionOf(joint))
  return (
    <li className="grid grid-cols-[2.25rem_minmax(0,1fr)] gap-x-3 border-t border-hairline py-2 print:break-inside-avoid">
      <JointBalloon number={number} state={mark} size={28} />
      <div className="min-w-0">
        <p className="font-medium">
          {name}
          {rank !== undefined && <span className="font-normal text-graphite">, walked as number {rank}</span>}
        </p>
        {said.length === 0 && <p className="text-graphite">{capital(jointStateWord[mark])}.</p>}
        {said.map((one) => (
          <p key={one} className="text-graphite">
            {one}
          </p>
        ))}
      </div>
    </li>
  )
}

/** The press as it was walked down, drawn, with what was found of each joint beside it. */
export function RecordJoints({ record }: { record: RecordView }) {
  const { opened, state } = record
  const zoom = usePanZoom()
  const press = drawnPress(opened.press, holeInUse(opened.legs[0]?.bedHole))
  const ranks = new Map(orderWalked(state.joints, 'before load').map(({ joint, rank }) => [joint, rank]))
  const joints = state.joints.map((joint) => ({
    id: joint.joint.id,
    number: joint.joint.number,
    name: joint.joint.name,
    place: joint.joint.place,
    state: jointMark(joint, occasionOf(joint)),
  }))
  const points = opened.points.map(({ letter, place }) => ({ letter, place }))
  return (
    <section aria-labelledby="joints-title" className="pt-6">
      <h2 id="joints-title" className="pb-2 text-20">
        Joints as walked down
      </h2>
      <div className="grid gap-x-8 gap-y-4 desktop:grid-cols-[minmax(0,28rem)_minmax(0,1fr)] print:block">
        <div className="ground-dye max-tablet:-mx-3 print:bg-[#fff]">
          <div className="flex items-center justify-between pl-4 print:hidden">
            <p className="font-condensed text-faint-scribe">dimensions in mm</p>
            <ZoomKeys zoom={zoom} />
          </div>
          <Fit className="h-[460px] tablet:h-[540px] print:hidden" initial={{ width: 440, height: 540 }}>
            {(size) => (
              <ZoomWindow zoom={zoom}>
                <JointDrawing press={press} joints={joints} points={points} size={size} />
              </ZoomWindow>
            )}
          </Fit>
          <PrintedElevation press={press} joints={joints} points={points} className="max-w-[15cm]" />
        </div>
        <ul className="border-b border-hairline">
          {state.joints.map((joint) => (
            <Found key={joint.joint.id} record={record} joint={joint} rank={ranks.get(joint)} />
          ))}
        </ul>
      </div>
    </section>
  )
}

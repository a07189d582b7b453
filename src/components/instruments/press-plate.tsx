import type { ReactNode } from 'react'
import { usePhone } from '../../lib/use-media'
import { Fit } from '../fit'
import { JointBalloon, type JointMarkState } from '../marks'
import { JointDrawing, type DrawnJoint, type DrawnPress } from './joint-drawing'

const LEGEND: readonly { state: JointMarkState; word: string }[] = [
  { state: 'open', word: 'open' },
  { state: 'tacked', word: 'tacked' },
  { state: 'finished', word: 'finished' },
  { state: 'accepted', word: 'accepted' },
  { state: 'rejected', word: 'rejected' },
]

/** What the outlines of balloons say. */
function Legend({ states }: { states: readonly JointMarkState[] }) {
  return (
    <ul className="flex flex-wrap items-center justify-between gap-x-3 gap-y-2 border-t border-ghost pt-4">
      {LEGEND.filter(({ state }) => states.includes(state)).map(({ state, word }) => (
        <li key={state} className="flex items-center gap-1.5">
          <JointBalloon state={state} tone="dye" size={22} decorative />
          <span className="font-condensed">{word}</span>
        </li>
      ))}
    </ul>
  )
}

type PressPlateProps = {
  press: DrawnPress | null
  joints: DrawnJoint[]
  points?: { letter: string; place: string }[]
  selectedId?: string | null
  markedIds?: readonly string[]
  onSelect?: (id: string) => void
  /** Outlines that can occur here. */
  states?: readonly JointMarkState[]
  /** In place of the drawing while there is none. */
  nothing?: ReactNode
  /** Under the drawing, over the legend. */
  children?: ReactNode
}

const ALL: readonly JointMarkState[] = LEGEND.map(({ state }) => state)

/** The press on its dye plate, as high as the window beside a page that scrolls. */
export function PressPlate({ press, joints, points, selectedId, markedIds, onSelect, states = ALL, nothing, children }: PressPlateProps) {
  const phone = usePhone()
  const title = press?.kind === 'c-frame' ? 'Side elevation' : 'Front elevation'
  return (
    <div className="flex flex-col gap-3 px-4 pt-4 pb-4 tablet:px-6 desktop:sticky desktop:top-0 desktop:h-[calc(100dvh-68px)] desktop:min-h-[560px] desktop:pt-5 desktop:pb-7">
      <div className="flex items-baseline justify-between gap-4">
        <h2 className="text-18">{title}</h2>
        <p className="font-condensed text-18 text-faint-scribe">dimensions in mm</p>
      </div>
      {press === null ? (
        <div className="flex min-h-40 grow items-center justify-center border border-dashed border-ghost px-6 text-center text-faint-scribe">{nothing}</div>
      ) : (
        <Fit className="h-[440px] tablet:h-[600px] desktop:h-auto desktop:min-h-0 desktop:grow" initial={{ width: phone ? 358 : 432, height: phone ? 440 : 560 }}>
          {(size) => <JointDrawing press={press} joints={joints} points={points} selectedId={selectedId} markedIds={markedIds} onSelect={onSelect} size={size} />}
        </Fit>
      )}
      {children}
      <Legend states={states} />
    </div>
  )
}

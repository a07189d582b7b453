import type { ReactNode } from 'react'
import type { DrawnPress, FramePart } from '#shared/drawing/frame'
import { usePhone } from '../../lib/use-media'
import { Fit } from '../fit'
import { JointBalloon, type JointMarkState } from '../marks'
import { JointDrawing, PrintedElevation, type DrawnJoint, type Placing } from './joint-drawing'
import { usePanZoom } from './use-pan-zoom'
import { ZoomKeys, ZoomWindow } from './zoom-window'

const LEGEND: readonly { state: JointMarkState; word: string }[] = [
  { state: 'open', word: 'open' },
  { state: 'tacked', word: 'tacked' },
  { state: 'finished', word: 'finished' },
  { state: 'accepted', word: 'accepted' },
  { state: 'rejected', word: 'rejected' },
]

/** What the outlines of balloons say. */
export function OutlineLegend({ states }: { states: readonly JointMarkState[] }) {
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
  /** Parts that hang on no joint. */
  loose?: ReadonlySet<FramePart>
  selectedId?: string | null
  markedIds?: readonly string[]
  onSelect?: (id: string) => void
  placing?: Placing | null
  /** Outlines that can occur here. */
  states?: readonly JointMarkState[]
  /** In place of the drawing while there is none. */
  nothing?: ReactNode
  /** False beside a form that nobody prints: it is drawn anew with every letter that is typed. */
  printed?: boolean
  /** Under the drawing, over the legend. */
  children?: ReactNode
}

export const ALL_STATES: readonly JointMarkState[] = LEGEND.map(({ state }) => state)

/** The press on its dye plate, as high as the window beside a page that scrolls; inked on white when the page is printed. */
export function PressPlate(props: PressPlateProps) {
  const {
    press,
    joints,
    points,
    loose,
    selectedId,
    markedIds,
    onSelect,
    placing,
    states = ALL_STATES,
    nothing,
    printed = true,
    children,
  } = props
  const phone = usePhone()
  const zoom = usePanZoom()
  const title = press?.kind === 'c-frame' ? 'Side elevation' : 'Front elevation'
  return (
    <div className="flex flex-col gap-3 px-4 pt-3 pb-4 tablet:px-6 desktop:sticky desktop:top-0 desktop:h-[calc(100dvh-68px)] desktop:min-h-[560px] desktop:pt-3 desktop:pb-7 print:h-auto! print:min-h-0! print:bg-[#fff] print:text-[#0b1733]">
      <div className="flex min-h-14 items-center justify-between gap-4">
        <div>
          <h2 className="text-18">{title}</h2>
          <p className="font-condensed text-16 text-faint-scribe print:text-[#364459]">dimensions in mm</p>
        </div>
        {press !== null && <ZoomKeys zoom={zoom} />}
      </div>
      {press === null ? (
        <div className="flex min-h-40 grow items-center justify-center border border-dashed border-ghost px-6 text-center text-faint-scribe">
          {nothing}
        </div>
      ) : (
        <>
          <Fit
            className="h-[440px] tablet:h-[600px] desktop:h-auto desktop:min-h-0 desktop:grow print:hidden"
            initial={{ width: phone ? 358 : 432, height: phone ? 440 : 560 }}
          >
            {(size) => (
              <ZoomWindow zoom={zoom}>
                <JointDrawing
                  press={press}
                  joints={joints}
                  points={points}
                  loose={loose}
                  selectedId={selectedId}
                  markedIds={markedIds}
                  onSelect={onSelect}
                  placing={placing}
                  size={size}
                />
              </ZoomWindow>
            )}
          </Fit>
          {printed && <PrintedElevation press={press} joints={joints} points={points} loose={loose} className="max-w-[15cm]" />}
        </>
      )}
      {children}
      <div className="print:hidden">
        <OutlineLegend states={states} />
      </div>
    </div>
  )
}

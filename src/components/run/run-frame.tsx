import { useSyncExternalStore } from 'react'
import type { ReactElement, ReactNode } from 'react'
import { Fit } from '../fit'
import type { Size } from '../fit'
import { StopPlate } from './stop-plate'

export type RunShape = 'landscape' | 'portrait' | 'phone'

const LANDSCAPE = '(min-width: 1000px) and (min-aspect-ratio: 1/1)'
const PHONE = '(max-width: 639px)'

function watch(onChange: () => void): () => void {
  if (typeof window.matchMedia !== 'function') return () => undefined
  const queries = [LANDSCAPE, PHONE].map((query) => window.matchMedia(query))
  queries.forEach((query) => query.addEventListener('change', onChange))
  return () => queries.forEach((query) => query.removeEventListener('change', onChange))
}

function shapeNow(): RunShape {
  if (typeof window.matchMedia !== 'function') return 'landscape'
  if (window.matchMedia(PHONE).matches) return 'phone'
  return window.matchMedia(LANDSCAPE).matches ? 'landscape' : 'portrait'
}

/** Which of the three layouts the window has room for. */
export function useRunShape(): RunShape {
  return useSyncExternalStore(watch, shapeNow, () => 'landscape')
}

interface RunFrameProps {
  title: ReactNode
  /** Drawn at the size it is given: upright beside the bench, lying down on a phone. */
  ladder: (size: Size, shape: RunShape) => ReactNode
  /** The chart, or on a walk-down what the outlines say; left out on a phone unless it is all there is. */
  line: (size: Size, shape: RunShape) => ReactNode
  /** Forms and tables, on steel. */
  bench: ReactNode
  /** Dye band over the bench: the hold, or the heading of the step. */
  over?: ReactNode
  /** The next action; in the bench's foot on a tablet lying down, beside Stop on one held upright. */
  action?: ReactNode
  /** Plates beside the next action. On a phone Pause keeps the bar and Note goes under the bench. */
  pause?: ReactNode
  note?: ReactNode
  /** Words in place of the two plates, for example the energy that is stored in the frame. */
  aside?: ReactNode
  stopped: { at: string } | null
  onStop: () => void
  connected?: boolean
  /** On a tablet held upright the picture takes the ladder's place too, and the greater part of the height. */
  largePicture?: boolean
}

function Landscape(props: RunFrameProps): ReactElement {
  return (
    <div className="grid min-h-0 flex-1 grid-cols-[224px_minmax(576px,1fr)_minmax(200px,340px)]">
      <div className="ground-dye flex min-h-0 flex-col border-r border-ghost">
        <Fit className="min-h-0 flex-1" initial={{ width: 223, height: 644 }}>
          {(size) => props.ladder(size, 'landscape')}
        </Fit>
        <div className="shrink-0 p-4 pr-[15px] pt-0">
          <StopPlate stopped={props.stopped} onStop={props.onStop} connected={props.connected} />
        </div>
      </div>
      <main className="ground-steel relative flex min-h-0 flex-col overflow-y-auto">
        {props.over}
        <div className="flex min-h-0 flex-1 flex-col px-4 pb-4 pt-[3px]">{props.bench}</div>
        {props.action !== undefined && <div className="shrink-0 px-4 pb-4">{props.action}</div>}
      </main>
      <div className="ground-dye flex min-h-0 flex-col border-l border-ghost">
        <Fit className="min-h-0 flex-1" initial={{ width: 339, height: 644 }}>
          {(size) => props.line(size, 'landscape')}
        </Fit>
        <div className="h-32 shrink-0 px-4 pb-4">{props.aside ?? <Plates {...props} />}</div>
      </div>
    </div>
  )
}

/** Note and Pause side by side, or the one there is. */
function Plates({ note, pause }: Pick<RunFrameProps, 'note' | 'pause'>): ReactElement {
  return (
    <div className="grid h-full auto-cols-fr grid-flow-col gap-3">
      {note}
      {pause}
    </div>
  )
}

function Portrait(props: RunFrameProps): ReactElement {
  return (
    <>
      {props.largePicture === true ? (
        <div className="ground-dye min-h-0 flex-[1_0_470px]">
          <Fit initial={{ width: 820, height: 540 }}>{(size) => props.line(size, 'portrait')}</Fit>
        </div>
      ) : (
        <div className="ground-dye grid min-h-0 flex-[1_1_330px] grid-cols-[224px_minmax(0,1fr)]">
          <Fit className="border-r border-ghost" initial={{ width: 223, height: 380 }}>
            {(size) => props.ladder(size, 'portrait')}
          </Fit>
          <Fit initial={{ width: 595, height: 380 }}>{(size) => props.line(size, 'portrait')}</Fit>
        </div>
      )}
      <main className="ground-steel relative min-h-[140px] shrink-[8] overflow-y-auto">
        {props.over}
        <div className="px-4 pb-4 pt-[3px]">{props.bench}</div>
        {props.aside !== undefined && <div className="ground-dye px-4 py-3">{props.aside}</div>}
      </main>
      <Bar {...props} />
    </>
  )
}

function Bar(props: RunFrameProps): ReactElement {
  const plates = props.note === undefined && props.pause === undefined ? undefined : <Plates {...props} />
  const both = props.action !== undefined && plates !== undefined
  return (
    <div
      className={`ground-dye grid h-36 shrink-0 items-center gap-3 px-4 ${both ? 'grid-cols-[192px_minmax(0,1fr)_minmax(200px,0.54fr)]' : 'grid-cols-[192px_minmax(0,1fr)]'}`}
    >
      <StopPlate stopped={props.stopped} onStop={props.onStop} connected={props.connected} />
      {props.action !== undefined && <div>{props.action}</div>}
      {plates !== undefined && <div className="h-28">{plates}</div>}
    </div>
  )
}

function Phone(props: RunFrameProps): ReactElement {
  return (
    <>
      <div className="ground-dye shrink-0">
        <Fit className="h-24 border-b border-ghost" initial={{ width: 390, height: 96 }}>
          {(size) => props.ladder(size, 'phone')}
        </Fit>
        {props.over}
      </div>
      <main className="ground-steel relative min-h-0 flex-1 overflow-y-auto">
        {/* At least as high as what is left of the screen: the bar below cuts no plate through. */}
        <div className="flex min-h-full flex-col">
          <div className="px-4 py-3">{props.bench}</div>
          {(props.note !== undefined || props.aside !== undefined) && (
            <div className="ground-dye mt-auto grid gap-3 px-4 py-3">
              {props.aside}
              {props.note}
            </div>
          )}
          {props.action !== undefined && <div className="ground-steel sticky bottom-0 px-4 py-3">{props.action}</div>}
        </div>
        <div className="ground-dye">
          <Fit className="h-[420px]" initial={{ width: 390, height: 420 }}>
            {(size) => props.line(size, 'phone')}
          </Fit>
        </div>
      </main>
      <div className="ground-dye grid shrink-0 grid-cols-[205fr_143fr] gap-[10px] px-4 py-[10px]">
        <StopPlate size="phone" stopped={props.stopped} onStop={props.onStop} connected={props.connected} />
        {props.pause}
      </div>
    </>
  )
}

/** The screen of a run. Stop keeps its corner in every layout and in every state: it is the rest that scrolls. */
export function RunFrame(props: RunFrameProps): ReactElement {
  const shape = useRunShape()
  return (
    <div className="ground-dye flex h-dvh flex-col overflow-hidden">
      {props.title}
      {shape === 'landscape' && <Landscape {...props} />}
      {shape === 'portrait' && <Portrait {...props} />}
      {shape === 'phone' && <Phone {...props} />}
    </div>
  )
}

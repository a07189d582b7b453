import type { ReactElement, ReactNode } from 'react'
import { StopPlate } from '../../../components/run/stop-plate'

interface AttendFrameProps {
  title: ReactNode
  over: ReactNode
  bench: ReactNode
  action: ReactNode | undefined
  pause: ReactNode
  stopped: { at: string } | null
  onStop: () => void
  connected: boolean
}

/** The witness's screen, made for a phone held in one hand: Stop and Pause stay under the thumb. */
export function AttendFrame({ title, over, bench, action, pause, stopped, onStop, connected }: AttendFrameProps): ReactElement {
  return (
    <div className="ground-dye flex h-dvh flex-col overflow-hidden">
      {title}
      <main className="ground-steel relative flex min-h-0 flex-1 flex-col overflow-y-auto">
        {over}
        <div className="mx-auto w-full max-w-[720px] px-4 py-3">{bench}</div>
        {action !== undefined && (
          <div className="ground-steel sticky bottom-0 mx-auto mt-auto w-full max-w-[720px] px-4 pt-1 pb-3">{action}</div>
        )}
      </main>
      <div className="ground-dye shrink-0 px-4 py-[10px]">
        <div className="mx-auto grid max-w-[720px] grid-cols-[205fr_143fr] gap-[10px]">
          <StopPlate size="phone" stopped={stopped} onStop={onStop} connected={connected} />
          {pause}
        </div>
      </div>
    </div>
  )
}

import type { ReactElement } from 'react'
import { Mark } from '../marks'

interface StopPlateProps {
  /** When it was called, as it is to be shown; null until then. */
  stopped: { at: string } | null
  onStop: () => void
  /** False when nobody would hear it: then the voice has to do. */
  connected?: boolean
  size?: 'tablet' | 'phone'
}

/** Stop: always there, always in the same corner, never asks back. */
export function StopPlate({ stopped, onStop, connected = true, size = 'tablet' }: StopPlateProps): ReactElement {
  const tablet = size === 'tablet'
  const box = `flex w-full select-none items-center justify-center rounded-key ${tablet ? 'h-28 max-w-[192px]' : 'h-[76px]'}`
  if (stopped !== null) {
    return (
      <div role="status" className={`${box} gap-[14px] border-2 border-stop-line bg-deep-dye text-scribe`}>
        <Mark name="stop" tone="dye" size={tablet ? 46 : 34} />
        <span>
          <span className={`block font-semibold ${tablet ? 'text-22 leading-[26px]' : 'text-20 leading-[24px]'}`}>Stopped</span>
          <span className="block text-16 leading-[20px]">at {stopped.at}</span>
        </span>
      </div>
    )
  }
  if (!connected) {
    return (
      <button
        type="button"
        onClick={onStop}
        className={`${box} touch-manipulation flex-col border-2 border-dashed border-scribe bg-stop text-on-stop`}
      >
        <span className="text-22 font-bold leading-[28px]">Shout stop</span>
        <span className="font-condensed text-16 leading-[20px]">this button is not heard</span>
      </button>
    )
  }
  return (
    <button type="button" onClick={onStop} className={`${box} touch-manipulation gap-[14px] border-2 border-scribe bg-stop text-on-stop`}>
      <Mark name="stop" tone="plate" size={tablet ? 46 : 34} />
      <span className={`font-bold ${tablet ? 'text-34' : 'text-26'}`}>Stop</span>
    </button>
  )
}

import type { ReactElement } from 'react'
import { setPercent } from '../typeset'

interface PlateProps {
  title: string
  note?: string
  onPress: () => void
}

/** The one chalk action of a screen. Its title says what is then true. */
export function ActionPlate({ title, note, onPress, focusHint = false }: PlateProps & { focusHint?: boolean }): ReactElement {
  return (
    <button
      type="button"
      onClick={onPress}
      className={`flex min-h-14 w-full touch-manipulation flex-col items-center justify-center rounded-key border-2 border-on-chalk bg-chalk px-4 py-2 text-center text-on-chalk tablet:min-h-28 ${focusHint ? 'focus-ring' : ''}`}
    >
      <span className="text-20 font-semibold tablet:text-26 tablet:leading-[32px]">{setPercent(title)}</span>
      {note !== undefined && <span className="text-16 font-medium tablet:text-18 tablet:leading-[24px]">{note}</span>}
    </button>
  )
}

/** Something one may do at any time beside the next action: Note, Pause. Where it has the whole width, in one line. */
export function QuietPlate({ title, note, onPress }: PlateProps): ReactElement {
  return (
    <div className="@container h-full">
      <button
        type="button"
        onClick={onPress}
        className="flex h-full min-h-[76px] w-full touch-manipulation flex-col items-center justify-center rounded-key border-2 border-faint-scribe bg-transparent px-1 text-center text-scribe tablet:min-h-28 @min-[330px]:min-h-14 @min-[330px]:flex-row @min-[330px]:gap-3"
      >
        <span className="text-20 font-medium leading-[24px] tablet:text-22 tablet:leading-[28px]">{setPercent(title)}</span>
        {note !== undefined && (
          <span className="max-w-[132px] text-balance text-16 leading-[20px] text-faint-scribe @min-[330px]:max-w-none">{note}</span>
        )}
      </button>
    </div>
  )
}

/** A step that can't be taken yet, with what shuts it. It is no button. */
export function ShutPlate({ title, note }: { title: string; note: string }): ReactElement {
  return (
    <div className="flex min-h-[76px] w-full flex-col items-center justify-center rounded-key border-2 border-dashed border-faint-scribe px-2 text-center text-scribe tablet:min-h-28">
      <span className="text-20 leading-[24px]">{setPercent(title)}</span>
      <span className="text-16 leading-[21px] text-faint-scribe">{note}</span>
    </div>
  )
}

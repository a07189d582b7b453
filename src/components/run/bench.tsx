import type { ReactElement, ReactNode } from 'react'
import { useRunShape } from './run-frame'

interface BenchProps {
  row: ReactNode
  dial: ReactNode
  figure: ReactNode
  keypad: ReactNode
}

/** The reading bench: the row on top; dial, load and keys under it as the tablet is held. */
export function Bench({ row, dial, figure, keypad }: BenchProps): ReactElement {
  const shape = useRunShape()
  if (shape === 'phone') {
    return (
      <div className="grid gap-3">
        {row}
        {figure}
        {keypad}
        <div className="flex justify-center bg-dye">{dial}</div>
      </div>
    )
  }
  if (shape === 'portrait') {
    return (
      <div className="grid gap-[14px]">
        {row}
        <div className="grid grid-cols-[288px_minmax(0,1fr)] gap-4">
          <div className="grid content-start gap-3">
            {dial}
            {figure}
          </div>
          {keypad}
        </div>
      </div>
    )
  }
  return (
    <div className="flex min-h-0 flex-1 flex-col">
      {row}
      <div className="mt-[14px] grid shrink-0 grid-cols-[288px_minmax(0,1fr)] gap-[18px]">
        {dial}
        {figure}
      </div>
      <div className="mt-[10px] min-h-[292px] flex-1">{keypad}</div>
    </div>
  )
}

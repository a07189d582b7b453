import type { ReactNode } from 'react'
import { classNames } from '../lib/class-names'

function Numbers({ count }: { count: number }) {
  return (
    <div aria-hidden="true" className="hidden h-6 divide-x divide-ghost px-6 desktop:flex">
      {Array.from({ length: count }, (_, index) => (
        <span key={index} className="flex grow basis-0 items-center justify-center">
          {index + 1}
        </span>
      ))}
    </div>
  )
}

function Letters({ count }: { count: number }) {
  return (
    <div aria-hidden="true" className="hidden w-6 flex-col divide-y divide-ghost desktop:flex">
      {Array.from({ length: count }, (_, index) => (
        <span key={index} className="flex grow basis-0 items-center justify-center">
          {String.fromCharCode(65 + index)}
        </span>
      ))}
    </div>
  )
}

type ZonedSheetProps = { columns: number; rows: number; children: ReactNode; className?: string }

/** A drawing sheet on dye: border zones numbered along and lettered down, where there is room for a border. */
export function ZonedSheet({ columns, rows, children, className }: ZonedSheetProps) {
  return (
    <div className={classNames('ground-dye flex flex-col font-condensed text-faint-scribe', className)}>
      <div className="flex grow flex-col border-ghost desktop:border">
        <Numbers count={columns} />
        <div className="flex grow">
          <Letters count={rows} />
          <div className="flex min-w-0 grow flex-col border-scribe font-sans text-scribe desktop:border-2">{children}</div>
          <Letters count={rows} />
        </div>
        <Numbers count={columns} />
      </div>
    </div>
  )
}

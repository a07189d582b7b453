import type { ReactNode } from 'react'
import { classNames } from '../lib/class-names'

type NothingHereProps = {
  /** What is so: "No press is entered yet." */
  what: ReactNode
  /** What it means, or what to do next. */
  next?: ReactNode
  /** The next step itself. */
  action?: ReactNode
  onDye?: boolean
  className?: string
}

/** An empty list says that it is empty, and what to do next. */
export function NothingHere({ what, next, action, onDye = false, className }: NothingHereProps) {
  return (
    <div
      className={classNames(
        'flex flex-wrap items-center justify-between gap-4 border-y border-dashed py-5',
        onDye ? 'border-faint-scribe' : 'border-rule',
        className,
      )}
    >
      <div className="min-w-0">
        <p className="text-18 font-semibold">{what}</p>
        {next !== undefined && <p className={onDye ? 'text-faint-scribe' : 'text-graphite'}>{next}</p>}
      </div>
      {action}
    </div>
  )
}

import type { ReactNode } from 'react'

/** A long form on one page, as the list of its steps. */
export function FormSteps({ children }: { children: ReactNode }) {
  return <ol>{children}</ol>
}

type FormStepProps = {
  number: number
  title: ReactNode
  note?: ReactNode
  /** At the right of the heading: what this step comes to so far. */
  aside?: ReactNode
  children: ReactNode
}

/** One step: its number and heading over its fields, two to a row from the tablet on. */
export function FormStep({ number, title, note, aside, children }: FormStepProps) {
  return (
    <li className="border-t-2 border-ink pt-4 pb-7">
      <div className="mb-4 flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1">
        <h2 className="flex items-baseline gap-3 text-20 tablet:text-22">
          <span aria-hidden="true" className="w-6 shrink-0 text-graphite">
            {number}
          </span>
          {title}
        </h2>
        {aside !== undefined && <p className="font-medium">{aside}</p>}
        {note !== undefined && <p className="basis-full pl-9 text-graphite max-tablet:pl-0">{note}</p>}
      </div>
      <div className="grid grid-cols-1 items-start gap-4 tablet:grid-cols-2 tablet:pl-9">{children}</div>
    </li>
  )
}

/** Takes a whole row of a step. */
export function WholeRow({ children, className }: { children: ReactNode; className?: string }) {
  return <div className={className === undefined ? 'min-w-0 tablet:col-span-2' : `min-w-0 tablet:col-span-2 ${className}`}>{children}</div>
}

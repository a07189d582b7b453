import type { ReactNode } from 'react'
import { classNames } from '../lib/class-names'

type Tone = 'dye' | 'sheet'

/** Between zones lies a rule; on paper the border comes in sooner, because a record has nothing to spare it for. */
const LINES: Record<Tone, { across: string; down: string; outer: string; inner: string; type: string }> = {
  dye: {
    across: 'divide-ghost desktop:flex',
    down: 'divide-ghost desktop:flex',
    outer: 'border-ghost desktop:border',
    inner: 'border-scribe text-scribe desktop:border-2',
    type: 'ground-dye text-faint-scribe',
  },
  sheet: {
    across: 'divide-rule tablet:flex',
    down: 'divide-rule tablet:flex',
    outer: 'border-rule tablet:border',
    inner: 'border-ink text-ink border-2',
    type: 'ground-sheet text-ink',
  },
}

function Numbers({ count, tone }: { count: number; tone: Tone }) {
  return (
    <div aria-hidden="true" className={classNames('hidden h-6 divide-x px-6 text-14', LINES[tone].across)}>
      {Array.from({ length: count }, (_, index) => (
        <span key={index} className="flex grow basis-0 items-center justify-center">
          {index + 1}
        </span>
      ))}
    </div>
  )
}

function Letters({ count, tone }: { count: number; tone: Tone }) {
  return (
    <div aria-hidden="true" className={classNames('hidden w-6 shrink-0 flex-col divide-y text-14', LINES[tone].down)}>
      {Array.from({ length: count }, (_, index) => (
        <span key={index} className="flex grow basis-0 items-center justify-center">
          {String.fromCharCode(65 + index)}
        </span>
      ))}
    </div>
  )
}

type ZonedSheetProps = { columns?: number; rows?: number; tone?: Tone; children: ReactNode; className?: string }

/** A drawing sheet: border zones numbered along and lettered down, where there is room for a border. */
export function ZonedSheet({ columns = 8, rows = 8, tone = 'dye', children, className }: ZonedSheetProps) {
  const lines = LINES[tone]
  return (
    <div className={classNames('flex flex-col font-condensed', lines.type, className)}>
      <div className={classNames('flex grow flex-col', lines.outer)}>
        <Numbers count={columns} tone={tone} />
        <div className="flex grow">
          <Letters count={rows} tone={tone} />
          <div className={classNames('flex min-w-0 grow flex-col font-sans', lines.inner)}>{children}</div>
          <Letters count={rows} tone={tone} />
        </div>
        <Numbers count={columns} tone={tone} />
      </div>
    </div>
  )
}

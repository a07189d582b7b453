import type { ReactElement, ReactNode } from 'react'

const COLUMNS = ['1', '2', '3', '4', '5', '6', '7', '8']
const ROWS = ['A', 'B', 'C', 'D', 'E', 'F', 'G', 'H']

interface ZonedSheetProps {
  children: ReactNode
  /** Deep blue for the sign-in sheet, else paper. */
  tone?: 'sheet' | 'dye'
  /** Rows of the border; eight on a long record, four on one screen. */
  rows?: 4 | 8
  className?: string
}

function Across({ line, type }: { line: string; type: string }): ReactElement {
  return (
    <div className={`hidden h-6 grid-cols-8 px-6 tablet:grid ${type}`}>
      {COLUMNS.map((name, index) => (
        <span key={name} className={`flex items-center justify-center ${index === 0 ? '' : `border-l ${line}`}`}>
          {name}
        </span>
      ))}
    </div>
  )
}

function Down({ line, type, rows }: { line: string; type: string; rows: string[] }): ReactElement {
  return (
    <div className={`hidden w-6 shrink-0 auto-rows-fr tablet:grid ${type}`}>
      {rows.map((name, index) => (
        <span key={name} className={`flex items-center justify-center ${index === 0 ? '' : `border-t ${line}`}`}>
          {name}
        </span>
      ))}
    </div>
  )
}

/** A drawing sheet with its zoned border, for records: a place on it can be named over the telephone. */
export function ZonedSheet({ children, tone = 'sheet', rows = 8, className = '' }: ZonedSheetProps): ReactElement {
  const dye = tone === 'dye'
  const line = dye ? 'border-ghost' : 'border-rule'
  const type = `font-condensed text-14 leading-none ${dye ? 'text-faint-scribe' : 'text-ink'}`
  const letters = ROWS.slice(0, rows)
  return (
    <div className={`p-2 tablet:p-5 ${dye ? 'ground-dye' : 'ground-sheet'} ${className}`}>
      <div className={`tablet:border ${line}`}>
        <div aria-hidden>
          <Across line={line} type={type} />
        </div>
        <div className="flex">
          <div aria-hidden className="flex">
            <Down line={line} type={type} rows={letters} />
          </div>
          <div className={`min-w-0 flex-1 border-2 ${dye ? 'border-scribe' : 'border-ink'}`}>{children}</div>
          <div aria-hidden className="flex">
            <Down line={line} type={type} rows={letters} />
          </div>
        </div>
        <div aria-hidden>
          <Across line={line} type={type} />
        </div>
      </div>
    </div>
  )
}

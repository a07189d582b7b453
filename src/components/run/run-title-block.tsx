import type { ReactElement } from 'react'
import { ProductMark } from '../marks'

export interface TitleCell {
  /** Stands faint before the value: "Lead", "Witness". Only said, not shown, where there is no room for it. */
  label?: string
  value: string
  /** Faint words after the value. */
  note?: string
  strong?: boolean
  /** The smallest screen that has room for it; a phone unless said otherwise. */
  from?: 'phone' | 'tablet' | 'desktop'
}

/** How far every entry of this test has come. */
export interface KeptState {
  tablet: boolean
  server: boolean
  sealed: boolean
}

const FROM = { phone: 'flex', tablet: 'hidden tablet:flex', desktop: 'hidden desktop:flex' }

interface RunTitleBlockProps {
  cells: TitleCell[]
  kept?: KeptState
  /** Entries that wait for the server. */
  waiting?: number
}

function Lamp({ on, word, title }: { on: boolean; word: string; title: string }): ReactElement {
  return (
    <span className="flex items-center gap-[7px] desktop:gap-[9px]" title={title}>
      <svg aria-hidden viewBox="0 0 14 14" width={14} height={14}>
        <circle cx={7} cy={7} r={5.4} fill={on ? 'var(--scribe)' : 'none'} stroke="var(--scribe)" strokeWidth={1.6} />
      </svg>
      {word}
      <span className="sr-only">{on ? ': yes' : ': not yet'}</span>
    </span>
  )
}

/** The title block over a run: which press, which test, who, and how far the entries have been kept. */
export function RunTitleBlock({ cells, kept, waiting = 0 }: RunTitleBlockProps): ReactElement {
  return (
    <header className="ground-deep-dye flex h-11 shrink-0 items-stretch border-b border-ghost tablet:h-12">
      <span className="flex w-[50px] shrink-0 items-center justify-center border-r border-ghost tablet:w-[59px]">
        <ProductMark size={30} label="Quarterload" />
      </span>
      <dl className="flex min-w-0 flex-1 items-stretch">
        {cells.map((cell) => (
          <div
            key={`${cell.label ?? ''}${cell.value}`}
            className={`min-w-0 items-center gap-2 border-r border-ghost px-3 text-16/5 last:border-r-0 tablet:last:border-r desktop:px-4 ${FROM[cell.from ?? 'phone']}`}
          >
            <dt className={cell.label === undefined ? 'sr-only' : 'text-faint-scribe max-[799px]:sr-only'}>{cell.label ?? 'Test'}</dt>
            {/* A name that is longer than its cell takes a second line: none is cut. */}
            <dd className="line-clamp-2">
              <span className={cell.strong === true ? 'font-semibold' : ''}>{cell.value}</span>
              {cell.note !== undefined && <span className="ml-2 text-faint-scribe">{cell.note}</span>}
            </dd>
          </div>
        ))}
      </dl>
      {kept !== undefined && (
        <p className="hidden shrink-0 items-center gap-[7px] whitespace-nowrap px-3 text-16 tablet:flex desktop:gap-[9px] desktop:px-4">
          <Lamp on={kept.tablet} word="tablet" title="Kept on this tablet" />
          <Lamp on={kept.server} word={waiting > 0 ? `server, ${waiting} to send` : 'server'} title="Kept on the server" />
          <Lamp on={kept.sealed} word="sealed" title="Under a seal" />
        </p>
      )}
    </header>
  )
}

import { useEffect, useId, useRef, useState, type ReactNode } from 'react'
import { classNames } from '../lib/class-names'
import { longDate } from '../lib/dates'
import { ChevronDown } from './glyphs'
import type { Choice } from './select-field'

/** Ruled cells in one row that narrow a list; two to a row on the phone, the search over both. The last row fills. */
export function FilterBar({ label, children }: { label: string; children: ReactNode }) {
  return (
    <div role="search" aria-label={label} className="mb-5 flex flex-wrap pt-px pl-px desktop:flex-nowrap">
      {children}
    </div>
  )
}

type CellProps = { id: string; label: string; active: boolean; wide?: boolean; children: ReactNode }

function Cell({ id, label, active, wide = false, children }: CellProps) {
  return (
    <div
      className={classNames(
        'group relative -mt-px -ml-px h-14 min-w-0 grow border border-rule has-focus-visible:z-10 has-focus-visible:outline-3 has-focus-visible:outline-offset-2 has-focus-visible:outline-[var(--focus)]',
        active ? 'bg-field' : 'bg-sheet hover:bg-field',
        wide ? 'basis-full tablet:basis-1/3 desktop:grow-[1.6]' : 'basis-[40%] tablet:basis-1/4',
        'first:rounded-l-field last:rounded-r-field desktop:basis-0',
      )}
    >
      <label htmlFor={id} className="pointer-events-none absolute top-1.5 left-3.5 font-condensed text-14 font-medium text-graphite">
        {label}
      </label>
      {children}
      {active && <span aria-hidden="true" className="absolute inset-x-0 bottom-0 h-[3px] bg-ink" />}
    </div>
  )
}

const inside = 'absolute inset-0 size-full rounded-field bg-transparent px-3.5 pt-5 text-16 outline-none'

type FilterSearchProps = {
  label?: string
  value: string
  onChange: (text: string) => void
  placeholder: string
}

/** Text to look for. It asks when typing pauses, or at Enter. */
export function FilterSearch({ label = 'Search', value, onChange, placeholder }: FilterSearchProps) {
  const id = useId()
  const [text, setText] = useState(value)
  const [seen, setSeen] = useState(value)
  if (seen !== value) {
    // The address changed elsewhere (back, a link): follow it.
    setSeen(value)
    setText(value)
  }
  const ask = useRef(onChange)
  useEffect(() => {
    ask.current = onChange
  })
  useEffect(() => {
    if (text === value) return
    const timer = setTimeout(() => ask.current(text.trim()), 350)
    return () => clearTimeout(timer)
  }, [text, value])
  return (
    <Cell id={id} label={label} active={value !== ''} wide>
      <input
        id={id}
        type="search"
        value={text}
        placeholder={placeholder}
        onChange={(event) => setText(event.target.value)}
        onKeyDown={(event) => {
          if (event.key === 'Enter') ask.current(text.trim())
        }}
        className={classNames(inside, value !== '' && 'font-semibold')}
      />
    </Cell>
  )
}

type FilterSelectProps = {
  label: string
  value: string
  onChange: (value: string) => void
  choices: readonly Choice[]
  /** What it says while it doesn't narrow: "All presses". */
  all: string
  /** Takes a whole row on the phone. */
  wide?: boolean
}

/** One of a list, or all. */
export function FilterSelect({ label, value, onChange, choices, all, wide }: FilterSelectProps) {
  const id = useId()
  return (
    <Cell id={id} label={label} active={value !== ''} wide={wide}>
      <select
        id={id}
        value={value}
        onChange={(event) => onChange(event.target.value)}
        className={classNames(inside, 'appearance-none truncate pr-9', value !== '' && 'font-semibold')}
      >
        <option value="">{all}</option>
        {choices.map((choice) => (
          <option key={choice.value} value={choice.value} disabled={choice.disabled}>
            {choice.label}
          </option>
        ))}
      </select>
      <span className="pointer-events-none absolute right-3 bottom-3">
        <ChevronDown />
      </span>
    </Cell>
  )
}

type FilterDateProps = {
  label: string
  value: string
  onChange: (date: string) => void
  /** What it says while it doesn't narrow: "Any day", "Today". */
  any: string
  min?: string
  max?: string
}

/** A day from which, or up to which, the list runs. It reads as we write dates; the browser's own control opens on it. */
export function FilterDate({ label, value, onChange, any, min, max }: FilterDateProps) {
  const id = useId()
  const input = useRef<HTMLInputElement>(null)
  return (
    <Cell id={id} label={label} active={value !== ''}>
      <input
        ref={input}
        id={id}
        type="date"
        value={value}
        min={min}
        max={max}
        onChange={(event) => onChange(event.target.value)}
        onClick={() => input.current?.showPicker?.()}
        className={classNames(inside, 'peer opacity-0 focus:opacity-100', value !== '' && 'font-semibold')}
      />
      <span
        aria-hidden="true"
        className="pointer-events-none absolute inset-0 flex items-center justify-between px-3.5 pt-5 peer-focus:hidden"
      >
        <span className={classNames('truncate', value !== '' && 'font-semibold')}>{value === '' ? any : longDate(value)}</span>
      </span>
      <span className="pointer-events-none absolute right-3 bottom-3 peer-focus:hidden">
        <ChevronDown />
      </span>
    </Cell>
  )
}

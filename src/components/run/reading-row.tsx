import { useEffect, useId, useRef } from 'react'
import type { CSSProperties, KeyboardEvent, ReactElement } from 'react'

export interface ReadingField {
  id: string
  label: string
  unit: string
  /** Exactly what was typed. */
  text: string
  /** A sentence that says what is wrong and what to do. */
  error?: string
}

interface ReadingRowProps {
  /** The moment the row belongs to, as it is to be shown; null before it was marked. */
  mark: string | null
  onMark: () => void
  fields: ReadingField[]
  focusedId: string | null
  onFocus: (id: string) => void
  onChange: (id: string, text: string) => void
  /** Enter in a field: commits it; `last` when no field comes after. Focus then moves on by itself, unless this says false. */
  onCommit?: (id: string, last: boolean) => boolean | void
  /** Shows under "Mark" before the moment was marked. */
  markNote?: string
  /** Too early to mark: the plate stays there and says so in its note. */
  markShut?: boolean
  /** True for a finger: the system's keyboard stays away and the program's own keys are used. */
  ownKeys?: boolean
}

/** True where the main pointer is a finger. */
export function hasCoarsePointer(): boolean {
  return typeof window !== 'undefined' && typeof window.matchMedia === 'function' && window.matchMedia('(pointer: coarse)').matches
}

/** A centre punch: what marks a place, or a moment. */
function PunchMark(): ReactElement {
  return (
    <svg aria-hidden viewBox="0 0 16 24" width={16} height={24} className="shrink-0">
      <path d="M0 1H16L9 10V23H7V10Z" fill="currentColor" />
    </svg>
  )
}

interface MarkPlateProps {
  mark: string | null
  onMark: () => void
  note: string | undefined
  shut: boolean
}

function MarkPlate({ mark, onMark, note, shut }: MarkPlateProps): ReactElement {
  if (mark === null) {
    return (
      <button
        type="button"
        aria-disabled={shut}
        onClick={shut ? undefined : onMark}
        className={`flex h-16 w-full items-center gap-3 rounded-field border-2 px-[10px] text-left ${shut ? 'border-dashed border-rule text-graphite' : 'border-on-chalk bg-chalk text-on-chalk'}`}
      >
        <PunchMark />
        <span>
          <span className="block text-20 font-semibold leading-[22px]">Mark</span>
          {note !== undefined && <span className="block font-condensed text-16 leading-[18px]">{note}</span>}
        </span>
      </button>
    )
  }
  return (
    <div className="flex h-16 items-center gap-3 rounded-field bg-ink px-[10px] text-sheet" data-marked>
      <PunchMark />
      <span>
        <span className="block text-16 leading-[20px]">Marked</span>
        <span className="block text-20 font-semibold leading-[23px]">{mark}</span>
      </span>
    </div>
  )
}

/** Long readings and narrow fields take smaller figures: none may be cut off. */
function typeSize(text: string): string {
  if (text.length > 5) return 'text-22'
  return text.length > 3 ? 'text-34 min-[1000px]:max-[1140px]:text-26' : 'text-34'
}

/** A long name takes two narrow lines: neither it nor its unit may be cut off. */
function isLong({ label, unit }: ReadingField): boolean {
  return label.length + unit.length > 11
}

function labelFit(field: ReadingField): string {
  return isLong(field) ? 'font-condensed leading-[17px]' : 'leading-[24px] whitespace-nowrap'
}

interface FieldProps {
  field: ReadingField
  focused: boolean
  ownKeys: boolean
  describedBy: string
  bind: (element: HTMLInputElement | null) => void
  onFocus: () => void
  onChange: (text: string) => void
  onEnter: () => void
}

function Field(props: FieldProps): ReactElement {
  const { field, focused } = props
  const id = useId()
  const edge = field.error !== undefined ? 'border-2 border-stop-ink' : focused ? 'border-2 border-ink' : 'border border-rule'
  return (
    <div className="min-w-0">
      <label htmlFor={id} className={`mb-[5px] block text-16 ${labelFit(field)}`}>
        <span className="font-medium text-ink">{field.label}</span>{' '}
        <span className={`text-graphite ${isLong(field) ? '' : 'ml-2'}`}>{field.unit}</span>
      </label>
      <input
        ref={props.bind}
        id={id}
        type="text"
        inputMode={props.ownKeys ? 'none' : 'decimal'}
        autoComplete="off"
        enterKeyHint="next"
        spellCheck={false}
        value={field.text}
        aria-invalid={field.error !== undefined}
        aria-describedby={field.error === undefined ? undefined : props.describedBy}
        onFocus={props.onFocus}
        onChange={(event) => props.onChange(event.target.value)}
        onKeyDown={(event: KeyboardEvent) => {
          if (event.key !== 'Enter' || event.nativeEvent.isComposing) return
          event.preventDefault()
          props.onEnter()
        }}
        className={`block h-16 w-full rounded-field bg-field px-[10px] font-medium ${typeSize(field.text)} text-ink caret-ink ${edge} ${focused ? 'focus-ring' : ''}`}
      />
    </div>
  )
}

/** Mark, then one row of readings as they are read. Nothing is filled in beforehand; all stays open until the row is entered. */
export function ReadingRow(props: ReadingRowProps): ReactElement {
  const { fields, focusedId, ownKeys = hasCoarsePointer() } = props
  const inputs = useRef(new Map<string, HTMLInputElement>())
  const errorId = useId()
  useEffect(() => {
    if (focusedId === null) return
    const wanted = inputs.current.get(focusedId)
    if (wanted !== undefined && wanted !== document.activeElement) wanted.focus()
  }, [focusedId])
  const wrong = fields.filter((field) => field.error !== undefined)
  const enter = (index: number): void => {
    const field = fields[index]
    if (field === undefined) return
    const next = fields[index + 1]
    const taken = props.onCommit?.(field.id, next === undefined)
    if (next !== undefined && taken !== false) inputs.current.get(next.id)?.focus()
  }
  const columns = { '--columns': Math.min(fields.length, 4) } as CSSProperties
  return (
    <div>
      <div className="flex flex-wrap items-end gap-2 tablet:flex-nowrap">
        <div className="w-full shrink-0 tablet:w-[132px]">
          <p className="mb-[5px] hidden text-16 font-medium leading-[24px] tablet:block">This row</p>
          <MarkPlate mark={props.mark} onMark={props.onMark} note={props.markNote} shut={props.markShut ?? false} />
        </div>
        <div
          className="grid min-w-0 flex-1 grid-cols-2 items-end gap-2 tablet:grid-cols-[repeat(var(--columns),minmax(0,1fr))]"
          style={columns}
        >
          {fields.map((field, index) => (
            <Field
              key={field.id}
              field={field}
              focused={field.id === focusedId}
              ownKeys={ownKeys}
              describedBy={`${errorId}-${field.id}`}
              bind={(element) => {
                if (element === null) inputs.current.delete(field.id)
                else inputs.current.set(field.id, element)
              }}
              onFocus={() => props.onFocus(field.id)}
              onChange={(text) => props.onChange(field.id, text)}
              onEnter={() => enter(index)}
            />
          ))}
        </div>
      </div>
      <div aria-live="polite">
        {wrong.map((field) => (
          <p key={field.id} id={`${errorId}-${field.id}`} className="mt-2 text-16 font-medium text-stop-ink">
            {field.label}: {field.error}
          </p>
        ))}
      </div>
    </div>
  )
}

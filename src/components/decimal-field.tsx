import { useId, useState, type FocusEventHandler, type KeyboardEventHandler, type Ref } from 'react'
import { groupDigits, parseDecimal, unitLabel, type Typed, type Unit } from '#shared/units'
import { FieldFrame, describedBy, inputBox, type FieldWords } from './field'
import { Select } from './select-field'

type DecimalProps = FieldWords & {
  /** The text as typed. It is never rewritten. */
  value: string
  onChange: (text: string) => void
  onBlur?: FocusEventHandler<HTMLElement>
  onKeyDown?: KeyboardEventHandler<HTMLInputElement>
  name?: string
  id?: string
  ref?: Ref<HTMLInputElement>
  /** Takes a minus sign. */
  signed?: boolean
  disabled?: boolean
  /** What the echo says after the number: a unit in words, "%", "s". */
  unit?: string
  placeholder?: string
  autoFocus?: boolean
}

type Understood = { number: string | undefined; one: boolean; message: string | undefined }

const NOTHING: Understood = { number: undefined, one: false, message: undefined }

/** "12," may become "12,5" with the next key: no word about it while the cursor is still there. */
const UNFINISHED = /^\s*[-\u2212]?\d*[.,]?$/

/** What the program makes of the text so far, and whether someone is still typing it. */
function useUnderstood(text: string, signed: boolean): Understood & { typing: (now: boolean) => void } {
  const [typed, typing] = useState(false)
  if (text.trim() === '') return { ...NOTHING, typing }
  const parsed = parseDecimal(text, { signed })
  if (parsed.ok) return { number: groupDigits(parsed.canonical), one: parsed.value === 1, message: undefined, typing }
  return { ...NOTHING, message: typed && UNFINISHED.test(text) ? undefined : parsed.message, typing }
}

function Echo({ id, number, unit }: { id: string; number: string | undefined; unit: string }) {
  return (
    <p id={`${id}-echo`} className="mt-1 min-h-6 text-graphite" aria-live="polite">
      {number !== undefined && (
        <>
          read as <span className="font-medium text-ink">{number}</span> {unit}
        </>
      )}
    </p>
  )
}

/**
 * A number as text: comma or point as the decimal sign, nothing coerced. What the program understood is
 * written beneath; what it can't read stays as typed, with the reason.
 */
export function DecimalField({
  label,
  hint,
  message,
  optional,
  className,
  value,
  onChange,
  onBlur,
  signed = false,
  unit = '',
  id: given,
  ...input
}: DecimalProps) {
  const made = useId()
  const id = given ?? made
  const understood = useUnderstood(value, signed)
  const said = understood.message ?? message
  return (
    <FieldFrame
      {...{ id, label, hint, optional, className }}
      message={said}
      echo={said ? undefined : <Echo id={id} number={understood.number} unit={unit} />}
    >
      <input
        {...input}
        id={id}
        type="text"
        inputMode="decimal"
        autoComplete="off"
        value={value}
        onFocus={() => understood.typing(true)}
        onBlur={(event) => {
          understood.typing(false)
          onBlur?.(event)
        }}
        onChange={(event) => onChange(event.target.value)}
        aria-invalid={Boolean(said) || undefined}
        aria-describedby={describedBy(id, { hint, message: said }, !said)}
        className={inputBox(Boolean(said), 'font-medium')}
      />
    </FieldFrame>
  )
}

type QuantityProps<U extends Unit> = Omit<DecimalProps, 'value' | 'onChange' | 'unit'> & {
  value: Typed<NoInfer<U>> | { text: string; unit: NoInfer<U> | '' }
  onChange: (typed: { text: string; unit: NoInfer<U> }) => void
  /** The units it can be given in, in the order of the list. */
  units: readonly U[]
  /** Makes the unit itself a question ("which ton?") while none is chosen. */
  askUnit?: string
}

/** A number with its unit. The unit is chosen beside it and both are kept as given. */
export function QuantityField<U extends Unit>({
  label,
  hint,
  message,
  optional,
  className,
  value,
  onChange,
  units,
  askUnit,
  signed = false,
  id: given,
  name,
  disabled,
  onBlur,
  ...input
}: QuantityProps<U>) {
  const made = useId()
  const id = given ?? made
  const understood = useUnderstood(value.text, signed)
  const said = understood.message ?? message
  const unitName = value.unit === '' ? '' : unitLabel(value.unit, { plural: !understood.one })
  const describes = describedBy(id, { hint, message: said }, !said)
  const only = units.length === 1 ? units[0] : undefined
  const unit = (value.unit === '' ? (only ?? '') : value.unit) as U
  return (
    <FieldFrame
      {...{ id, label, hint, optional, className }}
      message={said}
      echo={said ? undefined : <Echo id={id} number={understood.number} unit={unitName} />}
    >
      <div className="flex">
        <input
          {...input}
          id={id}
          name={name && `${name}.text`}
          type="text"
          inputMode="decimal"
          autoComplete="off"
          disabled={disabled}
          value={value.text}
          onFocus={() => understood.typing(true)}
          onBlur={(event) => {
            understood.typing(false)
            onBlur?.(event)
          }}
          onChange={(event) => onChange({ text: event.target.value, unit })}
          aria-invalid={Boolean(said) || undefined}
          aria-describedby={describes}
          className={inputBox(Boolean(said), 'rounded-r-none font-medium focus-visible:z-10')}
        />
        {only ? (
          <span className="flex shrink-0 items-center rounded-r-field border-2 border-l-0 border-rule px-3 text-graphite">
            {unitLabel(only, { plural: true })}
          </span>
        ) : (
          <Select
            name={name && `${name}.unit`}
            aria-label={`Unit of ${typeof label === 'string' ? label.toLowerCase() : 'this number'}`}
            className="-ml-0.5 w-[46%] max-w-52 shrink-0"
            boxClassName="rounded-l-none focus-visible:z-10 relative"
            disabled={disabled}
            value={value.unit}
            nothing={value.unit === '' ? (askUnit ?? 'Unit') : undefined}
            choices={units.map((one) => ({ value: one, label: unitLabel(one, { plural: true }) }))}
            onBlur={onBlur}
            onChange={(event) => {
              const chosen = units.find((one) => one === event.target.value)
              if (chosen) onChange({ text: value.text, unit: chosen })
            }}
          />
        )}
      </div>
    </FieldFrame>
  )
}

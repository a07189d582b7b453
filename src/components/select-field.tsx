import { useId, type Ref, type SelectHTMLAttributes } from 'react'
import { classNames } from '../lib/class-names'
import { FieldFrame, describedBy, inputBox, type FieldWords } from './field'
import { ChevronDown } from './glyphs'

export type Choice = { value: string; label: string; disabled?: boolean }

type SelectProps = SelectHTMLAttributes<HTMLSelectElement> & {
  ref?: Ref<HTMLSelectElement>
  choices: readonly Choice[]
  /** The first line while nothing is chosen, such as "Choose a press". */
  nothing?: string
  wrong?: boolean
  boxClassName?: string
}

/** The browser's own list, in our edge; for use without a label of its own, as a unit beside a number. */
export function Select({ choices, nothing, wrong = false, className, boxClassName, ...select }: SelectProps) {
  return (
    <div className={classNames('relative', className)}>
      <select {...select} className={inputBox(wrong, classNames('appearance-none pr-9', boxClassName))}>
        {nothing !== undefined && <option value="">{nothing}</option>}
        {choices.map((choice) => (
          <option key={choice.value} value={choice.value} disabled={choice.disabled}>
            {choice.label}
          </option>
        ))}
      </select>
      <span className="pointer-events-none absolute inset-y-0 right-3 flex items-center">
        <ChevronDown />
      </span>
    </div>
  )
}

type SelectFieldProps = FieldWords & Omit<SelectProps, 'wrong'>

/** One of a list. Takes what `register` returns. */
export function SelectField({ label, hint, message, optional, className, id: given, ...select }: SelectFieldProps) {
  const made = useId()
  const id = given ?? made
  return (
    <FieldFrame {...{ id, label, hint, message, optional, className }}>
      <Select
        id={id}
        wrong={Boolean(message)}
        aria-invalid={Boolean(message) || undefined}
        aria-describedby={describedBy(id, { hint, message })}
        {...select}
      />
    </FieldFrame>
  )
}

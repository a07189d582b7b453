import { useId, type InputHTMLAttributes, type ReactNode, type Ref } from 'react'
import { classNames } from '../lib/class-names'
import { FieldMessage, type FieldWords } from './field'

export type RadioChoice = { value: string; label: ReactNode; note?: ReactNode; disabled?: boolean }

type RadioRowProps = FieldWords &
  Omit<InputHTMLAttributes<HTMLInputElement>, 'type' | 'value'> & {
    ref?: Ref<HTMLInputElement>
    name: string
    choices: readonly RadioChoice[]
    /** The chosen value, when the form holds it; leave out with `register`. */
    value?: string
    /** One under the other instead of side by side. */
    stacked?: boolean
  }

/** The chosen cell carries an edge of ink: at its left where cells lie under each other, at its foot side by side. */
const downEdge = 'has-checked:before:inset-y-0 has-checked:before:left-0 has-checked:before:w-1'
const acrossEdge =
  'tablet:has-checked:before:inset-x-0 tablet:has-checked:before:top-auto tablet:has-checked:before:h-[3px] tablet:has-checked:before:w-auto'

/** A few answers to one question, as native radios in ruled cells. Takes what `register` returns. */
export function RadioRow({ label, hint, message, optional, className, choices, value, stacked = false, ...radio }: RadioRowProps) {
  const id = useId()
  const describes = [hint && `${id}-hint`, message && `${id}-message`].filter(Boolean).join(' ')
  return (
    <fieldset className={classNames('min-w-0', className)} aria-describedby={describes || undefined}>
      <legend className="mb-1 font-medium">
        {label}
        {optional && <span className="font-normal text-graphite"> may be left empty</span>}
      </legend>
      {hint !== undefined && (
        <p id={`${id}-hint`} className="mb-1 text-graphite">
          {hint}
        </p>
      )}
      <div
        className={classNames(
          'grid rounded-field border-2 bg-field',
          message ? 'border-stop-ink' : 'border-rule',
          !stacked && 'tablet:auto-cols-fr tablet:grid-flow-col',
        )}
      >
        {choices.map((choice, index) => (
          <label
            key={choice.value}
            className={classNames(
              'relative flex min-h-14 items-center gap-3 px-3 py-1 desktop:min-h-12',
              'has-checked:font-semibold has-focus-visible:z-10 has-focus-visible:outline-3 has-focus-visible:outline-offset-2 has-focus-visible:outline-[var(--focus)]',
              'has-checked:bg-sheet has-checked:before:absolute has-checked:before:bg-ink',
              stacked ? downEdge : `${downEdge} ${acrossEdge}`,
              choice.disabled && 'text-graphite',
              index > 0 && (stacked ? 'border-t border-rule' : 'border-rule max-tablet:border-t tablet:border-l'),
            )}
          >
            <input
              {...radio}
              type="radio"
              value={choice.value}
              checked={value === undefined ? undefined : value === choice.value}
              disabled={choice.disabled || radio.disabled}
              className="size-5 shrink-0 accent-(--ink) outline-none"
            />
            <span className="min-w-0">
              {choice.label}
              {choice.note !== undefined && (
                <span className="block text-14 font-normal text-graphite max-desktop:text-16">{choice.note}</span>
              )}
            </span>
          </label>
        ))}
      </div>
      {message && <FieldMessage id={`${id}-message`}>{message}</FieldMessage>}
    </fieldset>
  )
}

import { useId, useState, type InputHTMLAttributes, type ReactNode, type Ref, type TextareaHTMLAttributes } from 'react'
import { classNames } from '../lib/class-names'
import { PutRight } from './glyphs'

/** What every field has around it. */
export type FieldWords = {
  label: ReactNode
  /** A sentence on what to put in, always there. */
  hint?: ReactNode
  /** What is so and what to do, when the field can't be taken as it is. */
  message?: string
  /** Says "may be left empty" beside the label. */
  optional?: boolean
  className?: string
}

/** The box of every input: white, edged, 56 px on phone and tablet, 48 on a desktop. */
export function inputBox(wrong: boolean, className?: string): string {
  return classNames(
    'block w-full min-w-0 rounded-field border-2 bg-field px-3 text-18 text-ink desktop:text-16',
    'min-h-14 desktop:min-h-12',
    '[&[readonly]]:bg-sheet disabled:border-dashed disabled:bg-transparent disabled:text-graphite',
    wrong ? 'border-stop-ink' : 'border-rule hover:border-ink focus:border-ink',
    className,
  )
}

export function FieldMessage({ id, children }: { id: string; children: ReactNode }) {
  return (
    <p id={id} className="mt-1 flex items-start gap-2 font-medium text-stop-ink">
      <span className="mt-1">
        <PutRight />
      </span>
      <span>{children}</span>
    </p>
  )
}

type FrameProps = FieldWords & {
  id: string
  /** Stands at the right end of the label's line. */
  aside?: ReactNode
  /** Stands under the input: what the program understood. */
  echo?: ReactNode
  children: ReactNode
}

/** Ids of the sentences about a field, for `aria-describedby`. */
export function describedBy(id: string, words: Pick<FieldWords, 'hint' | 'message'>, echo = false): string | undefined {
  const ids = [words.hint && `${id}-hint`, echo && `${id}-echo`, words.message && `${id}-message`].filter(Boolean)
  return ids.length > 0 ? ids.join(' ') : undefined
}

/** Label, input, echo, hint and message, always in this order: inputs side by side stay on one line. */
export function FieldFrame({ id, label, hint, message, optional, aside, echo, className, children }: FrameProps) {
  return (
    <div className={className}>
      <div className="mb-1 flex items-baseline justify-between gap-3">
        <label htmlFor={id} className="font-medium">
          {label}
          {optional && <span className="font-normal text-graphite"> may be left empty</span>}
        </label>
        {aside}
      </div>
      {children}
      {echo}
      {hint !== undefined && (
        <p id={`${id}-hint`} className="mt-1 text-graphite">
          {hint}
        </p>
      )}
      {message && <FieldMessage id={`${id}-message`}>{message}</FieldMessage>}
    </div>
  )
}

type TextFieldProps = FieldWords & InputHTMLAttributes<HTMLInputElement> & { ref?: Ref<HTMLInputElement>; aside?: ReactNode }

/** One line of text. Takes what `register` returns. */
export function TextField({ label, hint, message, optional, aside, className, id: given, ...input }: TextFieldProps) {
  const made = useId()
  const id = given ?? made
  return (
    <FieldFrame {...{ id, label, hint, message, optional, aside, className }}>
      <input
        id={id}
        type="text"
        aria-invalid={Boolean(message) || undefined}
        aria-describedby={describedBy(id, { hint, message })}
        {...input}
        className={inputBox(Boolean(message))}
      />
    </FieldFrame>
  )
}

/** A calendar date, as the browser's own control writes it: "2026-09-21". */
export function DateField(props: TextFieldProps) {
  return <TextField {...props} type="date" />
}

type TextAreaProps = FieldWords & TextareaHTMLAttributes<HTMLTextAreaElement> & { ref?: Ref<HTMLTextAreaElement> }

/** Several lines of text. */
export function TextArea({ label, hint, message, optional, className, id: given, rows = 3, ...input }: TextAreaProps) {
  const made = useId()
  const id = given ?? made
  return (
    <FieldFrame {...{ id, label, hint, message, optional, className }}>
      <textarea
        id={id}
        rows={rows}
        aria-invalid={Boolean(message) || undefined}
        aria-describedby={describedBy(id, { hint, message })}
        {...input}
        className={inputBox(Boolean(message), 'py-2')}
      />
    </FieldFrame>
  )
}

/** A password, with a button that shows what was typed. */
export function PasswordField({ label, hint, message, optional, aside, className, id: given, ...input }: TextFieldProps) {
  const made = useId()
  const id = given ?? made
  const [shown, setShown] = useState(false)
  return (
    <FieldFrame {...{ id, label, hint, message, optional, aside, className }}>
      <div className="relative">
        <input
          id={id}
          autoCapitalize="none"
          spellCheck={false}
          aria-invalid={Boolean(message) || undefined}
          aria-describedby={describedBy(id, { hint, message })}
          {...input}
          type={shown ? 'text' : 'password'}
          className={inputBox(Boolean(message), 'pr-20')}
        />
        <button
          type="button"
          aria-pressed={shown}
          aria-controls={id}
          onClick={() => setShown(!shown)}
          className="absolute inset-y-0 right-0 w-18 rounded-field text-16 text-graphite underline underline-offset-[3px] hover:text-ink"
        >
          {shown ? 'Hide' : 'Show'}
        </button>
      </div>
    </FieldFrame>
  )
}

import { useId, type InputHTMLAttributes, type ReactNode, type Ref } from 'react'
import { classNames } from '../lib/class-names'
import { FieldMessage } from './field'

type CheckRowProps = Omit<InputHTMLAttributes<HTMLInputElement>, 'type'> & {
  ref?: Ref<HTMLInputElement>
  label: ReactNode
  note?: ReactNode
  message?: string
}

/** One thing to confirm. The whole row can be pressed. Takes what `register` returns. */
export function CheckRow({ label, note, message, className, ...input }: CheckRowProps) {
  const id = useId()
  return (
    <div className={className}>
      <label className={classNames('flex min-h-14 items-center gap-4 py-2 desktop:min-h-12', input.disabled && 'text-graphite')}>
        <input
          {...input}
          type="checkbox"
          aria-invalid={Boolean(message) || undefined}
          aria-describedby={message ? `${id}-message` : undefined}
          className="size-6 shrink-0 accent-(--ink)"
        />
        <span className="min-w-0">
          <span className="font-medium">{label}</span>
          {note !== undefined && <span className="block text-graphite">{note}</span>}
        </span>
      </label>
      {message && <FieldMessage id={`${id}-message`}>{message}</FieldMessage>}
    </div>
  )
}

import { useEffect, useRef, type FormEvent, type FormHTMLAttributes, type ReactNode } from 'react'
import { classNames } from '../lib/class-names'
import { PutRight } from './glyphs'

type FormErrorProps = {
  /** What is so and what to do. Nothing is drawn while it is empty. */
  message: ReactNode
  /** Counts sent attempts, so that the same sentence takes focus again. */
  attempt?: number
}

/** What stopped a form as a whole; takes focus when it appears. */
export function FormError({ message, attempt = 0 }: FormErrorProps) {
  const box = useRef<HTMLDivElement>(null)
  const shown = Boolean(message)
  useEffect(() => {
    if (shown) box.current?.focus()
  }, [shown, attempt])
  if (!shown) return null
  return (
    <div
      ref={box}
      role="alert"
      tabIndex={-1}
      className="mb-2 flex items-start gap-3 border-2 border-stop-ink bg-sheet px-4 py-3 font-medium text-stop-ink"
    >
      <span className="mt-1">
        <PutRight />
      </span>
      <div className="min-w-0">{message}</div>
    </div>
  )
}

type FormProps = Omit<FormHTMLAttributes<HTMLFormElement>, 'onSubmit'> & {
  /** May answer a promise: until it settles, the form isn't sent again, however fast somebody presses twice. */
  onSubmit: (event: FormEvent<HTMLFormElement>) => unknown
}

/** A form with our own messages; the browser's bubbles stay away. */
export function Form({ className, onSubmit, ...form }: FormProps) {
  const sending = useRef(false)
  const submit = async (event: FormEvent<HTMLFormElement>) => {
    // Two presses come before the first one is drawn: only a ref is quick enough.
    event.preventDefault()
    if (sending.current) return
    sending.current = true
    try {
      await onSubmit(event)
    } finally {
      sending.current = false
    }
  }
  return <form noValidate className={classNames('grid gap-4', className)} onSubmit={(event) => void submit(event)} {...form} />
}

type FormPartProps = { title: ReactNode; note?: ReactNode; children: ReactNode }

/** A part of a long form: what it is about at the left, its fields at the right. */
export function FormPart({ title, note, children }: FormPartProps) {
  return (
    <section className="grid gap-x-8 gap-y-4 border-t-2 border-ink py-6 desktop:grid-cols-[16rem_1fr]">
      <div>
        <h2 className="text-20">{title}</h2>
        {note !== undefined && <p className="mt-1 text-graphite">{note}</p>}
      </div>
      <div className="grid content-start gap-4 tablet:grid-cols-2">{children}</div>
    </section>
  )
}

/** The foot of a form: its one next action first, ways out after it. */
export function FormActions({ children }: { children: ReactNode }) {
  return <div className="flex flex-wrap items-center gap-4 pt-2 max-tablet:flex-col max-tablet:items-stretch">{children}</div>
}

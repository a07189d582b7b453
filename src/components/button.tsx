import type { ButtonHTMLAttributes, ReactNode, Ref } from 'react'
import { Link, type LinkProps } from 'react-router-dom'
import { classNames } from '../lib/class-names'

/** `next` is the one chalk action of a screen; `scribed` lies on dye; `stop` takes something away. */
export type ButtonKind = 'next' | 'plain' | 'scribed' | 'stop'
/** `line` sits in a row of text; `run` is the 112 px key that a glove finds. */
export type ButtonSize = 'normal' | 'line' | 'run'

const base = 'inline-flex flex-col items-center justify-center rounded-key border-2 text-center font-semibold select-none no-underline'

const sizes: Record<ButtonSize, string> = {
  normal: 'min-h-14 desktop:min-h-12 px-5 py-1 text-18 desktop:text-16',
  line: 'min-h-12 desktop:min-h-10 px-3 py-0 text-16',
  run: 'min-h-28 px-6 py-3 text-26',
}

const kinds: Record<ButtonKind, string> = {
  next: 'border-on-chalk bg-chalk text-on-chalk hover:bg-[color-mix(in_oklab,var(--chalk),white_30%)] active:bg-chalk',
  plain: 'border-rule bg-sheet text-ink hover:border-ink hover:bg-field',
  scribed: 'border-faint-scribe bg-transparent text-scribe hover:border-scribe hover:bg-thin-dye',
  stop: 'border-stop bg-stop text-on-stop hover:bg-[color-mix(in_oklab,var(--stop),black_15%)]',
}

/** Shut: the outline stays, dashed, so that one sees what is to come. */
const shutKinds: Record<ButtonKind, string> = {
  next: 'border-dashed border-rule bg-transparent text-graphite cursor-not-allowed',
  plain: 'border-dashed border-rule bg-transparent text-graphite cursor-not-allowed',
  scribed: 'border-dashed border-faint-scribe bg-transparent text-faint-scribe cursor-not-allowed',
  stop: 'border-dashed border-rule bg-transparent text-graphite cursor-not-allowed',
}

function look(kind: ButtonKind, size: ButtonSize, shut: boolean, wide: boolean, className?: string): string {
  return classNames(base, sizes[size], shut ? shutKinds[kind] : kinds[kind], wide && 'w-full', className)
}

type Own = {
  kind?: ButtonKind
  size?: ButtonSize
  /** The full width of what it stands in. */
  wide?: boolean
  /** A second line, under the first: what follows, or why it is shut. */
  note?: ReactNode
}

type ButtonProps = Own &
  ButtonHTMLAttributes<HTMLButtonElement> & {
    ref?: Ref<HTMLButtonElement>
    /** Sent and not answered yet: the button says so and can't be pressed twice. */
    busy?: string | false
  }

function Note({ children }: { children: ReactNode }) {
  return <span className="text-16 font-normal">{children}</span>
}

/** A button. Its words say what is then true. */
export function Button({
  kind = 'plain',
  size = 'normal',
  wide = false,
  note,
  busy,
  className,
  children,
  type = 'button',
  disabled,
  ...rest
}: ButtonProps) {
  const waiting = Boolean(busy)
  return (
    <button
      type={type}
      disabled={disabled}
      aria-disabled={waiting || undefined}
      aria-busy={waiting || undefined}
      className={look(kind, size, Boolean(disabled), wide, className)}
      {...rest}
      onClick={waiting ? (event) => event.preventDefault() : rest.onClick}
    >
      <span>{busy || children}</span>
      {note !== undefined && <Note>{note}</Note>}
    </button>
  )
}

type ButtonLinkProps = Own & LinkProps & { ref?: Ref<HTMLAnchorElement> }

/** A link that looks like a button, for what leads to another screen. */
export function ButtonLink({ kind = 'plain', size = 'normal', wide = false, note, className, children, ...rest }: ButtonLinkProps) {
  return (
    <Link className={look(kind, size, false, wide, className)} {...rest}>
      <span>{children}</span>
      {note !== undefined && <Note>{note}</Note>}
    </Link>
  )
}

type ButtonAnchorProps = Own & { href: string; download?: boolean | string; className?: string; children: ReactNode }

/** The same for a file: an address that the router doesn't know. */
export function ButtonAnchor({ kind = 'plain', size = 'normal', wide = false, note, className, children, ...rest }: ButtonAnchorProps) {
  return (
    <a className={look(kind, size, false, wide, className)} {...rest}>
      <span>{children}</span>
      {note !== undefined && <Note>{note}</Note>}
    </a>
  )
}

type TextLinkProps = LinkProps & { strong?: boolean }

/** A link in a line of text or a table. */
export function TextLink({ strong = false, className, ...rest }: TextLinkProps) {
  return (
    <Link
      className={classNames('underline decoration-1 underline-offset-[3px] hover:decoration-2', strong && 'font-semibold', className)}
      {...rest}
    />
  )
}

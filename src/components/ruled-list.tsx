import type { ReactNode } from 'react'
import { Link } from 'react-router-dom'
import { classNames } from '../lib/class-names'
import { Mark } from './marks'

/** Rows between hairlines; an `ol` when the order says something. */
export function RuledList({ children, ordered = false, className }: { children: ReactNode; ordered?: boolean; className?: string }) {
  const Tag = ordered ? 'ol' : 'ul'
  return <Tag className={classNames('border-t border-hairline', className)}>{children}</Tag>
}

export type RuledRowProps = {
  /** The shape that says the state, beside its word. */
  mark?: ReactNode
  title: ReactNode
  note?: ReactNode
  /** At the right end: how much, until when. */
  aside?: ReactNode
  asideNote?: ReactNode
  /** Leaves the right end out on the phone, where the words take the whole row. */
  asideFrom?: 'tablet'
  /** Makes the whole row lead somewhere. */
  to?: string
  className?: string
}

/** Two lines of one thing: what it is over what about it. */
export function RuledRow({ mark, title, note, aside, asideNote, asideFrom, to, className }: RuledRowProps) {
  const line = (
    <>
      {mark !== undefined && <span className="flex w-8 shrink-0 items-center justify-start">{mark}</span>}
      <span className="min-w-0 grow">
        <span className="block font-semibold">{title}</span>
        {note !== undefined && <span className="block text-graphite">{note}</span>}
      </span>
      {(aside !== undefined || asideNote !== undefined) && (
        <span className={classNames('max-w-[58%] shrink-0 text-right', asideFrom && 'max-tablet:hidden')}>
          <span className="block font-semibold">{aside}</span>
          {asideNote !== undefined && <span className="block text-graphite">{asideNote}</span>}
        </span>
      )}
      {to !== undefined && (
        <span className="desktop:hidden">
          <Mark name="chevron" size={20} />
        </span>
      )}
    </>
  )
  const box = 'flex min-h-16 items-center gap-3 py-2 desktop:min-h-[54px] desktop:py-0.5'
  return (
    <li className={classNames('border-b border-hairline', className)}>
      {to === undefined ? (
        <div className={box}>{line}</div>
      ) : (
        <Link to={to} className={classNames(box, '-mx-2 px-2 hover:bg-sheet')}>
          {line}
        </Link>
      )}
    </li>
  )
}

type FactsProps = { facts: readonly (readonly [name: ReactNode, value: ReactNode])[]; className?: string }

/** Names and values, one pair a line. */
export function Facts({ facts, className }: FactsProps) {
  return (
    <dl className={classNames('border-t border-hairline', className)}>
      {facts.map(([name, value], index) => (
        <div key={index} className="grid gap-x-4 border-b border-hairline py-2 tablet:grid-cols-[12rem_1fr]">
          <dt className="text-graphite">{name}</dt>
          <dd className="min-w-0 font-medium">{value}</dd>
        </div>
      ))}
    </dl>
  )
}

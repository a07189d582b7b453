import type { ReactNode } from 'react'
import { Button, ButtonLink } from './button'

type KeysetPagesProps = {
  /** Where the newer rows are; none at the beginning. */
  newer?: string
  /** Where the older rows are; none at the end. */
  older?: string
  /** At the left: what the signs in the table mean. */
  note?: ReactNode
  words?: { newer: string; older: string }
}

/** Newer and Older under a list. A way that ends stays drawn, dashed. */
export function KeysetPages({ newer, older, note, words = { newer: 'Newer', older: 'Older' } }: KeysetPagesProps) {
  return (
    <nav aria-label="More of this list" className="mt-4 flex flex-wrap items-center justify-between gap-4">
      <p className="text-graphite">{note}</p>
      <div className="flex gap-3 max-tablet:grid max-tablet:w-full max-tablet:grid-cols-2">
        {newer === undefined ? <Button disabled>{words.newer}</Button> : <ButtonLink to={newer}>{words.newer}</ButtonLink>}
        {older === undefined ? <Button disabled>{words.older}</Button> : <ButtonLink to={older}>{words.older}</ButtonLink>}
      </div>
    </nav>
  )
}

import type { ReactElement } from 'react'
import { classNames } from '../../lib/class-names'
import type { Where } from '../../lib/attachment-held'
import { Mark } from '../marks'

/** "on this tablet": where the bytes are, in a few words. */
export function whereWords(where: Where): string {
  switch (where.is) {
    case 'server':
      return 'on the server'
    case 'tablet':
      return where.refused === null ? 'on this tablet' : 'on this tablet only'
    case 'lost':
      return 'declared lost'
    case 'elsewhere':
      return 'still on another device'
    case 'unknown':
      return 'not asked: no connection'
  }
}

/** The same lamp as in the title block of a run: filled when the server has it. */
function Lamp({ on }: { on: boolean }): ReactElement {
  return (
    <svg aria-hidden viewBox="0 0 14 14" width={12} height={12} className="shrink-0">
      <circle cx={7} cy={7} r={5.4} fill={on ? 'currentColor' : 'none'} stroke="currentColor" strokeWidth={1.6} />
    </svg>
  )
}

/** Where a photo or document is, with its shape. */
export function WhereItIs({ where, className }: { where: Where; className?: string }): ReactElement {
  return (
    <span className={classNames('inline-flex items-center gap-1.5', className)}>
      {where.is === 'lost' ? <Mark name="abandoned" size={16} /> : <Lamp on={where.is === 'server'} />}
      {whereWords(where)}
    </span>
  )
}

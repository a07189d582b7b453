import type { HTMLAttributes, ReactNode } from 'react'
import { classNames } from '../lib/class-names'

type PlateProps = HTMLAttributes<HTMLElement> & { ground?: 'dye' | 'deep-dye' | 'steel' | 'sheet'; as?: 'div' | 'section' | 'aside' }

const grounds = { dye: 'ground-dye', 'deep-dye': 'ground-deep-dye', steel: 'ground-steel', sheet: 'ground-sheet' } as const

/** A flat area of one ground: dye for instruments and drawings, steel for forms, sheet for records. */
export function Plate({ ground = 'dye', as: Tag = 'div', className, ...rest }: PlateProps) {
  return <Tag className={classNames(grounds[ground], className)} {...rest} />
}

/** A sheet with its thick upper edge: what holds a table or a record. */
export function Sheet({ className, children }: { className?: string; children: ReactNode }) {
  return <div className={classNames('ground-sheet border border-t-2 border-hairline border-t-ink px-4', className)}>{children}</div>
}

type ScaleEdgeProps = { className?: string }

/** The graduated edge of a rule: a tick every 8 px, longer at 40, longest at 80. Decoration. */
export function ScaleEdge({ className }: ScaleEdgeProps) {
  return <div aria-hidden="true" className={classNames('scale-edge', className)} />
}

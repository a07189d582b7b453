import type { ReactNode } from 'react'
import { Link } from 'react-router-dom'

/** A way out at the foot of the title block. */
export function FootLink({ to, children }: { to: string; children: ReactNode }) {
  return (
    <Link to={to} className="flex min-h-16 items-center justify-center px-2 text-center underline underline-offset-[3px] hover:bg-sheet">
      {children}
    </Link>
  )
}

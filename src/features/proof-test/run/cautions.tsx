import type { ReactElement } from 'react'
import { CAUTIONS } from '../set-up-words'

/** What is said wherever force is decided. */
export function Cautions({ className = '' }: { className?: string }): ReactElement {
  return (
    <section aria-label="Cautions" className={`border-2 border-ink px-4 py-3 ${className}`}>
      <h2 className="text-18">Before force is put on</h2>
      <ul className="mt-1 grid gap-1">
        {CAUTIONS.map((caution) => (
          <li key={caution} className="border-t border-hairline pt-1 text-16 first:border-t-0">
            {caution}
          </li>
        ))}
      </ul>
    </section>
  )
}

import { useEffect, useId, useRef, useState, type ReactNode } from 'react'
import { Link } from 'react-router-dom'
import { classNames } from '../../lib/class-names'
import { ChevronDown } from '../glyphs'

export type MenuEntry = { label: string; note?: string; current?: boolean } & ({ to: string } | { act: () => void })

type ShopMenuProps = { shop: string; person: string; role: string; entries: readonly MenuEntry[] }

const row = 'flex min-h-14 w-full flex-col justify-center border-b border-hairline px-4 py-1 text-left hover:bg-field desktop:min-h-12'

/** The shop and the person at the right of the navigation, and what belongs to the two. */
export function ShopMenu({ shop, person, role, entries }: ShopMenuProps) {
  const [open, setOpen] = useState(false)
  const root = useRef<HTMLDivElement>(null)
  const button = useRef<HTMLButtonElement>(null)
  const id = useId()

  useEffect(() => {
    if (!open) return
    const closeOutside = (event: PointerEvent) => {
      if (event.target instanceof Node && !root.current?.contains(event.target)) setOpen(false)
    }
    document.addEventListener('pointerdown', closeOutside)
    return () => document.removeEventListener('pointerdown', closeOutside)
  }, [open])

  const body = (entry: MenuEntry): ReactNode => (
    <>
      <span className={classNames(entry.current && 'font-semibold')}>{entry.label}</span>
      {entry.note !== undefined && <span className="text-14 text-graphite">{entry.note}</span>}
    </>
  )

  return (
    <div
      ref={root}
      className="relative ml-auto flex min-w-0"
      onKeyDown={(event) => {
        if (event.key !== 'Escape' || !open) return
        setOpen(false)
        button.current?.focus()
      }}
    >
      <button
        ref={button}
        type="button"
        aria-expanded={open}
        aria-controls={id}
        onClick={() => setOpen(!open)}
        className="flex min-w-0 items-center gap-2 border-l border-ghost px-3 text-left -outline-offset-4! hover:bg-dye desktop:gap-3 desktop:px-[18px]"
      >
        <span className="min-w-0">
          <span className="line-clamp-2 text-14/[17px]">{shop}</span>
          <span className="line-clamp-1 text-14/[17px] wrap-anywhere text-faint-scribe">
            {person}, {role}
          </span>
        </span>
        <ChevronDown />
      </button>
      {open && (
        <ul id={id} className="ground-sheet absolute top-full right-0 z-30 w-72 border-2 border-ink">
          {entries.map((entry) => (
            <li key={entry.label}>
              {'to' in entry ? (
                <Link to={entry.to} className={row} aria-current={entry.current || undefined} onClick={() => setOpen(false)}>
                  {body(entry)}
                </Link>
              ) : (
                <button
                  type="button"
                  className={row}
                  onClick={() => {
                    setOpen(false)
                    entry.act()
                  }}
                >
                  {body(entry)}
                </button>
              )}
            </li>
          ))}
        </ul>
      )}
    </div>
  )
}

import type { ReactNode } from 'react'
import { Link, useLocation } from 'react-router-dom'
import { classNames } from '../../lib/class-names'
import { ProductMark } from '../product-mark'
import { phoneDestinations } from './destinations'

/** The phone's title bar: where one is, and a cell at the right. */
export function PhoneTitleBar({ title, children }: { title: ReactNode; children?: ReactNode }) {
  return (
    <header className="ground-deep-dye flex h-[52px] border-b border-ghost tablet:hidden print:hidden">
      <div className="flex min-w-0 grow items-center gap-2.5 pl-3.5">
        <ProductMark size={34} />
        <span className="truncate text-18 font-semibold">{title}</span>
      </div>
      {children !== undefined && <div className="flex shrink-0 items-center border-l border-ghost px-4">{children}</div>}
    </header>
  )
}

/** Four cells at the foot of the phone, where a thumb reaches them. */
export function PhoneNavigation() {
  const { pathname } = useLocation()
  return (
    <nav
      aria-label="Parts of Quarterload"
      className="ground-deep-dye sticky bottom-0 z-20 pb-[env(safe-area-inset-bottom)] tablet:hidden print:hidden"
    >
      <ul className="grid grid-cols-4">
        {phoneDestinations.map((destination, index) => {
          const current = destination.matches(pathname)
          return (
            <li key={destination.label} className={classNames('flex', index > 0 && 'border-l border-ghost')}>
              <Link
                to={destination.to}
                aria-current={current ? 'page' : undefined}
                className={classNames(
                  'relative flex h-16 grow items-center justify-center -outline-offset-4!',
                  current ? 'font-semibold text-scribe' : 'text-faint-scribe',
                )}
              >
                {destination.label}
                {current && <span aria-hidden="true" className="absolute inset-x-4 top-0 h-1 bg-chalk" />}
              </Link>
            </li>
          )
        })}
      </ul>
    </nav>
  )
}

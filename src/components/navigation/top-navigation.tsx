import type { ReactNode } from 'react'
import { Link, useLocation } from 'react-router-dom'
import { classNames } from '../../lib/class-names'
import { paths } from '../../paths'
import { ProductMark } from '../product-mark'
import { ScaleEdge } from '../plate'
import { destinations, type Destination } from './destinations'

function Cell({ destination, current }: { destination: Destination; current: boolean }) {
  return (
    <li className="flex border-r border-ghost">
      <Link
        to={destination.to}
        aria-current={current ? 'page' : undefined}
        className={classNames(
          'group relative flex items-center px-2.5 -outline-offset-4! hover:bg-dye desktop:px-[18px]',
          current ? 'font-semibold' : 'text-scribe',
        )}
      >
        {/* Both weights take the wider one's room, so that nothing moves when the cell becomes current. */}
        <span className="relative flex h-full flex-col justify-center">
          <span className="whitespace-nowrap">{destination.label}</span>
          <span aria-hidden="true" className="invisible h-0 font-semibold whitespace-nowrap">
            {destination.label}
          </span>
          {current && <span aria-hidden="true" className="absolute inset-x-0 bottom-0 h-1 bg-chalk" />}
        </span>
      </Link>
    </li>
  )
}

/** Ruled cells over a scale edge, for tablet and desktop. `children` is the cell at the right. */
export function TopNavigation({ children }: { children: ReactNode }) {
  const { pathname } = useLocation()
  return (
    <header className="ground-deep-dye relative z-20 hidden tablet:block print:hidden">
      <div className="flex h-[60px]">
        <Link
          to={paths.today.href()}
          className="flex items-center gap-2.5 border-r border-ghost pr-4 pl-4 -outline-offset-4! desktop:pr-[22px] desktop:pl-[21px]"
        >
          <ProductMark size={40} />
          <span className="hidden text-20 font-semibold desktop:block">Quarterload</span>
          <span className="sr-only desktop:hidden">Quarterload</span>
        </Link>
        <nav aria-label="Parts of Quarterload" className="flex">
          <ul className="flex">
            {destinations.map((destination) => (
              <Cell key={destination.label} destination={destination} current={destination.matches(pathname)} />
            ))}
          </ul>
        </nav>
        {children}
      </div>
      <ScaleEdge />
    </header>
  )
}

import { useEffect, useRef, type ReactNode } from 'react'
import { classNames } from '../lib/class-names'
import { useTitle } from '../lib/use-title'

/** The inset that every screen on steel keeps: 16 on the phone, 24 from the tablet on. */
export const inset = 'px-4 tablet:px-6'

type PageProps = {
  /** What the window's title and the heading say. */
  title: string
  /** Beside the heading: how many, since when, in which order. */
  note?: ReactNode
  /** At the right: the one chalk action last. */
  actions?: ReactNode
  /** Instead of the plain title, when it needs more than text. */
  heading?: ReactNode
  children: ReactNode
  /** Narrow pages keep lines of a form readable. */
  narrow?: boolean
}

/** A screen on steel: heading, actions, then its content. */
export function Page({ title, heading, note, actions, narrow = false, children }: PageProps) {
  useTitle(title)
  return (
    <div className={classNames(inset, 'pt-5 pb-8', narrow && 'mx-auto w-full max-w-3xl')}>
      <div className="mb-4 flex flex-wrap items-center justify-between gap-x-6 gap-y-3 desktop:min-h-12">
        <div className="flex min-w-0 flex-wrap items-baseline gap-x-4">
          <PageHeading>{heading ?? title}</PageHeading>
          {note !== undefined && <p className="text-graphite">{note}</p>}
        </div>
        {actions !== undefined && <div className="flex flex-wrap gap-3 max-tablet:w-full max-tablet:flex-col">{actions}</div>}
      </div>
      {children}
    </div>
  )
}

/** The heading of a screen. It takes focus when the screen opens, so that it is read out first. */
export function PageHeading({ children, className }: { children: ReactNode; className?: string }) {
  const heading = useRef<HTMLHeadingElement>(null)
  useEffect(() => {
    // A form that put the cursor into its first field keeps it there.
    if (document.activeElement === document.body || document.activeElement === null) heading.current?.focus({ preventScroll: true })
  }, [])
  return (
    <h1 ref={heading} tabIndex={-1} className={classNames('text-26 tablet:text-34', className)}>
      {children}
    </h1>
  )
}

type SectionProps = { title: ReactNode; note?: ReactNode; children: ReactNode; className?: string; level?: 2 | 3 }

/** A part of a screen under its own heading. */
export function Section({ title, note, children, className, level = 2 }: SectionProps) {
  const Heading = level === 2 ? 'h2' : 'h3'
  return (
    <section className={className}>
      <div className="mb-2 flex flex-wrap items-baseline justify-between gap-x-4">
        <Heading className="text-20 tablet:text-22">{title}</Heading>
        {note !== undefined && <p className="text-graphite">{note}</p>}
      </div>
      {children}
    </section>
  )
}

type PlateBesidePaperProps = {
  plate: ReactNode
  /** On the phone what is written comes before what is drawn. */
  paperFirst?: boolean
  children: ReactNode
}

/** One dye plate beside paper: the drawing at the left from the desktop on, above it on anything narrower. */
export function PlateBesidePaper({ plate, paperFirst = false, children }: PlateBesidePaperProps) {
  return (
    <div className="flex grow flex-col desktop:grid desktop:grid-cols-[minmax(22rem,37.5%)_minmax(0,1fr)]">
      <div className={classNames('ground-dye', paperFirst && 'max-tablet:order-last')}>{plate}</div>
      <div className="min-w-0">{children}</div>
    </div>
  )
}

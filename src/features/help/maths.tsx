import '@fontsource/ibm-plex-sans/greek-400.css'
import '@fontsource/ibm-plex-sans/greek-400-italic.css'
import '@fontsource/ibm-plex-sans/latin-400-italic.css'
import type { ReactNode } from 'react'

/** Formulas set as in print: quantities in italics, fractions over a bar, roots under a roof. */

/** A quantity, with what tells it from others of its kind set low beside it. */
export function Q({ children, sub }: { children: ReactNode; sub?: ReactNode }) {
  return (
    <span className="whitespace-nowrap">
      <i>{children}</i>
      {sub !== undefined && <sub className="ml-px text-[0.68em]">{sub}</sub>}
    </span>
  )
}

/** Raised: a square, a cube. */
export function Up({ children }: { children: ReactNode }) {
  return <sup className="ml-px text-[0.68em]">{children}</sup>
}

export function Over({ top, under }: { top: ReactNode; under: ReactNode }) {
  return (
    <span className="mx-1 inline-flex flex-col items-center align-middle leading-[1.35]">
      <span className="border-b-[1.5px] border-current px-1.5 pb-0.5 text-center">{top}</span>
      <span className="px-1.5 pt-0.5 text-center">{under}</span>
    </span>
  )
}

/** Brackets as high as the fraction in them. */
export function Tall({ children }: { children: ReactNode }) {
  const bracket = 'inline-block scale-y-[1.9] align-middle font-light'
  return (
    <span className="whitespace-nowrap">
      <span className={bracket}>(</span> {children} <span className={bracket}>)</span>
    </span>
  )
}

export function Root({ children }: { children: ReactNode }) {
  return (
    <span className="mx-0.5 inline-flex items-stretch align-middle">
      <svg aria-hidden="true" viewBox="0 0 14 40" preserveAspectRatio="none" className="w-3.5 shrink-0">
        <path d="M0.5 25L4 22L8 39L13.2 0.8H14" fill="none" stroke="currentColor" strokeWidth="1.5" vectorEffect="non-scaling-stroke" />
      </svg>
      <span className="border-t-[1.5px] border-current px-1 pt-0.5">{children}</span>
    </span>
  )
}

export function Sum({ over }: { over?: ReactNode }) {
  return (
    <span className="mr-1 inline-flex flex-col items-center align-middle leading-none">
      <span className="text-[1.45em] leading-none">Σ</span>
      {over !== undefined && <span className="mt-0.5 text-[0.6em]">{over}</span>}
    </span>
  )
}

/** One of two formulas that stand side by side where there is room, and under each other where there is none. */
export function Each({ children }: { children: ReactNode }) {
  return <span className="mr-8 inline-block whitespace-nowrap">{children}</span>
}

/** A formula on its own line; read out in words, because a screen reader can't see a bar or a roof. */
export function Maths({ say, children }: { say: string; children: ReactNode }) {
  return (
    <div role="math" aria-label={say} className="overflow-x-auto py-1.5 text-20/[2.1] tablet:text-22/[2.1]">
      <span aria-hidden="true">{children}</span>
    </div>
  )
}

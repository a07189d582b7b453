import type { ReactNode } from 'react'

/** Small signs of the controls themselves; the shapes that carry a state are in marks. All decorative. */
function Glyph({ children, size = 16 }: { children: ReactNode; size?: number }) {
  return (
    <svg
      viewBox="0 0 16 16"
      width={size}
      height={size}
      aria-hidden="true"
      focusable="false"
      fill="none"
      stroke="currentColor"
      strokeWidth="2"
      className="shrink-0"
    >
      {children}
    </svg>
  )
}

export const ChevronDown = () => (
  <Glyph>
    <path d="M3 5.5 8 11l5-5.5" />
  </Glyph>
)

/** Which way a column runs: up for smallest first, down for largest first, both when it doesn't decide. */
export const SortGlyph = ({ direction }: { direction: 'ascending' | 'descending' | 'none' }) => (
  <Glyph size={12}>
    {direction !== 'descending' && <path d="M3.5 7 8 2.5 12.5 7" strokeWidth={direction === 'none' ? 1.4 : 2.4} />}
    {direction !== 'ascending' && <path d="M3.5 9 8 13.5 12.5 9" strokeWidth={direction === 'none' ? 1.4 : 2.4} />}
  </Glyph>
)

/** A square with a corner struck in: something to put right at this field. */
export const PutRight = () => (
  <Glyph>
    <path d="M2 2h12v12H2z" />
    <path d="M8 4.5v4.2M8 10.4v2" />
  </Glyph>
)

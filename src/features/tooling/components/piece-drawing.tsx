import type { ToolingKind } from '#shared/tooling'

/** The side view of each kind on a field of 24 × 24, the rod's end above and the work below. */
const OUTLINE: Readonly<Record<ToolingKind, string>> = {
  adaptor: 'M8 2.5h8v6h3v9h-14v-9h3zM9 8.5h6M8 21.5h8v-4M8 21.5v-4',
  nose: 'M8 2.5h8v7h4v5l-5 7h-6l-5-7v-5h4z',
  die: 'M3 3h18v6h-18zM3 21v-8h5l4 4 4-4h5v8z',
  'vee-block': 'M2.5 21.5v-13h4l5.5 7 5.5-7h4v13z',
  plate: 'M2 9.5h20v6h-20z',
  stack: 'M6 3h12v6h-12zM5 9h14v6h-14zM4 15h16v6h-16z',
}

/** A kind of tooling in a row, beside its word. */
export function PieceMark({ kind }: { kind: ToolingKind }) {
  return (
    <svg viewBox="0 0 24 24" width={24} height={24} aria-hidden="true" className="shrink-0">
      <path d={OUTLINE[kind]} fill="none" stroke="var(--ink)" strokeWidth={1.8} strokeLinejoin="miter" />
    </svg>
  )
}

/** The same as a scribed drawing on its centre-line, with the force that goes through. */
export function PieceDrawing({ kind }: { kind: ToolingKind }) {
  return (
    <svg viewBox="0 0 240 236" className="block h-[236px] w-[240px]" fill="none" strokeLinejoin="miter">
      <path d="M120 8V228" stroke="var(--faint-scribe)" strokeWidth={1} strokeDasharray="14 4 3 4" />
      <g transform="translate(48 46) scale(6)">
        <path d={OUTLINE[kind]} stroke="var(--scribe)" strokeWidth={2} vectorEffect="non-scaling-stroke" />
      </g>
      <g stroke="var(--chalk)" strokeWidth={3}>
        <path d="M120 10V42M120 226V194" />
        <path d="M113 30L120 43L127 30M113 206L120 193L127 206" />
      </g>
    </svg>
  )
}

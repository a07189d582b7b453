import type { ReactElement } from 'react'

interface ProductMarkProps {
  size?: number
  tone?: 'dye' | 'steel'
  label?: string
}

/** A gauge's circle with its first quarter chalked, and the stroke of a pump handle. */
export function ProductMark({ size = 32, tone = 'dye', label }: ProductMarkProps): ReactElement {
  const line = tone === 'dye' ? 'var(--scribe)' : 'var(--ink)'
  const quarter = tone === 'dye' ? 'var(--chalk)' : 'var(--ink)'
  return (
    <svg
      viewBox="0 0 40 40"
      width={size}
      height={size}
      className="shrink-0"
      {...(label === undefined ? { 'aria-hidden': true } : { role: 'img', 'aria-label': label })}
    >
      <path d="M20 20V8.6A11.4 11.4 0 0 1 31.4 20Z" fill={quarter} />
      <g fill="none" stroke={line}>
        <circle cx={20} cy={20} r={12} strokeWidth={2.6} />
        <path d="M26.6 26.6 36 36" strokeWidth={3.4} />
        <path d="M20 1.6v5M1.6 20h5M20 33.4v5M33.4 20h5" strokeWidth={1.8} opacity={0.85} />
      </g>
    </svg>
  )
}

import type { ReactElement } from 'react'
import type { Tone } from './marks'

/** How far an entry has come: from this device to the server to under a seal. */
export type Place = 'tablet' | 'server' | 'sealed'

const STEPS: readonly Place[] = ['tablet', 'server', 'sealed']
const WORDS: Record<Place, string> = { tablet: 'on this tablet', server: 'on the server', sealed: 'sealed' }

interface EntryPlaceProps {
  place: Place
  tone?: Extract<Tone, 'dye' | 'steel'>
  className?: string
}

/** Three rings on a line, filled as far as the entry has come, and the word for it. */
export function EntryPlace({ place, tone = 'steel', className }: EntryPlaceProps): ReactElement {
  const reached = STEPS.indexOf(place)
  const line = tone === 'dye' ? 'var(--scribe)' : 'var(--ink)'
  return (
    <span className={className ?? 'inline-flex items-center gap-2 whitespace-nowrap text-16'}>
      <svg aria-hidden viewBox="0 0 46 14" width={46} height={14} className="shrink-0">
        {STEPS.map((step, index) => (
          <g key={step} stroke={line} strokeWidth={1.6}>
            {index > 0 && <path d={`M${16 * index - 4.2} 7H${16 * index + 1.8}`} strokeDasharray={index > reached ? '2 2' : undefined} />}
            <circle cx={7 + 16 * index} cy={7} r={4.6} fill={index <= reached ? line : 'none'} />
          </g>
        ))}
      </svg>
      {WORDS[place]}
    </span>
  )
}

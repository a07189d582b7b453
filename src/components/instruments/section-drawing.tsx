import { useId } from 'react'
import type { MemberSection } from '#shared/structure/section-shapes'
import { outlineOf } from './section-outline'

const MARGIN = 0.14

/** A cross-section, scribed to scale on dye: cut metal hatched, the force from above. */
export function SectionDrawing({ section, size = 132 }: { section: MemberSection; size?: number }) {
  const hatch = useId()
  const outline = outlineOf(section)
  if (!outline) return null
  const longest = Math.max(outline.width, outline.height)
  const room = longest * (1 + 2 * MARGIN)
  const line = room / size
  const x = outline.left + outline.width / 2 - room / 2
  const y = outline.top + outline.height / 2 - room / 2
  return (
    <svg
      viewBox={`${x} ${-(y + room)} ${room} ${room}`}
      width={size}
      height={size}
      role="img"
      aria-label={`The section, ${section.shape}, to scale`}
      className="shrink-0"
    >
      <defs>
        <pattern id={hatch} width={line * 6} height={line * 6} patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
          <line x1="0" y1="0" x2="0" y2={line * 6} stroke="var(--ghost)" strokeWidth={line * 1.6} />
        </pattern>
      </defs>
      <g transform="scale(1 -1)">
        {outline.paths.map((path, index) => (
          <path key={index} d={path} fill={`url(#${hatch})`} fillRule="evenodd" stroke="var(--scribe)" strokeWidth={line * 1.6} />
        ))}
      </g>
    </svg>
  )
}

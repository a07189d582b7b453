import type { ReactElement } from 'react'
import type { Drawing, DrawingItem, InkName } from '#shared/chart/drawing'
import { CONDENSED } from '../typeset'

const paint = (ink: InkName | null): string => (ink === null ? 'none' : `var(--${ink})`)

function Item({ item }: { item: DrawingItem }): ReactElement {
  if (item.kind === 'path') {
    return (
      <path
        d={item.d}
        fill={paint(item.fill)}
        stroke={paint(item.stroke)}
        strokeWidth={item.width}
        strokeDasharray={item.dash}
        opacity={item.opacity}
      />
    )
  }
  return (
    <text
      x={item.x}
      y={item.y}
      fontSize={item.size}
      fontWeight={item.weight}
      fontFamily={item.condensed ? CONDENSED : undefined}
      textAnchor={item.anchor}
      fill={paint(item.ink)}
      stroke={paint(item.halo)}
      strokeWidth={item.halo === null ? 0 : 5}
      strokeLinejoin="round"
      paintOrder="stroke"
    >
      {item.text}
    </text>
  )
}

/** Paints a drawing that shared code laid out. `label` is all that someone who can't see it gets: make it say the facts. */
export function DrawingView({ drawing, label }: { drawing: Drawing; label: string }): ReactElement {
  return (
    <svg
      width={drawing.width}
      height={drawing.height}
      viewBox={`0 0 ${drawing.width} ${drawing.height}`}
      role="img"
      aria-label={label}
      className="block"
    >
      {drawing.items.map((item, index) => (
        <Item key={index} item={item} />
      ))}
    </svg>
  )
}

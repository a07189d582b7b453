import { memo, type ReactElement } from 'react'
import type { Drawing, DrawingItem } from '#shared/chart/drawing'
import { CONDENSED } from '../typeset'
import { inkOn, type Ground } from './inks'

function Item({ item, ground }: { item: DrawingItem; ground: Ground }): ReactElement {
  if (item.kind === 'path') {
    return (
      <path
        d={item.d}
        fill={inkOn(ground, item.fill)}
        stroke={inkOn(ground, item.stroke)}
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
      transform={item.turned === undefined ? undefined : `rotate(${item.turned} ${item.x} ${item.y})`}
      fill={inkOn(ground, item.ink)}
      stroke={inkOn(ground, item.halo)}
      strokeWidth={item.halo === null ? 0 : 5}
      strokeLinejoin="round"
      paintOrder="stroke"
    >
      {item.text}
    </text>
  )
}

/** Items of a drawing inside somebody's svg. */
export const DrawingItems = memo(function DrawingItems({
  items,
  ground = 'dye',
}: {
  items: readonly DrawingItem[]
  ground?: Ground
}): ReactElement {
  return (
    <>
      {items.map((item, index) => (
        <Item key={index} item={item} ground={ground} />
      ))}
    </>
  )
})

interface DrawingViewProps {
  drawing: Drawing
  label: string
  ground?: Ground
  className?: string
}

/** Paints a drawing that shared code laid out. `label` is all that someone who can't see it gets: make it say the facts. */
export function DrawingView({ drawing, label, ground = 'dye', className = 'block' }: DrawingViewProps): ReactElement {
  return (
    <svg
      width={drawing.width}
      height={drawing.height}
      viewBox={`0 0 ${drawing.width} ${drawing.height}`}
      role="img"
      aria-label={label}
      className={className}
    >
      <DrawingItems items={drawing.items} ground={ground} />
    </svg>
  )
}

/** How far the calendar on Today looks ahead. */
export const WEEKS = 14

/** A day on which something falls due. */
export type CalendarEvent = {
  /** Calendar date, "2026-09-30". */
  date: string
  label: string
  to: string
}

type At = { event: CalendarEvent; x: number }
export type PlacedEvent = At & {
  /** Rows above the scale; 0 stands beside its ring. */
  level: number
  /** The words stand left of the ring, because the right end is near. */
  flipped: boolean
}

type Span = readonly [from: number, to: number]
const overlaps = (a: Span, b: Span): boolean => a[0] < b[1] && b[0] < a[1]
const GAP = 10
const LEVELS = 3

/**
 * Puts words beside their day so that none run into another: first beside the ring, then on a higher row.
 * Lengths in px. When all rows are taken the word goes to the highest; the list below the scale has them all.
 */
export function layOutEvents(input: {
  events: readonly At[]
  right: number
  widthOf: (text: string) => number
  /** What is taken on the lowest row already. */
  reserved: Span
}): PlacedEvent[] {
  const taken: Span[][] = Array.from({ length: LEVELS }, () => [])
  taken[0]?.push(input.reserved)
  const rings = input.events.map(({ x }): Span => [x - 7, x + 7])
  return [...input.events]
    .sort((a, b) => b.x - a.x)
    .map(({ event, x }) => {
      const width = input.widthOf(event.label) + 12 + GAP
      const flipped = x + width > input.right
      const span: Span = flipped ? [x - width, x - 8] : [x + 8, x + width]
      const free = taken.findIndex(
        (row, level) => !row.some((other) => overlaps(other, span)) && !(level === 0 && rings.some((ring) => overlaps(ring, span))),
      )
      const level = free === -1 ? LEVELS - 1 : free
      // The stem of a higher row crosses the rows below at its own day.
      for (let below = 0; below < level; below += 1) taken[below]?.push([x - 3, x + 3])
      taken[level]?.push(span)
      return { event, x, level, flipped }
    })
    .reverse()
}

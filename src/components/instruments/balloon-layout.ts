import type { Point } from '#shared/chart/drawing'

/** Lanes that balloons stand in: outside the frame, or between upright and ram. */
export type Lane = 'outer-left' | 'outer-right' | 'inner-left' | 'inner-right'

/** A spot of an elevation: what the leader points at, and where its balloon would like to stand. */
export interface Anchor {
  tip: Point
  lane: Lane
  y: number
}

export interface Elevation {
  lanes: Record<Lane, number>
  anchors: Record<string, Anchor>
  /** `clear` is how far from the triangle's middle its letter stands. */
  points: Record<string, { at: Point; letter: 'left' | 'right'; clear?: number }>
  /** First and last px from the top that a balloon's centre may have. */
  from: number
  to: number
}

export interface PlacedBalloon {
  id: string
  centre: Point
  /** Null for a joint whose place the elevation doesn't know. */
  tip: Point | null
}

/** Centres of neighbouring balloons: their touch targets of 56 px just don't overlap. */
export const TOUCH = 56
const CLOSEST = 44

/** Moves wished-for places apart along a lane, as little as it takes, and keeps them between the ends. */
export function spread(wishes: readonly number[], from: number, to: number, apart = TOUCH): number[] {
  const count = wishes.length
  if (count === 0) return []
  const gap = Math.max(0, Math.min(apart, count > 1 ? (to - from) / (count - 1) : apart))
  const order = wishes.map((wish, index) => ({ wish, index })).sort((a, b) => a.wish - b.wish || a.index - b.index)
  const groups: { sum: number; size: number }[] = []
  const startOf = (group: { sum: number; size: number }): number => {
    const middle = group.sum / group.size
    const half = ((group.size - 1) * gap) / 2
    return Math.min(Math.max(middle - half, from), Math.max(from, to - half * 2))
  }
  for (const { wish } of order) {
    groups.push({ sum: wish, size: 1 })
    // A group that runs into the one above joins it; together they settle round their mean.
    for (;;) {
      const last = groups[groups.length - 1]
      const above = groups[groups.length - 2]
      if (last === undefined || above === undefined) break
      if (startOf(above) + above.size * gap <= startOf(last) + 1e-9) break
      above.sum += last.sum
      above.size += last.size
      groups.pop()
    }
  }
  const placed: number[] = []
  for (const group of groups) {
    const start = startOf(group)
    for (let k = 0; k < group.size; k += 1) placed.push(start + k * gap)
  }
  const result = new Array<number>(count).fill(from)
  order.forEach(({ index }, rank) => {
    result[index] = placed[rank] ?? from
  })
  return result
}

/** Spots that go by more than one name; the first one the elevation knows is taken. */
const ALSO: [string, string][] = [
  ['bed-pin', 'bed'],
  ['bed', 'bed-pin'],
  ['column-front', 'upright'],
  ['column-back', 'column-top'],
  ['column-top', 'head'],
  ['column', 'upright'],
  ['upright', 'column'],
]

/** The anchor of a place, under its own name or the one this kind of frame uses for it. */
export function anchorFor(elevation: Elevation, place: string | null): Anchor | null {
  if (place === null) return null
  const exact = elevation.anchors[place]
  if (exact !== undefined) return exact
  for (const [name, other] of ALSO) {
    if (!place.startsWith(name)) continue
    const found = elevation.anchors[place.replace(name, other)]
    if (found !== undefined) return found
  }
  return null
}

/** Gives every joint a balloon that touches no other. Those without a known place go down the right side, without a leader. */
export function placeBalloons(joints: readonly { id: string; place: string | null }[], elevation: Elevation): PlacedBalloon[] {
  const wanted = joints.map((joint) => ({ id: joint.id, anchor: anchorFor(elevation, joint.place) }))
  const lanes: Lane[] = ['outer-left', 'outer-right', 'inner-left', 'inner-right']
  const centres = new Map<string, Point>()
  for (const lane of lanes) {
    const here = wanted.filter(({ anchor }) => (anchor?.lane ?? 'outer-right') === lane)
    const wishes = here.map(({ anchor }) => anchor?.y ?? elevation.to)
    const room = elevation.to - elevation.from
    const apart = here.length > 1 && room / (here.length - 1) < TOUCH ? CLOSEST : TOUCH
    spread(wishes, elevation.from, elevation.to, apart).forEach((y, index) => {
      const joint = here[index]
      if (joint !== undefined) centres.set(joint.id, { x: elevation.lanes[lane], y })
    })
  }
  return wanted.map(({ id, anchor }) => ({
    id,
    centre: centres.get(id) ?? { x: elevation.lanes['outer-right'], y: elevation.to },
    tip: anchor?.tip ?? null,
  }))
}

import type { Point } from '../chart/drawing'
import type { Anchor, Elevation, Lane } from './frame'

export interface PlacedBalloon {
  id: string
  centre: Point
  /** Null for a joint whose place the elevation doesn't know. */
  tip: Point | null
  lane: Lane
}

export interface BalloonLayout {
  /** px across the ring: 42, smaller only where so many joints have no room otherwise. */
  size: number
  /** px between centres of neighbours at the least: what a finger may touch of each. */
  touch: number
  balloons: PlacedBalloon[]
}

/** A balloon as drawn and as touched (px), while there is room. */
export const BALLOON = 42
export const TOUCH = 56

/** A ring of `size` in any of its shapes reaches this far from its middle: corners of the diamond with their dots. */
export const reachOf = (size: number): number => size * 0.69

/** Sizes that are tried in turn, each with the distance that keeps any two shapes apart. */
const SIZES: readonly { size: number; apart: number }[] = [42, 36, 32, 28, 24, 20].map((size) => ({
  size,
  apart: Math.ceil(reachOf(size) * 2),
}))

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
export function anchorFor(elevation: Pick<Elevation, 'anchors'>, place: string | null): Anchor | null {
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

interface Wanted {
  id: string
  anchor: Anchor | null
  lane: Lane
  y: number
}

const LANES: readonly Lane[] = ['outer-left', 'outer-right', 'inner-left', 'inner-right']

/** Lanes that stand at their own place: where two are one, as on a C-frame, the later name counts. */
function lanesOf(elevation: Elevation): Lane[] {
  return LANES.filter((lane, index) => !LANES.slice(index + 1).some((other) => elevation.lanes[other] === elevation.lanes[lane]))
}

/** Puts what a lane has no room for into the nearest lane that has some; what has no leader goes first. */
function shareOut(wanted: readonly Wanted[], elevation: Elevation, lanes: readonly Lane[], room: number): Map<Lane, Wanted[]> {
  const shared = new Map<Lane, Wanted[]>(lanes.map((lane) => [lane, []]))
  const at = (lane: Lane): Lane => lanes.find((one) => elevation.lanes[one] === elevation.lanes[lane]) ?? lane
  for (const one of wanted) shared.get(at(one.lane))?.push(one)
  for (const lane of lanes) {
    const here = shared.get(lane) ?? []
    while (here.length > room) {
      const free = here.findLastIndex(({ anchor }) => anchor === null)
      // What points at nothing stands beside the frame rather than on it.
      const far = (other: Lane): number =>
        Math.abs(elevation.lanes[other] - elevation.lanes[lane]) + (free >= 0 && other.startsWith('inner') ? 1e4 : 0)
      const near = lanes.filter((other) => (shared.get(other)?.length ?? room) < room).sort((x, y) => far(x) - far(y))[0]
      if (near === undefined) return shared
      const [moved] = here.splice(free >= 0 ? free : here.length - 1, 1)
      if (moved !== undefined) shared.get(near)?.push(moved)
    }
  }
  return shared
}

/** Every second joint at the ram points at it from the other side, so that no leader runs behind the first one's balloon. */
function acrossTheRam(anchor: Anchor, place: string, { lanes }: Elevation): Anchor {
  if (!place.startsWith('ram-') || !anchor.lane.startsWith('inner')) return anchor
  const lane = anchor.lane === 'inner-left' ? 'inner-right' : 'inner-left'
  return { ...anchor, lane, tip: { x: lanes['inner-left'] + lanes['inner-right'] - anchor.tip.x, y: anchor.tip.y } }
}

/**
 * Gives every joint a balloon that touches no other and stands whole on the sheet, in the largest size that has
 * room for all. Those without a known place go down the right side, without a leader. The layout doesn't depend on
 * what state a joint is in, so nothing moves while joints are examined.
 */
export function placeBalloons(joints: readonly { id: string; place: string | null }[], elevation: Elevation): BalloonLayout {
  const seen = new Map<string, number>()
  const wanted = joints.map(({ id, place }): Wanted => {
    const found = anchorFor(elevation, place)
    const before = place === null ? 0 : (seen.get(place) ?? 0)
    const anchor = found !== null && place !== null && before % 2 === 1 ? acrossTheRam(found, place, elevation) : found
    if (place !== null) seen.set(place, before + 1)
    return { id, anchor, lane: anchor?.lane ?? 'outer-right', y: anchor?.y ?? elevation.to }
  })
  const lanes = lanesOf(elevation)
  const long = elevation.to - elevation.from
  const roomAt = (apart: number): number => Math.floor(long / apart + 1e-9) + 1
  const { size, apart } = SIZES.find((one) => roomAt(one.apart) * lanes.length >= joints.length) ?? { size: 20, apart: 28 }
  const shared = shareOut(wanted, elevation, lanes, roomAt(apart))
  // On a narrow sheet the lanes between the uprights make room for each other too.
  const xs = spread(
    lanes.map((lane) => elevation.lanes[lane]),
    elevation.lanes['outer-left'],
    elevation.lanes['outer-right'],
    apart,
  )
  const placed = new Map<string, PlacedBalloon>()
  lanes.forEach((lane, rank) => {
    const here = shared.get(lane) ?? []
    const wishes = here.map(({ y }) => y)
    const under = lane.startsWith('inner') && (here.length - 1) * apart <= elevation.to - elevation.innerFrom
    const ys = spread(wishes, under ? elevation.innerFrom : elevation.from, elevation.to, apart)
    here.forEach(({ id, anchor }, index) => {
      const centre = { x: xs[rank] ?? elevation.lanes[lane], y: ys[index] ?? elevation.to }
      placed.set(id, { id, lane, centre, tip: anchor?.tip ?? null })
    })
  })
  return { size, touch: Math.min(TOUCH, apart), balloons: joints.flatMap(({ id }) => placed.get(id) ?? []) }
}

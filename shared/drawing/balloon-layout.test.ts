import { describe, expect, it } from 'vitest'
import { Seeded } from '../../tests/support/seeded'
import { FRAME_KINDS, type FrameKind } from '../press/model'
import { jointPlaces } from '../press/places'
import { placeBalloons, reachOf, spread, TOUCH } from './balloon-layout'
import { cFrameElevation, cFrameOf } from './c-frame-geometry'
import type { Box } from './frame'
import { portalElevation, portalOf } from './portal-geometry'

/** The boxes that the screens give a drawing: phone, run lying down and upright, plate on a tablet and on a desktop. */
const BOXES: readonly Box[] = [
  { width: 358, height: 440 },
  { width: 339, height: 580 },
  { width: 390, height: 364 },
  { width: 533, height: 480 },
  { width: 772, height: 600 },
  { width: 432, height: 560 },
  { width: 432, height: 350 },
]

interface Measured {
  height: number | null
  width: number | null
  holes: number
}

function elevationOf(kind: FrameKind, box: Box, { height, width, holes }: Measured = { height: 1.6, width: 0.71, holes: 7 }) {
  return kind === 'c-frame'
    ? cFrameElevation(cFrameOf({ height, width: null, throat: width }, box))
    : portalElevation(portalOf(kind, { height, width, holes, holePitch: 0.15, bedHole: 5 }, box))
}

describe('balloons along a side', () => {
  it('stay where they wish to be while there is room', () => {
    expect(spread([100, 300], 0, 500)).toEqual([100, 300])
  })

  it('are pushed apart as little as it takes', () => {
    expect(spread([200, 200], 0, 500)).toEqual([200 - TOUCH / 2, 200 + TOUCH / 2])
  })

  it('never leave the sheet, however many there are', () => {
    const placed = spread(
      Array.from({ length: 20 }, () => 490),
      0,
      500,
    )
    expect(Math.min(...placed)).toBeGreaterThanOrEqual(0)
    expect(Math.max(...placed)).toBeLessThanOrEqual(500)
    expect(new Set(placed).size).toBe(20)
  })
})

describe.each(FRAME_KINDS)('the elevation of a %s', (kind) => {
  it('knows every place that its joints can be pinned to', () => {
    const { balloons } = placeBalloons(
      jointPlaces[kind].map(({ place }) => ({ id: place, place })),
      elevationOf(kind, { width: 432, height: 560 }),
    )
    expect(balloons.filter(({ tip }) => tip === null)).toEqual([])
  })

  it('puts up to 30 joints into any box of the screens: none touches another, none is cut off', () => {
    const random = new Seeded(20_261_201)
    const faults: string[] = []
    for (let round = 0; round < 250; round += 1) {
      const box = random.pick(BOXES)
      const measured: Measured = {
        height: random.chance(0.3) ? null : 0.4 + random.next() * 4,
        width: random.chance(0.3) ? null : 0.15 + random.next() * 2,
        holes: random.between(0, 20),
      }
      const count = random.between(1, 30)
      const joints = Array.from({ length: count }, (_, index) => ({
        id: String(index),
        place: random.chance(0.2) ? null : random.pick(jointPlaces[kind]).place,
      }))
      const { size, touch, balloons } = placeBalloons(joints, elevationOf(kind, box, measured))
      const said = `round ${round}, ${count} joints in ${box.width} × ${box.height}`
      if (balloons.length !== count) faults.push(`${said}: ${balloons.length} drawn`)
      const reach = reachOf(size)
      balloons.forEach(({ id, centre }, index) => {
        if (Math.min(centre.x, centre.y, box.width - centre.x, box.height - centre.y) < reach) faults.push(`${said}: ${id} is cut off`)
        for (const other of balloons.slice(index + 1)) {
          const [dx, dy] = [Math.abs(centre.x - other.centre.x), Math.abs(centre.y - other.centre.y)]
          // Squares of `touch` px: neither the shapes nor what a finger may touch of them overlap.
          if (Math.max(dx, dy) < touch - 1e-9 || Math.hypot(dx, dy) < 2 * reach - 1) faults.push(`${said}: ${id} over ${other.id}`)
        }
      })
    }
    expect(faults).toEqual([])
  })

  it('draws 42 px balloons with 56 px to touch for as many joints as a press of its kind has', () => {
    for (const box of BOXES.filter(({ height }) => height >= 440)) {
      const joints = Array.from({ length: 14 }, (_, index) => ({ id: String(index), place: jointPlaces[kind][index]?.place ?? null }))
      expect(placeBalloons(joints, elevationOf(kind, box))).toMatchObject({ size: 42, touch: TOUCH })
    }
  })

  it('lists a joint without a place down the side, without a leader', () => {
    const elevation = elevationOf(kind, { width: 432, height: 560 })
    const [joint] = placeBalloons([{ id: 'a', place: null }], elevation).balloons
    expect(joint?.tip).toBeNull()
    expect(joint?.centre.x).toBe(elevation.lanes['outer-right'])
  })
})

describe('the bed of an H-frame', () => {
  it('hangs in the hole it is pinned in, counted from the top', () => {
    const box = { width: 430, height: 560 }
    const at = (bedHole: number): number => portalOf('h-frame', { height: 1.6, width: 0.71, holes: 7, holePitch: 0.15, bedHole }, box).pin
    const pitch = 0.15 * ((box.height - 24 - 30) / 1.6)
    // Holes lie on whole px, so neighbours may be one px off their pitch.
    for (const hole of [2, 3, 4, 5, 6, 7]) expect(Math.abs(at(hole) - at(hole - 1) - pitch)).toBeLessThanOrEqual(1)
  })
})

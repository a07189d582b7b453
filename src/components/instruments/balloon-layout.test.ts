import { describe, expect, it } from 'vitest'
import { placeBalloons, spread, TOUCH } from './balloon-layout'
import { cFrameElevation, cFrameOf } from './c-frame-drawing'
import { jointPlaces } from './joint-places'
import type { FrameKind } from './joint-places'
import { portalElevation, portalOf } from './portal-geometry'

const box = { width: 430, height: 560 }

function elevationOf(kind: FrameKind) {
  return kind === 'c-frame'
    ? cFrameElevation(cFrameOf({ height: 1.2, width: null, throat: 0.28 }, box))
    : portalElevation(portalOf(kind, { height: 1.6, width: 0.71, holes: 7, holePitch: 0.15, bedHole: 5 }, box))
}

describe('balloons along a side', () => {
  it('stay where they wish to be while there is room', () => {
    expect(spread([100, 300], 0, 500)).toEqual([100, 300])
  })

  it('are pushed apart as little as it takes', () => {
    expect(spread([200, 200], 0, 500)).toEqual([200 - TOUCH / 2, 200 + TOUCH / 2])
  })

  it('never leave the sheet, however many there are', () => {
    const placed = spread(Array.from({ length: 20 }, () => 490), 0, 500)
    expect(Math.min(...placed)).toBeGreaterThanOrEqual(0)
    expect(Math.max(...placed)).toBeLessThanOrEqual(500)
    expect(new Set(placed).size).toBe(20)
  })
})

describe.each(['h-frame', 'four-post', 'bench', 'c-frame'] as const)('the elevation of a %s', (kind) => {
  it('knows every place that its joints can be pinned to, and no two balloons touch', () => {
    const elevation = elevationOf(kind)
    const joints = jointPlaces[kind].map(({ place }) => ({ id: place, place }))
    const placed = placeBalloons(joints, elevation)
    expect(placed.filter(({ tip }) => tip === null)).toEqual([])
    placed.forEach((a, index) => {
      for (const b of placed.slice(index + 1)) {
        expect(Math.hypot(a.centre.x - b.centre.x, a.centre.y - b.centre.y), `${a.id} and ${b.id}`).toBeGreaterThanOrEqual(42)
      }
    })
  })

  it('lists a joint without a place down the side, without a leader', () => {
    const elevation = elevationOf(kind)
    const [joint] = placeBalloons([{ id: 'a', place: null }], elevation)
    expect(joint?.tip).toBeNull()
    expect(joint?.centre.x).toBe(elevation.lanes['outer-right'])
  })
})

describe('the bed of an H-frame', () => {
  it('hangs in the hole it is pinned in, counted from the top', () => {
    const at = (bedHole: number): number => portalOf('h-frame', { height: 1.6, width: 0.71, holes: 7, holePitch: 0.15, bedHole }, box).pin
    const pitch = 0.15 * ((box.height - 24 - 30) / 1.6)
    // Holes lie on whole px, so neighbours may be one px off their pitch.
    for (const hole of [2, 3, 4, 5, 6, 7]) expect(Math.abs(at(hole) - at(hole - 1) - pitch)).toBeLessThanOrEqual(1)
  })
})

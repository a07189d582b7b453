import { describe, expect, it } from 'vitest'
import { Seeded } from '../../../tests/support/seeded'
import { broughtIn, FITTED, kept, LARGEST, pannedBy, zoomedAt, type View } from './pan-zoom'

const sheet = { width: 358, height: 440 }

describe('a drawing under its window', () => {
  it('stays over the point it is enlarged about', () => {
    const at = { x: 100, y: 300 }
    const view = zoomedAt(FITTED, 2, at, sheet)
    expect({ x: (at.x - view.x) / view.k, y: (at.y - view.y) / view.k }).toEqual(at)
  })

  it('never leaves a gap, whatever is done to it', () => {
    const random = new Seeded(41)
    let view: View = FITTED
    for (let step = 0; step < 500; step += 1) {
      const at = { x: random.next() * sheet.width, y: random.next() * sheet.height }
      view = random.chance(0.5)
        ? zoomedAt(view, 0.3 + random.next() * 3, at, sheet)
        : pannedBy(view, random.between(-500, 500), random.between(-500, 500), sheet)
      expect(view.k).toBeGreaterThanOrEqual(1)
      expect(view.k).toBeLessThanOrEqual(LARGEST)
      expect(Math.max(view.x, view.y)).toBeLessThanOrEqual(0)
      expect(view.x + view.k * sheet.width).toBeGreaterThanOrEqual(sheet.width - 1e-6)
      expect(view.y + view.k * sheet.height).toBeGreaterThanOrEqual(sheet.height - 1e-6)
    }
  })

  it('is fitted again by making it small', () => {
    expect(zoomedAt({ k: 3, x: -200, y: -300 }, 0.1, { x: 20, y: 30 }, sheet)).toEqual(kept(FITTED, sheet))
  })

  it('brings what has the focus inside, and leaves alone what is there already', () => {
    const view: View = { k: 2, x: -100, y: -100 }
    expect(broughtIn(view, { left: -30, right: 26, top: 10, bottom: 66 }, sheet)).toEqual({ k: 2, x: -70, y: -100 })
    expect(broughtIn(view, { left: 10, right: 66, top: 420, bottom: 476 }, sheet)).toEqual({ k: 2, x: -100, y: -136 })
    expect(broughtIn(view, { left: 10, right: 66, top: 10, bottom: 66 }, sheet)).toEqual(view)
  })
})

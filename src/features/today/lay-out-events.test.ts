import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { layOutEvents } from './lay-out-events'

const event = (label: string) => ({ date: '2026-10-12', label, to: '/' })
const lay = (events: { event: ReturnType<typeof event>; x: number }[]) =>
  layOutEvents({ events, right: 1200, widthOf: (text) => text.length * 8, reserved: [0, 80] })

describe('words on the calendar', () => {
  it('stand beside their day where there is room', () => {
    expect(lay([{ event: event('Press 3, examination'), x: 400 }])).toMatchObject([{ level: 0, flipped: false }])
  })

  it('rise a row when the next day is near', () => {
    const placed = lay([
      { event: event('Gauge G-03, calibration'), x: 150 },
      { event: event('Press 3, examination'), x: 290 },
    ])
    expect(placed.map(({ level }) => level)).toEqual([1, 0])
  })

  it('turn to the left at the end of the scale', () => {
    expect(lay([{ event: event('Gauge G-02, calibration'), x: 1150 }])).toMatchObject([{ flipped: true }])
  })

  it('never run into each other on the two lower rows', () => {
    fc.assert(
      fc.property(
        fc.array(fc.record({ x: fc.integer({ min: 40, max: 1180 }), length: fc.integer({ min: 3, max: 30 }) }), { maxLength: 12 }),
        (days) => {
          const placed = lay(days.map(({ x, length }) => ({ event: event('x'.repeat(length)), x })))
          expect(placed).toHaveLength(days.length)
          for (const level of [0, 1]) {
            const spans = placed
              .filter((one) => one.level === level)
              .map(
                ({ event: { label }, x, flipped }) =>
                  (flipped ? [x - 12 - label.length * 8, x - 12] : [x + 12, x + 12 + label.length * 8]) as [number, number],
              )
              .sort((a, b) => a[0] - b[0])
            spans.slice(1).forEach(([from], index) => expect(from).toBeGreaterThanOrEqual(spans[index]?.[1] ?? 0))
          }
        },
      ),
    )
  })
})

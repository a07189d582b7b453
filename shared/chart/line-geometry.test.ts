import { describe, expect, it } from 'vitest'
import { estimateTextWidth, hatch } from './drawing'
import type { DrawingItem, PathItem, TextItem } from './drawing'
import { lineFrame } from './line-frame'
import { lineDrawing, loadScale } from './line-geometry'
import type { LineChartSpec } from './line-geometry'
import { layOutNotes } from './line-notes'

const stages = [0, 25, 50, 75, 100].map((percent) => ({ percent, label: `${percent} %` }))

const spec: LineChartSpec = {
  width: 340,
  height: 620,
  stages,
  points: [
    { x: 0, y: 0, ux: 0, uy: 0 },
    { x: 0.44, y: 24.8, ux: 0.0001, uy: 0.0001 },
    { x: 0.89, y: 49.5, ux: 0.2, uy: 5 },
  ],
  fit: { slope: 0.0179, intercept: 0 },
  band: { low: 1.52, high: 1.95 },
  prediction: { y: 75, from: 1.25, to: 1.44, text: '1.25 to 1.44 mm', caption: 'Next: expect' },
  notes: [{ at: { x: 0.7, y: 36 }, tone: 'scribe', lines: ['2 % softer ± 8', 'than the stiffest step', 'limit 15 %'] }],
  xLabel: 'Bed middle less mean of pins',
  xUnit: 'mm',
  xMax: 2,
  yMax: 100,
}

const paths = (items: DrawingItem[]): PathItem[] => items.filter((item) => item.kind === 'path')
const words = (items: DrawingItem[]): TextItem[] => items.filter((item) => item.kind === 'text')

/** Height of the bar of uncertainty that is centred on a reading. */
function barHeight(of: LineChartSpec, index: number): number {
  const frame = lineFrame(of)
  const point = of.points[index]
  if (point === undefined) throw new Error('no such reading')
  const x = frame.x(point.x)
  const bar = paths(lineDrawing(of).items).find((item) => item.d.includes(`M${x} `) && item.d.includes('h13'))
  const [, from, to] = /M[\d.]+ ([\d.]+)V([\d.]+)$/.exec(bar?.d ?? '') ?? []
  return Number(to) - Number(from)
}

describe('the line', () => {
  it('draws uncertainty to scale, and never smaller than can be seen', () => {
    const frame = lineFrame(spec)
    expect(barHeight(spec, 1)).toBeCloseTo(6)
    expect(barHeight(spec, 2)).toBeCloseTo(2 * (frame.zero - frame.y(5)))
  })

  it('stands on the same scale of load as the ladder beside it', () => {
    const ladder = loadScale(spec.height, spec.yMax)
    const frame = lineFrame(spec)
    for (const stage of stages) expect(frame.y(stage.percent)).toBe(ladder.at(stage.percent))
  })

  it('runs solid through the readings and dashed beyond them', () => {
    const dashed = paths(lineDrawing(spec).items).filter((item) => item.dash === '9 5')
    expect(dashed).toHaveLength(1)
    const frame = lineFrame(spec)
    expect(dashed[0]?.d).toContain(`M${Math.round(frame.x(0.0179 * 49.5) * 100) / 100} `)
  })

  it('draws a step beyond its limit in red, with an octagon on it', () => {
    const stopped: LineChartSpec = {
      ...spec,
      points: [...spec.points, { x: 1.46, y: 74.8, ux: 0.01, uy: 0.6, mark: 'stop' }],
    }
    const items = paths(lineDrawing(stopped).items)
    expect(items.filter((item) => item.stroke === 'stop-line' && item.fill === 'stop')).toHaveLength(1)
    expect(paths(lineDrawing(spec).items).some((item) => item.fill === 'stop')).toBe(false)
  })

  it('chalks the next prediction from its low to its high end', () => {
    const frame = lineFrame(spec)
    const dimension = paths(lineDrawing(spec).items).find((item) => item.stroke === 'chalk' && item.d.includes('v20'))
    expect(dimension?.d).toContain(`M${frame.x(1.25)} `)
    expect(dimension?.d).toContain(`H${frame.x(1.44)}`)
  })

  it('names its axis with the unit', () => {
    expect(words(lineDrawing(spec).items).map((item) => item.text)).toContain('Bed middle less mean of pins, mm')
  })

  it.each([
    'Bed middle less mean of left pin and right pin',
    'Bed middle at its stiffener less mean of left pin in upright and right pin in upright',
  ])('keeps the name of its axis inside the picture: %s', (xLabel) => {
    const drawn = words(lineDrawing({ ...spec, width: 340, height: 620, xLabel }).items).filter(
      ({ text }) => `${xLabel}, mm`.includes(text) && text.length > 6,
    )
    expect(drawn.map(({ text }) => text).join(' ')).toBe(`${xLabel}, mm`)
    for (const { x, y, text, size } of drawn) {
      expect(x + estimateTextWidth(text, size, 400, true)).toBeLessThanOrEqual(340)
      expect(y).toBeLessThan(620)
    }
  })

  it('takes stages above the rating, and any number of them', () => {
    const above: LineChartSpec = { ...spec, yMax: 110, stages: [...stages, { percent: 110, label: '110 %' }] }
    const frame = lineFrame(above)
    expect(frame.y(110)).toBe(frame.top)
    expect(frame.y(100)).toBeGreaterThan(frame.top)
  })

  it('refuses a scale without an end', () => {
    expect(() => lineDrawing({ ...spec, yMax: 0 })).toThrow(RangeError)
    expect(() => lineDrawing({ ...spec, xMax: 0 })).toThrow(RangeError)
  })

  it.each([
    [340, 620],
    [490, 410],
    [390, 420],
  ])('keeps every word inside a picture of %d by %d', (width, height) => {
    const sized = { ...spec, width, height }
    for (const item of words(lineDrawing(sized).items)) {
      expect(item.x).toBeGreaterThanOrEqual(0)
      expect(item.x).toBeLessThanOrEqual(width)
      expect(item.y).toBeGreaterThan(0)
      expect(item.y).toBeLessThan(height)
    }
  })
})

describe('notes on the line', () => {
  const many: LineChartSpec = {
    ...spec,
    prediction: null,
    notes: [
      { at: { x: 1.46, y: 74.8 }, tone: 'scribe', mark: 'wait', lines: ['read 1.46 mm'] },
      { at: { x: 1.18, y: 62 }, tone: 'stop', lines: ['21 % softer ± 5', '47.5 kN/mm here'] },
      { at: { x: 0.02, y: 0 }, tone: 'scribe', lines: ['set 0.02 mm, released', 'limit 0.09 mm'] },
      { at: { x: 0.4, y: 20 }, tone: 'scribe', lines: ['one too many'] },
    ],
  }

  it('are three at most', () => {
    expect(layOutNotes(many, lineFrame(many))).toHaveLength(3)
  })

  it('never lie on each other', () => {
    const notes = layOutNotes(many, lineFrame(many))
    const spans = notes.map((note) => {
      const ys = note.rows.map((row) => row.y)
      return { side: note.anchor, top: Math.min(...ys) - 14, bottom: Math.max(...ys) }
    })
    spans.forEach((a, i) => {
      spans.slice(i + 1).forEach((b) => {
        if (a.side === b.side) expect(a.bottom < b.top || b.bottom < a.top).toBe(true)
      })
    })
  })

  it('point at what they speak of', () => {
    const frame = lineFrame(many)
    layOutNotes(many, frame).forEach((note, index) => {
      const tip = note.leader[note.leader.length - 1]
      const at = many.notes[index]?.at
      expect(tip).toBeDefined()
      expect(at).toBeDefined()
      if (tip !== undefined && at !== undefined) expect(Math.hypot(tip.x - frame.x(at.x), tip.y - frame.y(at.y))).toBeLessThan(10)
    })
  })
})

describe('hatching', () => {
  it('stays inside the outline it is cut to', () => {
    const square = [
      { x: 10, y: 10 },
      { x: 50, y: 10 },
      { x: 50, y: 40 },
      { x: 10, y: 40 },
    ]
    const numbers = [...hatch(square, 5).matchAll(/[ML]([\d.]+) ([\d.]+)/g)]
    expect(numbers.length).toBeGreaterThan(8)
    for (const [, x, y] of numbers) {
      expect(Number(x)).toBeGreaterThanOrEqual(10)
      expect(Number(x)).toBeLessThanOrEqual(50)
      expect(Number(y)).toBeGreaterThanOrEqual(10)
      expect(Number(y)).toBeLessThanOrEqual(40)
    }
  })
})

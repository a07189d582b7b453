import { describe, expect, it } from 'vitest'
import { toSI } from '../units'
import type { RamInput } from './ram'
import { areaToleranceOfBore, crossCheckRam, deliveredAtLeast, pistonArea, ramForce } from './ram'

const plain = (area: number): RamInput => ({
  area,
  relativeAreaTolerance: 0,
  rodArea: 0,
  springReturn: 0,
  springReturnTolerance: 0,
  carriedWeight: 0,
  carriedWeightTolerance: 0,
})

describe('ram force', () => {
  it('adds rams, takes off springs and rod side, adds what comes down with the ram', () => {
    const springy = { ...plain(0.002), springReturn: 300, carriedWeight: 120, rodArea: 0.0005 }
    const force = ramForce([
      { ram: springy, pressure: 1e7, rodPressure: 2e5 },
      { ram: plain(0.001), pressure: 2e7, rodPressure: 0 },
    ])
    expect(force).toBeCloseTo(20000 - 100 - 300 + 120 + 20000, 9)
  })

  it('takes off a weight that the ram lifts', () => {
    expect(ramForce([{ ram: { ...plain(0.001), carriedWeight: -50 }, pressure: 0, rodPressure: 0 }])).toBe(-50)
  })

  it('says what is delivered at least', () => {
    expect(deliveredAtLeast(100)).toBe(95)
    expect(deliveredAtLeast(100, 0.02)).toBe(98)
  })

  it('turns a bore into an area and its tolerance', () => {
    expect(pistonArea(2)).toBeCloseTo(Math.PI, 15)
    expect(areaToleranceOfBore(0.05, 0.0001)).toBeCloseTo(0.004, 15)
    expect(() => pistonArea(0)).toThrow(/above zero/)
  })
})

describe('cross-check of a ram', () => {
  const area = pistonArea(0.05)
  const ratedPressure = toSI({ text: '54.4', unit: 'MPa' })

  it('is content within three percent', () => {
    const check = crossCheckRam({ ratedCapacity: ratedPressure * area * 1.029, ratedPressure, area })
    expect(check.consistent).toBe(true)
    expect(check.readings).toEqual([])
  })

  it('proposes a smaller ton than marked when that one fits, with the bore and pressure that would', () => {
    // 54.4 MPa on a 50 mm bore is 106.8 kN: twelve short tons, marked as twelve long tons.
    const ratedCapacity = toSI({ text: '12', unit: 'long-ton' })
    const check = crossCheckRam({ ratedCapacity, ratedPressure, area, markedUnit: 'long-ton' })
    expect(check.consistent).toBe(false)
    expect(check.ratio).toBeCloseTo(1.1194, 3)
    const tons = check.readings.filter((reading) => reading.kind === 'ton')
    expect(tons).toHaveLength(1)
    expect(tons[0]).toMatchObject({ unit: 'short-ton' })
    expect(tons[0]?.capacity).toBeCloseTo(toSI({ text: '12', unit: 'short-ton' }), 6)
    const bore = check.readings.find((reading) => reading.kind === 'bore')
    expect(pistonArea(bore?.bore ?? 1) * ratedPressure).toBeCloseTo(ratedCapacity, 6)
    const pressure = check.readings.find((reading) => reading.kind === 'rated-pressure')
    expect((pressure?.pressure ?? 0) * area).toBeCloseTo(ratedCapacity, 6)
  })

  it('never proposes a larger ton than marked', () => {
    const capacityInLongTons = toSI({ text: '12', unit: 'long-ton' })
    const check = crossCheckRam({
      ratedCapacity: toSI({ text: '12', unit: 'short-ton' }),
      ratedPressure: capacityInLongTons / area,
      area,
      markedUnit: 'short-ton',
    })
    expect(check.consistent).toBe(false)
    expect(check.readings.map((reading) => reading.kind)).toEqual(['bore', 'rated-pressure'])
  })

  it('proposes no ton where the rating was marked in kilonewtons', () => {
    const ratedCapacity = ratedPressure * area * 1.12
    const check = crossCheckRam({ ratedCapacity, ratedPressure, area, markedUnit: 'kN' })
    expect(check.readings.some((reading) => reading.kind === 'ton')).toBe(false)
  })

  it('refuses a value that is not above zero', () => {
    expect(() => crossCheckRam({ ratedCapacity: 1, ratedPressure: 0, area })).toThrow(RangeError)
  })
})

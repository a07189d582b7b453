import { describe, expect, it } from 'vitest'
import type { RamInput } from './ram'
import { addForces, deflectionUncertainty, forceUncertainty, loadCellUncertainty } from './uncertainty'

const ram: RamInput = {
  area: 0.002,
  relativeAreaTolerance: 0.004,
  rodArea: 0.0005,
  springReturn: 400,
  springReturnTolerance: 100,
  carriedWeight: 150,
  carriedWeightTolerance: 20,
}

describe('uncertainty of force', () => {
  it('combines gauge, reading, bore, springs and weight as the root of squares', () => {
    const result = forceUncertainty({ rams: [ram], pressure: 2e7, errorLimit: 6e5, readableIncrement: 2e5 })
    const parts = [0.002 * 6e5, 0.002 * 1e5, 2e7 * 0.002 * 0.004, 100, 20]
    const u = Math.sqrt(parts.reduce((sum, part) => sum + (part * part) / 3, 0))
    expect(result.force).toBeCloseTo(39750, 9)
    expect(result.u).toBeCloseTo(u, 9)
    expect(result.U).toBe(2 * result.u)
    expect(result.k).toBe(2)
    expect(result.budget.map((line) => line.value)).toEqual(parts.map((part) => expect.closeTo(part, 9)))
    expect(result.budget.reduce((sum, line) => sum + line.share, 0)).toBeCloseTo(1, 12)
    expect(result.uIndependent).toBeCloseTo(200 / Math.sqrt(3), 9)
  })

  it('takes a certificate in place of the class, with an error that is not corrected for', () => {
    const certificate = { U: 1e5, k: 2, uncorrectedError: 2e5 }
    const result = forceUncertainty({ rams: [ram], pressure: 2e7, errorLimit: 6e5, certificate, readableIncrement: 0 })
    const parts = [(0.002 * 1e5) / 2, (0.002 * 2e5) / Math.sqrt(3), 160 / Math.sqrt(3), 100 / Math.sqrt(3), 20 / Math.sqrt(3)]
    expect(result.u).toBeCloseTo(Math.hypot(...parts), 9)
    expect(result.budget[0]).toMatchObject({ name: 'gauge (certificate)', distribution: 'normal' })
    expect(result.uIndependent).toBe(0)
    expect(() => forceUncertainty({ rams: [ram], pressure: 1, errorLimit: 1, certificate: { U: 1, k: 0 }, readableIncrement: 1 })).toThrow(
      /coverage factor/,
    )
  })

  it('counts one gauge’s error in full on every ram that it reads', () => {
    const bare = { ...ram, relativeAreaTolerance: 0, springReturnTolerance: 0, carriedWeightTolerance: 0 }
    const one = forceUncertainty({ rams: [bare], pressure: 2e7, errorLimit: 6e5, readableIncrement: 0 })
    const two = forceUncertainty({ rams: [bare, bare], pressure: 2e7, errorLimit: 6e5, readableIncrement: 0 })
    expect(two.u).toBeCloseTo(2 * one.u, 9)
    const isolated = addForces([one, one])
    expect(isolated.force).toBeCloseTo(2 * one.force, 9)
    expect(isolated.u).toBeCloseTo(Math.SQRT2 * one.u, 9)
    expect(isolated.budget.map((line) => line.name)).toEqual(['gauge, manifold 1', 'gauge, manifold 2'])
  })

  it('takes off what the rod side pushes back', () => {
    const result = forceUncertainty({ rams: [ram], pressure: 2e7, rodPressure: 1e6, errorLimit: 6e5, readableIncrement: 0 })
    expect(result.force).toBeCloseTo(39250, 9)
  })

  it('reads a load cell as it stands', () => {
    const result = loadCellUncertainty({ reading: 50000, errorLimit: 300, increment: 100 })
    expect(result.force).toBe(50000)
    expect(result.u).toBeCloseTo(Math.hypot(300, 50) / Math.sqrt(3), 9)
    expect(result.uIndependent).toBeCloseTo(50 / Math.sqrt(3), 9)
  })
})

describe('uncertainty of a deflection', () => {
  it('counts the datum as a reading of its own', () => {
    const result = deflectionUncertainty({ increment: 0.00001, terms: [1, -1] })
    expect(result.u).toBeCloseTo((Math.SQRT2 * 0.000005) / Math.sqrt(3), 15)
    expect(result.budget).toHaveLength(1)
  })

  it('weighs combined points by their sensitivities', () => {
    const terms = [1, -0.5, -0.5, -1, 0.5, 0.5]
    const result = deflectionUncertainty({ increment: 0.00001, errorLimit: 0.00002, terms })
    expect(result.U).toBeCloseTo(2 * Math.sqrt((3 * (0.000005 ** 2 + 0.00002 ** 2)) / 3), 15)
  })

  it('takes an indicator of its own for one of the points', () => {
    const terms = [1, -1, { sensitivity: -1, increment: 0.0001, errorLimit: 0.00005 }]
    const result = deflectionUncertainty({ increment: 0.00001, terms })
    const squares = 2 * 0.000005 ** 2 + 0.00005 ** 2 + 0.00005 ** 2
    expect(result.u).toBeCloseTo(Math.sqrt(squares / 3), 15)
  })
})

import { describe, expect, it } from 'vitest'
import { storedEnergy } from './stored-energy'

describe('stored energy', () => {
  const press = { force: 106000, opening: 0.004, pressure: 54e6, oilVolume: 0.0004, bulkModulus: 1.5e9 }

  it('is the frame’s and the oil’s', () => {
    const energy = storedEnergy(press)
    expect(energy.frame).toBeCloseTo(212, 9)
    expect(energy.oil).toBeCloseTo(388.8, 9)
    expect(energy.total).toBeCloseTo(600.8, 9)
    expect(energy.massDroppedOneMetre * 9.80665).toBeCloseTo(600.8, 9)
  })

  it('takes stiff oil unless told, so that the figure is the least', () => {
    const { bulkModulus, ...rest } = press
    expect(storedEnergy(rest).oil).toBeLessThan(storedEnergy({ ...rest, bulkModulus }).oil)
  })

  it('refuses values below zero', () => {
    expect(() => storedEnergy({ ...press, opening: -0.001 })).toThrow(/below zero/)
    expect(() => storedEnergy({ ...press, bulkModulus: 0 })).toThrow(/bulk modulus/)
  })
})

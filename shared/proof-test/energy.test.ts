import { expect, it } from 'vitest'
import { recordedTest } from '../../tests/factories/recorded-test'
import { energyAt, oilVolume } from './energy'
import { evaluateTest } from './evaluate'

const { state } = recordedTest()

it('counts the oil of the stroke that is out: area times stroke times its share', () => {
  // 50 mm bore, 150 mm stroke, 40 % out: π·0.05²/4·0.15·0.4 m³.
  expect(state.opened && oilVolume(state.opened, '40')).toBeCloseTo(Math.PI * 0.025 ** 2 * 0.15 * 0.4, 12)
  expect(state.opened && oilVolume(state.opened, undefined)).toBe(0)
})

it('adds frame and oil, by hand', () => {
  const pressure = 7850 * 6894.757293168
  const force = pressure * Math.PI * 0.025 ** 2
  const energy = energyAt(state, { force, opening: 0.00177, pressure })
  expect(energy?.frame).toBeCloseTo((force * 0.00177) / 2, 6)
  expect(energy?.oil).toBeCloseTo((pressure ** 2 * Math.PI * 0.025 ** 2 * 0.15 * 0.4) / (2 * 1.7e9), 6)
  expect(evaluateTest(state).energy?.total).toBeGreaterThan(energy?.frame ?? 0)
})

it('has none below zero load', () => {
  expect(energyAt(state, { force: -1, opening: 0, pressure: 0 })).toBeNull()
})

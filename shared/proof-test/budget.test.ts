import { describe, expect, it } from 'vitest'
import { recordedTest } from '../../tests/factories/recorded-test'
import { budgetTexts, fullestForce } from './budget'
import { evaluateTest } from './evaluate'

describe('the budget of a force', () => {
  const fullest = fullestForce(evaluateTest(recordedTest().state))

  it('is that of the fullest stage', () => {
    expect(fullest?.percent).toBe(100)
    // 7 850 psi on a 50 mm bore, by hand.
    expect(fullest?.force.force).toBeCloseTo(7850 * 6894.757293168 * Math.PI * 0.025 ** 2, 1)
  })

  it('adds up: the squares of its lines are the square of u, and its shares are the whole', () => {
    const { force } = fullest ?? {}
    if (!force) throw new Error('The test reached full load.')
    expect(Math.hypot(...force.budget.map((line) => line.u))).toBeCloseTo(force.u, 6)
    expect(force.budget.reduce((sum, line) => sum + line.share, 0)).toBeCloseTo(1, 9)
    const shown = budgetTexts(force)
    expect(shown.map((line) => Number(line.u))).toEqual([...shown.map((line) => Number(line.u))].sort((a, b) => b - a))
  })

  it('is null before any stage was read', () => {
    expect(fullestForce(evaluateTest(recordedTest({ until: 'seated' }).state))).toBeNull()
  })
})

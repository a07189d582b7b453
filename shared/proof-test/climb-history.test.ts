import { describe, expect, it } from 'vitest'
import { firstClimb, recordedTest, stoppedTest } from '../../tests/factories/recorded-test'
import { evaluateTest } from './evaluate'
import { historyOf } from './climb-history'

describe('what a test adds to the history of its press', () => {
  it('is the stiffness of its line with what the line can tell, set and pressure loss against their limits', () => {
    const { state } = recordedTest({ climbs: [firstClimb] })
    const [climb] = historyOf(state)
    const [evaluated] = evaluateTest(state).climbs
    expect(climb?.stiffness).toBeCloseTo(1 / (evaluated?.fit?.slope ?? Number.NaN), 0)
    expect(climb?.stiffnessU).toBeGreaterThan(0)
    expect(climb?.set).not.toBeNull()
    expect(climb?.setLimit).not.toBeNull()
    expect(climb?.pressureLossLimit).not.toBeNull()
    expect(climb?.line.map(({ percent }) => percent)).toEqual([0, 25, 50, 75, 100])
  })

  it('claims no uncertainty for a line that was cut short: with few readings the scatter can be nothing by chance', () => {
    const { state } = stoppedTest()
    const [climb] = historyOf(state)
    expect(evaluateTest(state).climbs[0]?.fit?.dof).toBeLessThan(3)
    expect(climb?.stiffness).toBeGreaterThan(0)
    expect(climb?.stiffnessU).toBeNull()
  })
})

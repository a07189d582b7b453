import { describe, expect, it } from 'vitest'
import { stepStiffness } from './softening'

const climb = (readings: [force: number, deflection: number][], uForce = 100, uDeflection = 5e-6) =>
  stepStiffness(readings.map(([force, deflection]) => ({ force, deflection, uForce, uDeflection })))

describe('softening', () => {
  it('compares each step with the stiffest earlier one', () => {
    // 40, 50, 47.6 and 40 kN/mm: the first step is soft from slack.
    const steps = climb([
      [0, 0],
      [20000, 0.0005],
      [40000, 0.0009],
      [60000, 0.00132],
      [80000, 0.00182],
    ])
    expect(steps.map((step) => step.reference)).toEqual([null, 0, 1, 1])
    expect(steps[1]?.softening).toBeCloseTo(-0.25, 9)
    expect(steps[2]?.softening).toBeCloseTo(1 - 20 / 21, 9)
    expect(steps[3]?.softening).toBeCloseTo(0.2, 9)
    expect(steps[3]).toMatchObject({ from: 3, to: 4, stuck: false })
    expect(steps[3]?.stiffness).toBeCloseTo(4e7, 0)
  })

  it('keeps the first step as the reference while it is the stiffest', () => {
    const steps = climb([
      [0, 0],
      [20000, 0.0004],
      [40000, 0.0009],
      [60000, 0.0015],
    ])
    expect(steps.map((step) => step.reference)).toEqual([null, 0, 0])
    expect(steps[2]?.softening).toBeCloseTo(1 / 3, 9)
  })

  it('counts a reading that two steps share once, with its sign', () => {
    const [, second] = climb(
      [
        [0, 0],
        [20000, 0.0005],
        [40000, 0.001],
      ],
      0,
      5e-6,
    )
    // Equal steps of Δ: s = 1 − Δ₁/Δ₂ in deflection; sensitivities 1/Δ·(1, −2, 1).
    expect(second?.U).toBeCloseTo((2 * Math.sqrt(6) * 5e-6) / 0.0005, 9)
    const apart = climb(
      [
        [0, 0],
        [20000, 0.0005],
        [40000, 0.0011],
        [60000, 0.0016],
      ],
      0,
      5e-6,
    )[2]
    // Steps that share nothing: sensitivities 1/Δ·(1, −1) twice.
    expect(apart?.U).toBeCloseTo((2 * Math.sqrt(4) * 5e-6) / 0.0005, 9)
  })

  it('does not move when gauge gain or bore are wrong by the same share throughout', () => {
    const readings: [number, number][] = [
      [0, 0],
      [20000, 0.0005],
      [40000, 0.00095],
      [60000, 0.0015],
    ]
    const right = climb(readings)
    const wrong = climb(
      readings.map(([force, deflection]) => [force * 1.03, deflection]),
      103,
    )
    expect(wrong[2]?.softening).toBeCloseTo(right[2]?.softening ?? 0, 12)
    expect(wrong[2]?.U).toBeCloseTo(right[2]?.U ?? 0, 12)
  })

  it('says that an indicator is stuck and takes it as no reference', () => {
    const steps = climb([
      [0, 0],
      [20000, 0.0005],
      [40000, 0.0005],
      [60000, 0.0012],
      [80000, 0.0011],
    ])
    expect(steps[1]).toMatchObject({ stiffness: Infinity, stuck: true, softening: null, U: null, reference: null })
    expect(steps[2]?.reference).toBe(0)
    expect(steps[3]?.stuck).toBe(true)
  })

  it('takes load that falls while the frame goes on moving as softening above one', () => {
    const steps = climb([
      [0, 0],
      [20000, 0.0005],
      [19000, 0.0009],
    ])
    expect(steps[1]?.stiffness).toBeLessThan(0)
    expect(steps[1]?.softening).toBeGreaterThan(1)
  })

  it('says nothing of a step down', () => {
    const steps = climb([
      [0, 0],
      [20000, 0.0005],
      [10000, 0.0003],
      [30000, 0.0009],
    ])
    expect(steps[1]).toMatchObject({ stiffness: Number.NaN, stuck: false, softening: null, reference: null })
    expect(steps[2]?.reference).toBe(0)
  })

  it('has no steps without two points', () => {
    expect(climb([[0, 0]])).toEqual([])
    expect(climb([])).toEqual([])
  })
})

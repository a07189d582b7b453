import { describe, expect, it } from 'vitest'
import { deflectionUncertainty, forceUncertainty } from '#shared/hydraulics/uncertainty'
import { stepStiffness } from '#shared/statistics/softening'
import reference from '../../fixtures/reference/uncertainty.json'
import { comparedWith } from '../support/outside-values'
import { seededRandom, simulate } from './seeded-random'

const TRIALS = 1_000_000
const MONTE_CARLO = 'Monte-Carlo, seeded (JCGM 101:2008)'

const ram = {
  area: 0.0019635,
  relativeAreaTolerance: 0.008,
  rodArea: 0,
  springReturn: 800,
  springReturnTolerance: 300,
  carriedWeight: 250,
  carriedWeightTolerance: 60,
}

describe('uncertainty of force against Monte-Carlo (JCGM 101:2008, 7.2 and 8.1; 10⁶ seeded trials)', () => {
  const pressure = 54e6
  const errorLimit = 7e5
  const readableIncrement = 5e5

  it('one ram: the standard deviation of the trials within one percent, and U covers 95 %', () => {
    const result = forceUncertainty({ rams: [ram], pressure, errorLimit, readableIncrement })
    const random = seededRandom(20101)
    const trials = simulate(
      TRIALS,
      () => {
        const trueness = pressure + random.rectangular(errorLimit) + random.rectangular(readableIncrement / 2)
        // The bore itself is drawn, and squared in full: the check doesn't share the program's first order.
        const area = ram.area * (1 + random.rectangular(ram.relativeAreaTolerance / 2)) ** 2
        const springs = ram.springReturn + random.rectangular(ram.springReturnTolerance)
        return trueness * area - springs + ram.carriedWeight + random.rectangular(ram.carriedWeightTolerance)
      },
      { value: result.force, U: result.U },
    )
    expect(comparedWith(MONTE_CARLO, result.u, trials.sd)).toBeLessThan(0.01)
    expect(Math.abs(trials.mean - result.force)).toBeLessThan(0.01 * result.u)
    expect(trials.covered).toBeGreaterThan(0.95)
  })

  it('two rams on one manifold with a certificate: one gauge error acts on both', () => {
    const second = { ...ram, area: 0.0028274, springReturnTolerance: 0 }
    const certificate = { U: 5e5, k: 2, uncorrectedError: 3e5 }
    const rams = [ram, second]
    const result = forceUncertainty({ rams, pressure, errorLimit, certificate, readableIncrement })
    const random = seededRandom(20102)
    const trials = simulate(
      TRIALS,
      () => {
        const trueness =
          pressure +
          random.normal(certificate.U / certificate.k) +
          random.rectangular(certificate.uncorrectedError) +
          random.rectangular(readableIncrement / 2)
        return rams.reduce((force, each) => {
          const area = each.area * (1 + random.rectangular(each.relativeAreaTolerance / 2)) ** 2
          const springs = each.springReturn + random.rectangular(each.springReturnTolerance)
          return force + trueness * area - springs + each.carriedWeight + random.rectangular(each.carriedWeightTolerance)
        }, 0)
      },
      { value: result.force, U: result.U },
    )
    expect(comparedWith(MONTE_CARLO, result.u, trials.sd)).toBeLessThan(0.01)
    expect(trials.covered).toBeGreaterThan(0.95)
  })
})

describe('uncertainty of deflection and softening against Monte-Carlo (JCGM 101:2008)', () => {
  it('middle less the mean of the ends, each less its datum', () => {
    const increment = 1e-5
    const errorLimit = 8e-6
    const terms = [1, -0.5, -0.5, -1, 0.5, 0.5]
    const result = deflectionUncertainty({ increment, errorLimit, terms })
    const random = seededRandom(20103)
    const trials = simulate(
      TRIALS,
      () => terms.reduce((sum, term) => sum + term * (random.rectangular(increment / 2) + random.rectangular(errorLimit)), 0),
      { value: 0, U: result.U },
    )
    expect(comparedWith(MONTE_CARLO, result.u, trials.sd)).toBeLessThan(0.01)
    expect(trials.covered).toBeGreaterThan(0.95)
  })

  // Neighbouring steps share a reading and the first shares the datum; steps two apart share nothing.
  const climb = [
    { force: 0, deflection: 0 },
    { force: 26500, deflection: 0.00062 },
    { force: 53000, deflection: 0.00112 },
    { force: 79500, deflection: 0.00164 },
    { force: 106000, deflection: 0.00223 },
  ].map((point) => ({ ...point, uForce: 120, uDeflection: 4e-6 }))

  it.each([
    { step: 1, reference: 0 },
    { step: 2, reference: 1 },
    { step: 3, reference: 1 },
  ])('softening of step $step against step $reference', ({ step, reference: expected }) => {
    const found = stepStiffness(climb)[step]
    if (!found || found.softening === null || found.U === null) throw new Error('There is no softening')
    expect(found.reference).toBe(expected)
    const random = seededRandom(20104 + step)
    const trials = simulate(
      TRIALS / 2,
      () => {
        // A gain of the gauge and an error of the bore, common to every reading, are drawn as well: they cancel.
        const gain = 1 + random.rectangular(0.02)
        const drawn = climb.map((point) => ({
          force: (point.force + random.normal(point.uForce)) * gain,
          deflection: point.deflection + random.normal(point.uDeflection),
        }))
        const stiffness = (index: number) => {
          const [before, after] = [drawn[index], drawn[index + 1]]
          return before && after ? (after.force - before.force) / (after.deflection - before.deflection) : Number.NaN
        }
        return 1 - stiffness(step) / stiffness(expected)
      },
      { value: found.softening, U: found.U },
    )
    expect(comparedWith(MONTE_CARLO, found.U, 2 * trials.sd)).toBeLessThan(0.01)
    expect(trials.covered).toBeGreaterThan(0.95)
    expect(Math.abs(trials.covered - 0.9545)).toBeLessThan(0.003)
  })
})

describe('uncertainty of force against the product rule (JCGM 100:2008, 5.1.6, equation 12, from memory)', () => {
  it('(u_F/F)² = (u_P/P)² + (2·u_d/d)² for a bare ram', () => {
    const bare = { ...ram, springReturn: 0, springReturnTolerance: 0, carriedWeight: 0, carriedWeightTolerance: 0 }
    const result = forceUncertainty({ rams: [bare], pressure: 5e7, errorLimit: 6e5, readableIncrement: 0 })
    const relative = Math.hypot(6e5 / Math.sqrt(3) / 5e7, bare.relativeAreaTolerance / Math.sqrt(3))
    expect(comparedWith('JCGM 100:2008, equation 12, from memory', result.u / result.force, relative)).toBeLessThan(1e-12)
  })

  it('EURACHEM/CITAC CG 4 (2012), 8.2.6, example 2 (from memory): the trials give the published u', () => {
    const example = reference.workedExamples[0]
    if (!example) throw new Error('The example is missing')
    const { o, p, q, r, published, computed } = example
    const random = seededRandom(20110)
    const draw = ([value = 0, u = 0]: number[]) => value + random.normal(u)
    const trials = simulate(TRIALS, () => (draw(o) * draw(p)) / (draw(q) * draw(r)), { value: computed.y, U: 2 * computed.u })
    // The seeded trials that check the program are themselves checked against a published result.
    const eurachem = 'EURACHEM/CITAC CG 4, example 2, from memory'
    expect(comparedWith(eurachem, Number(trials.sd.toFixed(3)), published.u)).toBe(0)
    expect(comparedWith(eurachem, Number(trials.mean.toFixed(2)), published.y)).toBe(0)
    expect(comparedWith(MONTE_CARLO, computed.u, trials.sd)).toBeLessThan(0.01)
  })
})

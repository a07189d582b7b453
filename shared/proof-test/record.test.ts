import { describe, expect, test } from 'vitest'
import { recordedTest, stoppedTest, twoLegTest } from '../../tests/factories/recorded-test'
import {
  cautionsOf,
  clearanceArithmetic,
  clearedLoad,
  criteriaHeading,
  frozenDifferences,
  headlineOf,
  joinWords,
  monthsAfter,
  placesTested,
  standingOf,
  staticLoadsOf,
} from './record'
import { evaluateTest } from './evaluate'
import type { ProofTestKind } from './entries'

const NO_BREAK = '\u00a0'

describe('the headline follows the ledger', () => {
  test.each<[ProofTestKind, string]>([
    ['opened', 'Under way. Nothing is concluded'],
    ['decided', 'Under way. Nothing is concluded'],
    ['concluded', 'Concluded accepted. Not signed'],
    ['signed', 'Concluded accepted. To countersign'],
    ['countersigned', `Accepted. Cleared up to 11.7${NO_BREAK}short tons`],
  ])('up to %s: %s', (until, words) => {
    const { state } = recordedTest({ until })
    expect(headlineOf(state, evaluateTest(state))).toBe(words)
  })

  test('a stop shows before and after the conclusion', () => {
    const whole = stoppedTest()
    const before = stoppedTest({ until: 'released' })
    expect(standingOf(before.state)).toBe('under way')
    expect(headlineOf(whole.state, evaluateTest(whole.state))).toBe('Rejected. Stopped at 75\u202f%')
    expect(clearedLoad(whole.state, evaluateTest(whole.state))).toBeNull()
  })

  test('an abandoned test clears nothing', () => {
    const { state } = recordedTest({ conclusion: 'abandoned', conclusionWhy: 'The light went.' })
    expect(headlineOf(state, evaluateTest(state))).toBe('Abandoned. Nothing is cleared')
    expect(clearedLoad(state, evaluateTest(state))).toBeNull()
  })
})

test('the cleared load names gauge, place, end and the number of static loads', () => {
  const { state } = recordedTest()
  expect(clearedLoad(state, evaluateTest(state))).toMatchObject({
    load: `11.7${NO_BREAK}short tons`,
    newton: `104.0${NO_BREAK}kN`,
    gauge: `Gauge G-02 not past 7\u202f650${NO_BREAK}psi`,
    where: 'Bed hole 4, ram central',
    until: '2027-03-15',
    by: 'Marit Sandoval',
    staticLoads: 2,
  })
  const { opened } = twoLegTest().state
  expect(opened && placesTested(opened)).toBe('Bed hole 4, ram far left and far right')
  expect(staticLoadsOf(evaluateTest(twoLegTest().state))).toBe(4)
  expect(state.opened && clearanceArithmetic(state.opened, evaluateTest(state))).toBe(
    `Lowest 11.79, less U 0.08${NO_BREAK}short tons, rounded down`,
  )
})

test('the criteria are headed by the worst of them', () => {
  expect(criteriaHeading(evaluateTest(recordedTest().state))).toBe('Within every limit checked')
  expect(criteriaHeading(evaluateTest(stoppedTest().state))).toMatch(/^Beyond (one|two|three) limits?$/)
  expect(criteriaHeading(evaluateTest(recordedTest({ until: 'stage-begun' }).state))).toBe('Not every limit was checked')
})

test('months after a day end on the last day of a shorter month', () => {
  expect(monthsAfter('2026-09-15T12:00:00Z', 6)).toBe('2027-03-15')
  expect(monthsAfter('2026-08-31T12:00:00Z', 6)).toBe('2027-02-28')
  expect(monthsAfter('2027-08-31T12:00:00Z', 6)).toBe('2028-02-29')
})

test('cautions name what nobody measured, and say how many static loads there were', () => {
  const { state } = recordedTest()
  const words = cautionsOf(state, evaluateTest(state)).join(' ')
  expect(words).toContain(
    'Two static loads say nothing of fatigue, cold, other bed holes, head beam, left upright and right upright (not measured)',
  )
  expect(words).toContain('oil under the skin is an emergency')
  const stopped = stoppedTest().state
  expect(cautionsOf(stopped, evaluateTest(stopped)).join(' ')).toContain('No load was held at full load.')
})

test('a frozen evaluation that today’s arithmetic repeats does not differ; one that was made otherwise does', () => {
  const { id, entries } = recordedTest({ observed: 'A click.' })
  expect(frozenDifferences(id, entries)).toEqual([])
  const other = entries.map((entry) =>
    entry.kind === 'concluded' ? { ...entry, payload: { ...entry.payload, evaluation: { criteria: [] } } } : entry,
  )
  expect(frozenDifferences(id, other).map(({ what }) => what)).toContain('Permanent set')
  expect(frozenDifferences(id, entries.slice(0, 10))).toEqual([])
})

test('words are joined as people write them', () => {
  expect([joinWords([]), joinWords(['a']), joinWords(['a', 'b']), joinWords(['a', 'b', 'c'])]).toEqual(['', 'a', 'a and b', 'a, b and c'])
})

import { expect, it } from 'vitest'
import { recordedTest, stoppedTest } from '../../tests/factories/recorded-test'
import { emptyProofTest, foldProofTest } from './apply'
import { summariseClimb } from './climb-summary'

/** The state just before the first entry that `ends` holds for. */
function before(ends: (kind: string, index: number) => boolean) {
  const { id, entries } = recordedTest()
  const end = entries.findIndex((entry, index) => ends(entry.kind, index))
  return foldProofTest(id, entries.slice(0, end))
}

function nth(kind: string, count: number) {
  let seen = 0
  return (candidate: string) => {
    if (candidate === kind) seen += 1
    return seen === count
  }
}

it('a test that has not begun to climb has every stage to come', () => {
  const summary = summariseClimb(before(nth('leg-begun', 1)))
  expect(summary.rungs.map((rung) => rung.state)).toEqual(['to-come', 'to-come', 'to-come', 'to-come'])
  expect(summary).toMatchObject({ datumAt: null, levelPercent: 0, loaded: false })
})

it('a stage is held from the mark of its first row', () => {
  // The next entry would be the second decision: the half is being held.
  const summary = summariseClimb(before(nth('decided', 2)))
  expect(summary.rungs.map((rung) => [rung.percent, rung.state])).toEqual([
    [25, 'went-on'],
    [50, 'now'],
    [75, 'to-come'],
    [100, 'to-come'],
  ])
  expect(summary.rungs[1]?.at).toBe('2026-09-15T10:24:00.000Z')
  expect(summary.datumAt).toBe('2026-09-15T10:02:00.000Z')
  expect(summary).toMatchObject({ levelPercent: 50, loaded: true })
})

it('a stopped test shows where it was stopped, and no stage above as reached', () => {
  const { id, entries } = stoppedTest()
  const summary = summariseClimb(foldProofTest(id, entries))
  expect(summary.rungs.map((rung) => rung.state)).toEqual(['went-on', 'went-on', 'stopped', 'to-come'])
  expect(summary).toMatchObject({ levelPercent: 0, loaded: false })
})

it('a ledger without entries has nothing to show', () => {
  expect(summariseClimb(emptyProofTest('01994a00-0007-7000-8000-000000000001'))).toEqual({
    datumAt: null,
    rungs: [],
    levelPercent: 0,
    loaded: false,
  })
})

import { describe, expect, it } from 'vitest'
import {
  firstClimb,
  recordedTest,
  repeatClimb,
  stoppedTest,
  twoLegTest,
  type RecordedTest,
  type TypedRow,
} from '../../tests/factories/recorded-test'
import type { LedgerEntry } from '../ledger/envelope'
import { findingsOf } from '../ledger/rules'
import { applyProofTest, emptyProofTest } from './apply'
import { decideProofTest } from './decide'
import { evaluateTest } from './evaluate'
import { nextStep } from './steps'
import type { ProofTestState } from './state'

function replay(test: RecordedTest): { entry: LedgerEntry; rules: string[]; says: string[] }[] {
  let state: ProofTestState = emptyProofTest(test.id)
  return test.entries.map((entry) => {
    const { kind, payload, overrides, authorId } = entry
    const mark = { at: entry.observedAt, bootId: entry.bootId, monotonicMs: entry.monotonicMs }
    const findings = findingsOf(decideProofTest(state, { kind, payload, overrides, authorId, mark }))
    state = applyProofTest(state, entry)
    return { entry, rules: findings.map((finding) => finding.rule), says: findings.map((finding) => finding.says) }
  })
}

const against = (test: RecordedTest) =>
  replay(test)
    .filter(({ rules }) => rules.length > 0)
    .map(({ entry, says }) => [entry.seq, entry.kind, ...says])

describe('a test that goes by the rules', () => {
  it('has no rule against any of its entries, from opened to countersigned', () => {
    expect(against(recordedTest())).toEqual([])
  })

  it('has none in two legs either', () => {
    expect(against(twoLegTest())).toEqual([])
  })

  it('has none when it is stopped and concluded rejected', () => {
    expect(against(stoppedTest())).toEqual([])
  })
})

/** The record's example without its slips of the pen, each of which for a moment says wait or stop. */
const clean = [firstClimb, repeatClimb].map((climb) => ({
  ...climb,
  stages: climb.stages.map(({ corrections = [], ...stage }) => {
    const fixed = (which: 'start' | 'end'): TypedRow =>
      corrections
        .filter((slip) => slip.row === which)
        .reduce<TypedRow>(
          (row, slip) => row.map((text, index) => (index === slip.column ? slip.to : text)) as unknown as TypedRow,
          stage[which],
        )
    return { ...stage, start: fixed('start'), end: fixed('end') }
  }),
}))

describe('the next step', () => {
  it('leads through the order of a test', () => {
    let state: ProofTestState = emptyProofTest('x')
    const steps: string[] = []
    for (const entry of recordedTest({ climbs: clean }).entries) {
      state = applyProofTest(state, entry)
      const { name } = nextStep(state)
      if (steps.at(-1) !== name) steps.push(name)
    }
    const stage = ['read-row', 'hold', 'decide']
    const full = ['read-row', 'hold', 'decide', 'release']
    const climb = [...stage, 'begin-stage', ...stage, 'begin-stage', ...stage, 'begin-stage', ...full]
    const opening = ['walk-down', 'set-up', 'begin-leg', 'seating', 'seating-release']
    const datum = ['datum', 'datum-watch', 'begin-stage']
    const ending = ['recovery', 'after-walk-down', 'conclude', 'sign', 'countersign', 'sealed']
    expect(steps).toEqual([...opening, ...datum, ...climb, 'recovery', ...datum, ...climb, ...ending])
  })

  it('after a stop asks for release, then for the conclusion, and never for load', () => {
    let state: ProofTestState = emptyProofTest('x')
    const after: string[] = []
    for (const entry of stoppedTest().entries) {
      state = applyProofTest(state, entry)
      if (state.stopped) after.push(nextStep(state).name)
    }
    expect(after).toEqual(['stopped-release', 'conclude', 'sign', 'countersign', 'sealed'])
  })
})

describe('what the readings come to', () => {
  it('clears to the lowest force of the full-load holds less its uncertainty, rounded down', () => {
    const { clearance, against: objections } = evaluateTest(recordedTest().state)
    expect(objections).toEqual([])
    expect(clearance?.unit).toBe('short-ton')
    // 7 750 psi on a 50 mm bore, by hand: 7750 × 6894.757 Pa × π × 0.05² / 4 = 104.92 kN.
    expect(clearance?.lowestForce).toBeCloseTo(7750 * 6894.757293168 * Math.PI * 0.025 ** 2, 0)
    const bound = ((clearance?.lowestForce ?? 0) - (clearance?.U ?? 0)) / 8896.443230521
    expect(Number(clearance?.text)).toBe(Math.floor(bound * 10) / 10)
  })
})

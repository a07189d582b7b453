import { describe, expect, it } from 'vitest'
import { ask, before, type Asked } from '../../tests/factories/asked'
import { recordedTest, stoppedTest } from '../../tests/factories/recorded-test'
import { ids } from '../../tests/factories/test-press'
import type { LedgerEntry } from '../ledger/envelope'
import { applyProofTest, emptyProofTest } from './apply'
import { correctionLetter, correctionLetters } from './corrections'
import type { Position, Reading } from './entries'
import { evaluateTest } from './evaluate'
import { evaluateClimb, type StageEvaluation } from './evaluate-climb'
import { nextStep } from './steps'
import type { ProofTestState } from './state'

interface Slip {
  row: string
  source?: string
  text: string
  both?: boolean
  unit?: 'mm' | 'psi'
}

/** The state with one more correction, as the ledger's next entry. */
function corrected(state: ProofTestState, { row, source = ids.middle, text, both = true, unit = 'mm' }: Slip): ProofTestState {
  const entry = {
    id: `${row.slice(0, -2)}${state.headSeq + 10}`,
    seq: state.headSeq + 1,
    kind: 'corrected',
    v: 1,
    payload: { entryId: row, sourceId: source, text, unit, why: 'Digits swapped.', readAgainByBoth: both },
    authorId: ids.lead,
    observedAt: '2026-09-14T11:00:00.000Z',
    attachments: [],
    overrides: [],
    bootId: ids.test,
    monotonicMs: 0,
    irregular: [],
    hash: 'f'.repeat(64),
  } as unknown as LedgerEntry
  return applyProofTest(state, entry)
}

const stageOf = (state: ProofTestState, stage: number): StageEvaluation => {
  const found = evaluateClimb(state, 0, 0)?.stages[stage]
  if (!found) throw new Error(`Stage ${stage} was not read.`)
  return found
}
const softening = (state: ProofTestState, stage: number) => stageOf(state, stage).criteria.find(({ id }) => id === 'softening')?.verdict
const rowOf = (state: ProofTestState, stage: number): string => state.legs[0]?.climbs[0]?.stages[stage]?.attempts[0]?.rows[0]?.entryId ?? ''

const isStartOf50 = ({ kind, payload }: LedgerEntry): boolean =>
  kind === 'row-read' &&
  payload['occasion'] === 'hold start' &&
  (payload['at'] as Position).stage === 1 &&
  (payload['at'] as Position).climb === 0

function withReading(entry: LedgerEntry, source: string, text: string): LedgerEntry {
  const readings = (entry.payload['readings'] as Reading[]).map((one) => (one.sourceId === source ? { ...one, text } : one))
  return { ...entry, payload: { ...entry.payload, readings } }
}

/** Up to a kind of entry of the test whose 75 % bends away: 1.82 mm, where 1.64 mm would be on the line. */
function bent(kind: string, nth = 0): ProofTestState {
  const { entries, id } = stoppedTest()
  const end = entries.filter((entry) => entry.kind === kind)[nth]
  return entries.filter(({ seq }) => seq < (end?.seq ?? 0)).reduce(applyProofTest, emptyProofTest(id))
}
/** Loaded at 75 %, its first row entered, nothing decided yet. */
const atBent = (): ProofTestState => bent('row-read', 5)
const straight = { text: '1.64' }

describe('a correction that would bring a reading back within its limit', () => {
  it('lifts the stop when lead and witness read it again at that load, before release', () => {
    const state = atBent()
    expect(nextStep(state).name).toBe('stop-now')
    const lifted = corrected(state, { row: rowOf(state, 2), ...straight })
    expect(lifted.corrections.at(-1)).toMatchObject({ atItsLoad: true, readAgainByBoth: true })
    expect(nextStep(lifted).name).toBe('hold')
    expect(softening(lifted, 2)).toBe('within')
  })

  it('lifts nothing when only one of them read it: the stop stands, and going on goes against it', () => {
    const state = atBent()
    const alone = corrected(state, { row: rowOf(state, 2), ...straight, both: false })
    expect(nextStep(alone).name).toBe('stop-now')
    expect(softening(alone, 2)).toBe('beyond')
    const at = alone.position ?? { leg: 0, climb: 0, stage: 2, attempt: 0 }
    const goOn = { kind: 'decided', payload: { at, decision: 'go-on', criteria: [] } } as unknown as Asked
    expect(ask(alone, goOn).rules).toContain('R32')
    // Both readings stand all the same, and both print.
    expect(stageOf(alone, 2).start?.row.readings.find(({ sourceId }) => sourceId === ids.middle)?.text).toBe('1.64')
  })

  it('lifts it after all once both have read it again there', () => {
    const state = atBent()
    const alone = corrected(state, { row: rowOf(state, 2), text: '1.65', both: false })
    expect(nextStep(corrected(alone, { row: rowOf(state, 2), ...straight })).name).toBe('hold')
  })

  it('lifts a wait by the same rule', () => {
    // The record's own example: the right pin of 50 % typed as 0.91 lies off the line.
    const { state } = before('corrected')
    expect(nextStep(state).name).toMatch(/wait|stop-now/)
    const slip = { row: rowOf(state, 1), source: ids.right, text: '0.19' }
    expect(nextStep(corrected(state, slip)).name).toBe('hold')
    expect(nextStep(corrected(state, { ...slip, both: false })).name).toBe(nextStep(state).name)
  })

  it('does not lift it after release, whoever read what: the stop stands', () => {
    const state = bent('concluded')
    expect(state.loaded).toBeNull()
    const late = corrected(state, { row: rowOf(state, 2), ...straight })
    expect(late.corrections.at(-1)).toMatchObject({ atItsLoad: false, underLoad: false })
    expect(late.stopped).toEqual(state.stopped)
    expect(softening(late, 2)).toBe('beyond')
    expect(evaluateTest(late).against).toEqual(expect.arrayContaining([expect.stringMatching(/^Softening/)]))
  })

  it('does not lift it after release either when nobody had called the stop', () => {
    const state = { ...bent('concluded'), stopped: null }
    const late = corrected(state, { row: rowOf(state, 2), ...straight })
    expect(evaluateTest(late).against).toEqual(expect.arrayContaining([expect.stringMatching(/^Softening/)]))
  })

  it('does not lift it at another load: 50 % is not read again at 75 %', () => {
    const { entries, id } = recordedTest()
    const at75 = entries.filter(({ kind }) => kind === 'row-read')[5]?.seq ?? 0
    const typed = entries
      .filter(({ seq }) => seq < at75)
      .map((entry) => (isStartOf50(entry) ? withReading(entry, ids.middle, '1.40') : entry))
    const state = typed.reduce(applyProofTest, emptyProofTest(id))
    expect(state.position?.stage).toBe(2)
    expect(softening(state, 1)).toBe('beyond')
    const late = corrected(state, { row: rowOf(state, 1), text: '1.08' })
    expect(late.corrections.at(-1)).toMatchObject({ atItsLoad: false, underLoad: true, readAgainByBoth: true })
    expect(softening(late, 1)).toBe('beyond')
  })

  it('lifts a set beyond its limit only when both read it again', () => {
    const { state } = before('joint-examined', { where: (entry) => entry.payload['occasion'] === 'after load' })
    const row = state.legs[0]?.climbs.at(-1)?.set.at(-1)
    const set = row?.entryId ?? ''
    const read = row?.typed.find(({ sourceId }) => sourceId === ids.middle)?.text ?? ''
    const verdict = (of: ProofTestState) => evaluateTest(of).criteria.find(({ id }) => id === 'set')?.verdict
    expect(verdict(state)).toBe('within')
    const beyond = corrected(state, { row: set, text: '0.80' })
    expect(verdict(beyond)).toBe('beyond')
    expect(verdict(corrected(beyond, { row: set, text: read, both: false }))).toBe('beyond')
    expect(verdict(corrected(beyond, { row: set, text: read }))).toBe('within')
  })
})

describe('a correction of the gauge at full load', () => {
  it('raises no clearance after release, and lowers it', () => {
    const { entries, id, state } = recordedTest({ until: 'concluded' })
    const full = state.legs[0]?.climbs[0]?.stages[3]?.attempts[0]?.rows.at(-1)
    const row = full?.entryId ?? ''
    const load = (of: ProofTestState): number => evaluateTest(of).clearance?.load ?? 0
    const gauge = { row, source: ids.gauge, unit: 'psi' as const }
    expect(load(corrected(state, { ...gauge, text: '7000' }))).toBeLessThan(load(state))

    const typedLow = entries.map((entry) => (entry.id === row ? withReading(entry, ids.gauge, '7000') : entry))
    const low = typedLow.reduce(applyProofTest, emptyProofTest(id))
    expect(load(low)).toBeLessThan(load(state))
    const raised = corrected(low, { ...gauge, text: '7750' })
    expect(raised.corrections.at(-1)).toMatchObject({ readAgainByBoth: true, atItsLoad: false })
    expect(load(raised)).toBe(load(low))
  })
})

describe('a correction that brings a reading beyond its limit', () => {
  it('counts, read again or not, under load', () => {
    for (const both of [true, false]) {
      const { state } = before('decided', { nth: 2 })
      expect(nextStep(state).name).toBe('decide')
      const beyond = corrected(state, { row: rowOf(state, 2), text: '1.82', both })
      expect(softening(beyond, 2)).toBe('beyond')
      expect(nextStep(beyond).name).toBe('stop-now')
    }
  })

  it('counts after release too: the test can no longer be accepted', () => {
    const { state } = before('concluded')
    expect(evaluateTest(state).against).toEqual([])
    const beyond = corrected(state, { row: rowOf(state, 2), text: '1.82', both: false })
    expect(evaluateTest(beyond).against).toEqual(expect.arrayContaining([expect.stringMatching(/^Softening/)]))
    const accept = { kind: 'concluded', payload: { conclusion: 'accepted', why: '', evaluation: {}, coreVersion: '1' } } as unknown as Asked
    expect(ask(beyond, accept).rules).toContain('R42')
  })
})

describe('the letters of corrections', () => {
  it('run through all of a test, and past the alphabet', () => {
    expect([0, 1, 25, 26, 27, 52].map(correctionLetter)).toEqual(['a', 'b', 'z', 'aa', 'ab', 'ba'])
    const { state } = recordedTest()
    expect(state.corrections.map(({ correctsEntryId }) => correctionLetters(state, [correctsEntryId]))).toEqual(['a', 'b'])
    expect(correctionLetters(state, [])).toBe('')
  })
})

import { describe, expect, test } from 'vitest'
import { checkChain } from '#shared/ledger/chain'
import { ledgerEntrySchema } from '#shared/ledger/envelope'
import { PROOF_TEST_PAYLOADS, type ProofTestKind } from '#shared/proof-test/entries'
import { evaluateTest } from '#shared/proof-test/evaluate'
import { recordedTest, stoppedTest, storedEntries, twoLegTest } from '../factories/recorded-test'

const all = { whole: recordedTest(), stopped: stoppedTest(), twoLeg: twoLegTest() }

describe.each(Object.entries(all))('the recorded test "%s"', (_name, { entries }) => {
  test('is one unbroken chain', () => {
    expect(checkChain(storedEntries(entries))).toMatchObject({ whole: true, entries: entries.length })
  })

  test('holds only entries that the shared schemas take', () => {
    for (const entry of entries) {
      expect(ledgerEntrySchema.safeParse(entry).error).toBeUndefined()
      expect(PROOF_TEST_PAYLOADS[entry.kind as ProofTestKind].safeParse(entry.payload).error).toBeUndefined()
    }
  })
})

test('a whole test is countersigned, accepted, and nothing stands against it', () => {
  const { state } = all.whole
  expect(evaluateTest(state).against).toEqual([])
  expect(evaluateTest(state).clearance).toMatchObject({ text: '11.7', gaugePressure: { text: '7650', unit: 'psi' } })
  expect(state.conclusion?.conclusion).toBe('accepted')
  expect(state.countersigned).not.toBeNull()
  expect(state.corrections).toHaveLength(2)
})

test('the stopped one stops at 75 % and is rejected', () => {
  expect(all.stopped.state.stopped).toMatchObject({ cause: 'criterion', atPercent: 75 })
  expect(all.stopped.state.conclusion?.conclusion).toBe('rejected')
})

test('two legs each have a climb, a set and a repeat', () => {
  expect(all.twoLeg.state.legs.map((leg) => leg.climbs.length)).toEqual([2, 2])
  expect(evaluateTest(all.twoLeg.state).against).toEqual([])
})

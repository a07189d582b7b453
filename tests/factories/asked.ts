import type { LedgerEntry } from '#shared/ledger/envelope'
import { findingsOf } from '#shared/ledger/rules'
import { applyProofTest, emptyProofTest } from '#shared/proof-test/apply'
import { decideProofTest } from '#shared/proof-test/decide'
import type { Mark, ProofTestDraft } from '#shared/proof-test/entries'
import type { ProofTestQuestion } from '#shared/proof-test/rule'
import type { ProofTestState } from '#shared/proof-test/state'
import { recordedTest, type RecordedTestOptions } from './recorded-test'
import { ids } from './test-press'

/** The state just before the n-th entry of a kind in the record's example, and that entry. */
export function before(kind: string, options: RecordedTestOptions & { nth?: number; where?: (entry: LedgerEntry) => boolean } = {}) {
  const { nth = 0, where = () => true, ...rest } = options
  const { entries, id } = recordedTest(rest)
  const found = entries.filter((entry) => entry.kind === kind && where(entry))[nth]
  if (!found) throw new Error(`No ${kind} in this test.`)
  const state = entries.filter((entry) => entry.seq < found.seq).reduce(applyProofTest, emptyProofTest(id))
  return { state, entry: found }
}

export type Asked = ProofTestDraft & Partial<Omit<ProofTestQuestion, 'state' | 'kind' | 'payload'>>

export function ask(state: ProofTestState, asked: Asked, at?: Mark) {
  const mark = at ?? asked.mark ?? state.lastMark ?? { at: '2026-09-14T15:20:00.000Z', bootId: ids.test, monotonicMs: 0 }
  const decision = decideProofTest(state, { overrides: [], authorId: ids.lead, ...asked, payload: asked.payload, mark })
  return {
    outcome: decision.outcome,
    rules: findingsOf(decision).map((finding) => finding.rule),
    says: findingsOf(decision)
      .map((finding) => finding.says)
      .join(' '),
  }
}

export const markOf = (entry: LedgerEntry): Mark => ({ at: entry.observedAt, bootId: entry.bootId, monotonicMs: entry.monotonicMs })
export const asEntered = (entry: LedgerEntry) =>
  ({ kind: entry.kind, payload: entry.payload, authorId: entry.authorId, mark: markOf(entry) }) as unknown as Asked
export const later = (mark: Mark, seconds: number): Mark => ({
  ...mark,
  at: new Date(Date.parse(mark.at) + seconds * 1000).toISOString(),
  monotonicMs: mark.monotonicMs + seconds * 1000,
})
export const withJoint = (state: ProofTestState, number: number, change: Partial<ProofTestState['joints'][number]>): ProofTestState => ({
  ...state,
  joints: state.joints.map((joint) => (joint.joint.number === number ? { ...joint, ...change } : joint)),
})
export const jointId = (state: ProofTestState, number: number): string =>
  state.joints.find((joint) => joint.joint.number === number)?.joint.id ?? ''
export const examined = (state: ProofTestState, number: number, more: object = {}) =>
  ({
    kind: 'joint-examined',
    payload: {
      occasion: 'before load',
      jointId: jointId(state, number),
      method: 'visual',
      result: 'accepted',
      remark: '',
      cold: true,
      ...more,
    },
  }) as Asked

import { describe, expect, it } from 'vitest'
import { openedPayload } from '../../tests/factories/test-press'
import { testId } from '../../tests/factories/ledger-builder'
import type { LedgerEntry } from '../ledger/envelope'
import { findingsOf } from '../ledger/rules'
import { applyPress, emptyPress } from './apply'
import { decidePress, type PressQuestion } from './decide'
import type { PressDraft } from './entries'
import type { PressState } from './state'

const { press: description, joints } = openedPayload()
const id = testId(0x2, 7)
const test = { proofTestId: testId(0x7, 9), number: 'PT-0009' }
const registered: PressDraft = { kind: 'registered', payload: { description, joints, lastWorkedOn: null } }

function entry(state: PressState, draft: PressDraft): LedgerEntry {
  const seq = state.headSeq + 1
  return {
    id: testId(0xe, seq),
    ledgerId: id,
    kind: draft.kind,
    v: 1,
    payload: draft.payload,
    authorId: testId(9, 1),
    deviceId: testId(0xd, 1),
    deviceSeq: seq,
    basedOnSeq: seq - 1,
    observedAt: '2026-09-14T10:00:00.000Z',
    bootId: testId(0xd, 2),
    monotonicMs: seq,
    attachments: [],
    overrides: [],
    seq,
    receivedAt: '2026-09-14T10:00:00.000Z',
    irregular: [],
    prevHash: state.headHash,
    hash: String(seq).padStart(64, '0'),
  }
}

const fold = (...drafts: PressDraft[]): PressState =>
  drafts.reduce((state, draft) => applyPress(state, entry(state, draft)), emptyPress(id))
const rules = (state: PressState, draft: PressDraft, more: Partial<PressQuestion> = {}): string[] =>
  findingsOf(decidePress(state, { overrides: [], at: '2026-09-14T10:00:00.000Z', ...draft, ...more })).map((finding) => finding.rule)

const [first, second] = joints
if (!first || !second) throw new Error('The press has joints.')
const known = fold(registered)
const underTest = fold(registered, { kind: 'test-opened', payload: test })
const accept: PressDraft = {
  kind: 'joint-examined',
  payload: { jointId: first.id, method: 'visual', result: 'accepted', remark: '', test: null },
}
const clearance: PressDraft = {
  kind: 'clearance-given',
  payload: {
    load: { text: '11.7', unit: 'short-ton' },
    loadNewton: 104_088,
    gaugePressure: { text: '7650', unit: 'psi' },
    gaugeCode: 'G-02',
    instrumentIds: [testId(5, 2)],
    bedHoles: ['4'],
    ramPositions: ['central'],
    tooling: [],
    until: '2027-03-15',
    clearedOn: '2026-09-15',
    clearedBy: 'The lead',
    staticLoads: 1,
    notMeasured: [],
    ...test,
  },
}

describe('the rules of a press', () => {
  it('P1: a press is entered once, before anything else', () => {
    expect(rules(emptyPress(id), registered)).toEqual([])
    expect(rules(known, registered)).toEqual(['P1'])
    expect(rules(emptyPress(id), { kind: 'changed', payload: { change: 'knock', jointIds: [], why: 'Dropped.' } })).toEqual(['P1'])
  })

  it('P2: the rated load never passes the lowest rating in the train', () => {
    const higher = { ...description, ratedLoad: { text: '15.5', unit: 'short-ton' as const } }
    expect(rules(known, { kind: 'described', payload: { description: higher, why: '' } })).toEqual(['P2'])
  })

  it('P3: joint numbers are used once', () => {
    expect(rules(known, { kind: 'joint-added', payload: { joint: { ...first, id: testId(0xb, 99) } } })).toEqual(['P3'])
  })

  it('P4: a joint holds two members that are entered', () => {
    const loose = { ...first, id: testId(0xb, 99), number: 99, between: [testId(3, 1), testId(3, 77)] as [string, string] }
    expect(rules(known, { kind: 'joint-added', payload: { joint: loose } })).toEqual(['P4'])
  })

  it('P5: a tacked joint cannot be accepted', () => {
    const tacked = fold(registered, {
      kind: 'joint-worked',
      payload: { jointId: first.id, makeUp: 'tacked', how: '', workedAt: '2026-09-01T10:00:00.000Z', test: null },
    })
    expect(rules(tacked, accept)).toEqual(['P5'])
    expect(rules(known, accept)).toEqual([])
  })

  it('P6: while a test is under way the press is worked on through the test', () => {
    expect(rules(underTest, accept)).toEqual(['P6'])
    expect(rules(underTest, accept, { consequence: true })).toEqual([])
  })

  it('P7: work names a joint that is there', () => {
    expect(rules(known, { kind: 'joint-retired', payload: { jointId: testId(0xb, 99), why: 'Cut off.' } })).toEqual(['P7'])
  })

  it('P8: a weld is examined 12 hours after welding, or with a reason', () => {
    const welded = fold(registered, {
      kind: 'joint-worked',
      payload: { jointId: first.id, makeUp: 'finished', how: '', workedAt: '2026-09-14T09:00:00.000Z', test: null },
    })
    expect(rules(welded, accept)).toEqual(['P8'])
    expect(rules(welded, accept, { overrides: [{ rule: 'P8', reason: 'Preheated, thin plate.' }] })).toEqual([])
    expect(rules(welded, accept, { at: '2026-09-14T21:00:00.000Z' })).toEqual([])
  })

  it('P9: only a clearance in force is withdrawn by hand', () => {
    const withdrawn: PressDraft = { kind: 'withdrawn', payload: { why: 'The crew heard a crack.' } }
    expect(rules(known, withdrawn)).toEqual(['P9'])
    expect(rules(fold(registered, { kind: 'test-opened', payload: test }, clearance), withdrawn)).toEqual([])
  })

  it('P10: what a test does to its press is written by the server alone', () => {
    expect(rules(underTest, clearance)).toContain('P10')
    expect(rules(underTest, clearance, { consequence: true })).toEqual([])
  })

  it('P11: one test at a time is under way on a press', () => {
    const other: PressDraft = { kind: 'test-opened', payload: { proofTestId: testId(0x7, 10), number: 'PT-0010' } }
    expect(rules(underTest, other, { consequence: true })).toEqual(['P11'])
  })

  it('P12: a clearance comes from the test under way', () => {
    expect(rules(known, clearance, { consequence: true })).toEqual(['P12'])
  })
})

describe('what entries do to a press', () => {
  const accepted = joints.map((joint): PressDraft => ({
    kind: 'joint-examined',
    payload: { jointId: joint.id, method: 'visual', result: 'accepted', remark: '', test: null },
  }))
  const cleared = fold(registered, ...accepted, { kind: 'test-opened', payload: test }, clearance)
  const numbers = (state: PressState) => state.joints.filter((joint) => joint.examination === null).map((joint) => joint.number)

  it('opening a test suspends a clearance, and the clearance comes back only as a new one', () => {
    const again = applyPress(cleared, entry(cleared, { kind: 'test-opened', payload: test }))
    expect(cleared.clearance.is).toBe('cleared')
    expect(again.clearance).toMatchObject({ is: 'suspended', clearance: { load: { text: '11.7' } } })
  })

  it('a stop withdraws the clearance and puts the joints back to unexamined', () => {
    const jointIds = joints.map((joint) => joint.id)
    const stopped = applyPress(underTest, entry(underTest, { kind: 'test-stopped', payload: { ...test, why: 'Softening.', jointIds } }))
    expect(stopped.clearance.is).toBe('withdrawn')
    expect(numbers(stopped)).toHaveLength(joints.length)
  })

  it('work on a joint puts its neighbours on the same members back, and ends the clearance', () => {
    const worked = applyPress(
      cleared,
      entry(cleared, {
        kind: 'joint-worked',
        payload: { jointId: first.id, makeUp: 'finished', how: '', workedAt: '2026-09-20T10:00:00.000Z', test: null },
      }),
    )
    // Joint 1 joins head beam and left upright; 2, 3, 4 hang on the head beam, 5 on the left upright.
    expect(numbers(worked)).toEqual([1, 2, 3, 4, 5])
    expect(worked.clearance.is).toBe('withdrawn')
  })

  it('a rejected joint and a reported change end the clearance; paint does not put joints back', () => {
    const rejected: PressDraft = {
      kind: 'joint-examined',
      payload: { jointId: second.id, method: 'visual', result: 'rejected', remark: 'Undercut.', test: null },
    }
    expect(applyPress(cleared, entry(cleared, rejected)).clearance.is).toBe('withdrawn')
    const knock = applyPress(cleared, entry(cleared, { kind: 'changed', payload: { change: 'knock', jointIds: [], why: 'Forklift.' } }))
    expect(numbers(knock)).toHaveLength(joints.length)
    const painted = applyPress(cleared, entry(cleared, { kind: 'changed', payload: { change: 'painted', jointIds: [], why: 'Grey.' } }))
    expect(numbers(painted)).toEqual([])
  })

  it('an instrument found out of tolerance suspends a clearance that rests on it, and no other', () => {
    const recall = (instrumentId: string): PressDraft => ({
      kind: 'instrument-recalled',
      payload: { instrumentId, code: 'G-02', calibratedOn: '2026-10-01' },
    })
    const suspended = applyPress(cleared, entry(cleared, recall(testId(5, 2))))
    expect(suspended.clearance).toMatchObject({ is: 'suspended', why: expect.stringContaining('G-02 was found out of tolerance') })
    expect(applyPress(cleared, entry(cleared, recall(testId(5, 3)))).clearance.is).toBe('cleared')
  })

  it('a kind from the future is counted, not guessed', () => {
    const future = { ...entry(known, registered), kind: 'weighed' }
    expect(applyPress(known, future)).toMatchObject({ unknownKinds: 1, joints: known.joints })
  })
})

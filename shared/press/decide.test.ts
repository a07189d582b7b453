import { describe, expect, it } from 'vitest'
import { openedPayload } from '../../tests/factories/test-press'
import { testId } from '../../tests/factories/ledger-builder'
import type { LedgerEntry } from '../ledger/envelope'
import { findingsOf } from '../ledger/rules'
import { applyPress, emptyPress } from './apply'
import { decidePress, type PressQuestion } from './decide'
import type { PressDraft, PressPayload } from './entries'
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
/** Every joint of the example accepted, as the walk-down after load leaves them. */
const lookedAt = joints.map((joint) => ({ kind: 'joint-examined', payload: { ...accept.payload, jointId: joint.id } }) as PressDraft)
const proven = fold(registered, { kind: 'test-opened', payload: test }, ...lookedAt)
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
    expect(rules(proven, clearance, { consequence: true })).toEqual([])
  })

  it('P11: one test at a time is under way on a press', () => {
    const other: PressDraft = { kind: 'test-opened', payload: { proofTestId: testId(0x7, 10), number: 'PT-0010' } }
    expect(rules(underTest, other, { consequence: true })).toEqual(['P11'])
  })

  it('P21: no test opens while a repair is open, but for one that only a rejected joint asked for', () => {
    const opening: PressDraft = { kind: 'test-opened', payload: { ...test, repeatsId: null } }
    const seen = fold(registered, { kind: 'repair-opened', payload: { jointIds: [first.id], why: 'A hair crack at the toe.' } })
    expect(rules(seen, opening, { consequence: true })).toEqual(['P21'])
    const repairId = seen.repairs[0]?.id ?? ''
    const closed = applyPress(
      seen,
      entry(seen, { kind: 'repair-closed', payload: { repairId, done: 'Ground out, welded.', doneBy: 'Ruben' } }),
    )
    expect(rules(closed, opening, { consequence: true })).toEqual([])
    const rejected: PressDraft = { kind: 'joint-examined', payload: { ...accept.payload, result: 'rejected' } } as PressDraft
    expect(rules(fold(registered, rejected), opening, { consequence: true })).toEqual([])
  })

  it('P22: a test after one that went wrong names the one it repeats', () => {
    const stopped = { ...test, why: 'It softened.', jointIds: [first.id] }
    const concluded: PressDraft = { kind: 'test-concluded', payload: { ...test, conclusion: 'rejected', jointIds: [first.id] } }
    const wrong = fold(registered, { kind: 'test-opened', payload: test }, { kind: 'test-stopped', payload: stopped }, concluded)
    const repairId = wrong.repairs[0]?.id ?? ''
    const mended = applyPress(
      wrong,
      entry(wrong, { kind: 'repair-closed', payload: { repairId, done: 'Stiffener welded out.', doneBy: 'Ruben' } }),
    )
    const next = { proofTestId: testId(0x7, 10), number: 'PT-0010' }
    expect(rules(mended, { kind: 'test-opened', payload: next }, { consequence: true })).toEqual(['P22'])
    expect(rules(mended, { kind: 'test-opened', payload: { ...next, repeatsId: test.proofTestId } }, { consequence: true })).toEqual([])
  })

  it('P23: a note or an end of a repair names one that is open', () => {
    expect(rules(known, { kind: 'repair-noted', payload: { repairId: testId(0xe, 50), note: 'Ground out.', doneBy: 'Ruben' } })).toEqual([
      'P23',
    ])
  })

  it('P24: the repair of a test is closed after the test is concluded', () => {
    const stopped: PressDraft = { kind: 'test-stopped', payload: { ...test, why: 'It softened.', jointIds: [] } }
    const state = fold(registered, { kind: 'test-opened', payload: test }, stopped)
    const closing: PressDraft = {
      kind: 'repair-closed',
      payload: { repairId: state.repairs[0]?.id ?? '', done: 'Welded.', doneBy: 'Ruben' },
    }
    expect(rules(state, closing)).toEqual(['P24'])
    const concluded: PressDraft = { kind: 'test-concluded', payload: { ...test, conclusion: 'rejected', jointIds: [] } }
    expect(rules(applyPress(state, entry(state, concluded)), closing)).toEqual([])
  })

  it('P25: a tag is taken off once, and only where one hangs', () => {
    const off: PressDraft = { kind: 'tag-taken-off', payload: { remark: '' } }
    expect(rules(known, off)).toEqual(['P25'])
    const withdrawn = fold(registered, { kind: 'test-opened', payload: test }, clearance, { kind: 'withdrawn', payload: { why: 'Bent.' } })
    expect(rules(withdrawn, off)).toEqual([])
    expect(rules(applyPress(withdrawn, entry(withdrawn, off)), off)).toEqual(['P25'])
  })

  it('P26: sizes are written down for members and joints that are there, and end no clearance', () => {
    const sizes = (memberId: string): PressDraft => ({
      kind: 'strength-described',
      payload: { members: [{ memberId, strength: null }], joints: [], why: '' },
    })
    expect(rules(known, sizes(testId(3, 77)))).toEqual(['P26'])
    const member = description.members[0]?.id ?? ''
    expect(rules(known, sizes(member))).toEqual([])
    const cleared = fold(registered, { kind: 'test-opened', payload: test }, clearance)
    expect(applyPress(cleared, entry(cleared, sizes(member))).clearance.is).toBe('cleared')
  })

  it('P27: a clearance never passes the rating of its tooling', () => {
    const over = { ...clearance.payload, toolingLimitNewton: 100_000 } as (typeof clearance)['payload']
    expect(rules(proven, { kind: 'clearance-given', payload: over } as PressDraft, { consequence: true })).toEqual(['P27'])
    const kept = { ...over, toolingLimitNewton: 104_088 } as (typeof clearance)['payload']
    expect(rules(proven, { kind: 'clearance-given', payload: kept } as PressDraft, { consequence: true })).toEqual([])
  })

  it('P28: a change names joints that are there', () => {
    const knock: PressDraft = { kind: 'changed', payload: { change: 'knock', jointIds: [testId(0xb, 99)], why: 'Forklift.' } }
    expect(rules(known, knock)).toEqual(['P28'])
  })

  it('P29: no clearance is given while a joint has fallen back since', () => {
    const knock: PressDraft = { kind: 'changed', payload: { change: 'knock', jointIds: [first.id], why: 'Forklift.' } }
    const knocked = applyPress(proven, entry(proven, knock))
    expect(rules(knocked, clearance, { consequence: true })).toEqual(['P29'])
  })

  it('P12: a clearance comes from the test under way', () => {
    expect(rules(fold(registered, ...lookedAt), clearance, { consequence: true })).toEqual(['P12'])
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

  const after = (change: PressPayload<'changed'>['change'], jointIds: string[] = []) =>
    applyPress(cleared, entry(cleared, { kind: 'changed', payload: { change, jointIds, why: 'It happened.' } }))
  const loose = joints.filter((joint) => joint.kind !== 'weld').map((joint) => joint.number)

  it('P13 and P14: a repair and a modification put back the joints named and their neighbours, else all, and end the clearance', () => {
    for (const change of ['repair', 'modification'] as const) {
      expect(numbers(after(change, [first.id]))).toEqual([1, 2, 3, 4, 5])
      expect(numbers(after(change))).toHaveLength(joints.length)
      expect(after(change, [first.id]).clearance.is).toBe('withdrawn')
    }
  })

  it('P15: an overload puts every joint back and ends the clearance, whichever joint is named', () => {
    expect(numbers(after('overload', [first.id]))).toHaveLength(joints.length)
    expect(after('overload').clearance.is).toBe('withdrawn')
  })

  it('P16: a knock puts back the joints named and their neighbours, and ends the clearance', () => {
    expect(numbers(after('knock', [first.id]))).toEqual([1, 2, 3, 4, 5])
    expect(after('knock', [first.id]).clearance.is).toBe('withdrawn')
  })

  it('P17: after a move the clearance waits for what can work loose, and holds again when it is accepted', () => {
    const moved = after('moved')
    expect(numbers(moved)).toEqual(loose)
    expect(moved.clearance).toMatchObject({ is: 'suspended', until: 'the joints are accepted' })
    const looked = joints
      .filter((joint) => joint.kind !== 'weld')
      .map((joint): PressDraft => ({ kind: 'joint-examined', payload: { ...accept.payload, jointId: joint.id } }) as PressDraft)
      .reduce((state, draft) => applyPress(state, entry(state, draft)), moved)
    expect(looked.clearance.is).toBe('cleared')
  })

  it('P18: after a long stop every joint is examined again before the clearance holds', () => {
    expect(numbers(after('long stop'))).toHaveLength(joints.length)
    expect(after('long stop').clearance).toMatchObject({ is: 'suspended', until: 'the joints are accepted' })
  })

  it('P19: paint puts no joint back and leaves the clearance', () => {
    expect(numbers(after('painted'))).toEqual([])
    expect(after('painted').clearance.is).toBe('cleared')
  })

  it('P20: another ram or gauge puts back what holds the ram and ends the clearance', () => {
    const fallen = numbers(after('ram or gauge changed'))
    expect(fallen.length).toBeGreaterThan(0)
    expect(fallen.length).toBeLessThan(joints.length)
    expect(after('ram or gauge changed').clearance.is).toBe('withdrawn')
  })

  it('a new name or a purpose tells of the same press; another ram of another one', () => {
    const renamed = applyPress(
      cleared,
      entry(cleared, { kind: 'described', payload: { description: { ...description, name: 'The old one' }, why: '' } }),
    )
    expect(renamed.clearance.is).toBe('cleared')
    const rams = description.rams.map((ram) => ({ ...ram, bore: { text: '60', unit: 'mm' as const } }))
    const other = applyPress(cleared, entry(cleared, { kind: 'described', payload: { description: { ...description, rams }, why: '' } }))
    expect(other.clearance.is).toBe('withdrawn')
  })

  it('a stopped test opens one repair, with the members its points told of, and a rejected joint one that its acceptance closes', () => {
    const stopped = fold(
      registered,
      { kind: 'test-opened', payload: test },
      {
        kind: 'test-stopped',
        payload: { ...test, why: 'It softened.', jointIds: joints.map((joint) => joint.id), memberIds: [testId(3, 1)] },
      },
      { kind: 'test-concluded', payload: { ...test, conclusion: 'rejected', jointIds: joints.map((joint) => joint.id) } },
    )
    expect(stopped.repairs).toMatchObject([{ from: 'test', memberIds: [testId(3, 1)], closed: null }])
    expect(stopped.toRepeat).toMatchObject({ number: test.number })
    const rejected = fold(registered, { kind: 'joint-examined', payload: { ...accept.payload, result: 'rejected' } } as PressDraft)
    expect(rejected.repairs).toMatchObject([{ from: 'joint', jointIds: [first.id], closed: null }])
    expect(applyPress(rejected, entry(rejected, accept)).repairs[0]?.closed).not.toBeNull()
  })

  it('a joint that is split is retired, and its parts stand in its place, unexamined', () => {
    const parts = [21, 22].map((number) => ({ ...first, id: testId(0xb, number), number, makeUp: 'open' as const }))
    const split = applyPress(
      cleared,
      entry(cleared, { kind: 'joint-split', payload: { jointId: first.id, into: parts, why: 'Two runs.' } }),
    )
    expect(split.joints.find((joint) => joint.id === first.id)?.retired).toBe(true)
    expect(split.joints.filter((joint) => joint.number > 20).map((joint) => joint.examination)).toEqual([null, null])
    expect(split.clearance.is).toBe('withdrawn')
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

import { describe, expect, it } from 'vitest'
import type { LedgerEntry } from '../ledger/envelope'
import { foldPress } from './apply'
import type { Clearance, PressDraft } from './entries'
import { answerOfRow, mayItBeUsed, missingOf } from './may-it-be-used'
import type { Joint, PressDescription } from './model'
import { startingFrame } from './starting-joints'

let made = 0
const nextId = () => {
  made += 1
  return `01990000-0000-7000-8000-${String(made).padStart(12, '0')}`
}

const PRESS = nextId()
const TEST = { proofTestId: nextId(), number: 'PT-0043' }
const AUTHOR = nextId()
const frame = startingFrame('h-frame', nextId)
const finished = frame.joints.map((joint): Joint => ({ ...joint, makeUp: 'finished' }))

const description: PressDescription = {
  name: 'Press 2',
  whatFor: 'straightening press',
  kind: 'h-frame',
  dimensions: { height: null, opening: null, throat: null, holePitch: null, holes: 0 },
  ratedLoad: { text: '12', unit: 'short-ton' },
  members: frame.members,
  rams: [
    {
      id: nextId(),
      name: 'Jack',
      bore: { text: '50', unit: 'mm' },
      boreTolerance: null,
      effectiveArea: null,
      stroke: { text: '150', unit: 'mm' },
      ratedCapacity: { text: '12', unit: 'short-ton' },
      ratedPressure: { text: '550', unit: 'bar' },
      acting: 'single',
      rodDiameter: null,
      springReturn: null,
      carriedMass: null,
      carriedComesDown: false,
    },
  ],
  train: [],
}

const clearance: Clearance = {
  load: { text: '11.7', unit: 'short-ton' },
  loadNewton: 104_088,
  gaugePressure: { text: '7650', unit: 'psi' },
  gaugeCode: 'G-02',
  instrumentIds: [],
  bedHoles: ['4'],
  ramPositions: ['central'],
  tooling: [],
  until: '2027-03-15',
  clearedOn: '2026-09-15',
  clearedBy: 'Marit Sandoval',
  ...TEST,
  staticLoads: 1,
  notMeasured: [],
}

function ledger(joints: Joint[], ...drafts: PressDraft[]) {
  const registered: PressDraft = { kind: 'registered', payload: { description, joints, lastWorkedOn: null } }
  const entries = [registered, ...drafts].map((draft, index): LedgerEntry => ({
    id: nextId(),
    ledgerId: PRESS,
    v: 1,
    ...draft,
    authorId: AUTHOR,
    deviceId: nextId(),
    deviceSeq: index + 1,
    basedOnSeq: index,
    observedAt: '2026-09-15T10:00:00.000Z',
    bootId: nextId(),
    monotonicMs: index,
    attachments: [],
    overrides: [],
    seq: index + 1,
    receivedAt: '2026-09-15T10:00:00.000Z',
    irregular: [],
    prevHash: '0'.repeat(64),
    hash: '1'.repeat(64),
  }))
  return foldPress(PRESS, entries)
}

const given: PressDraft = { kind: 'clearance-given', payload: clearance }
const opened: PressDraft = { kind: 'test-opened', payload: TEST }
const accept = (joint: Joint): PressDraft => ({
  kind: 'joint-examined',
  payload: { jointId: joint.id, method: 'visual', result: 'accepted', remark: '', test: null },
})

describe('may the press be used', () => {
  it('up to what it was cleared for, until the last day of the clearance', () => {
    expect(mayItBeUsed(ledger(finished, opened, given), '2027-03-15')).toEqual({ answer: 'cleared', clearance })
  })

  it('not from the day after, when it is overdue', () => {
    const answer = mayItBeUsed(ledger(finished, opened, given), '2027-03-16')
    expect(answer).toMatchObject({ answer: 'do not use', why: expect.stringContaining('overdue') })
  })

  it('not while a test is under way', () => {
    expect(mayItBeUsed(ledger(finished, given, opened), '2026-10-01')).toEqual({ answer: 'under test', why: 'PT-0043 is under way.' })
  })

  it('not when its test was stopped, with what stopped it as the reason', () => {
    const stopped: PressDraft = { kind: 'test-stopped', payload: { ...TEST, why: 'The left pin moved.', jointIds: [] } }
    expect(mayItBeUsed(ledger(finished, given, opened, stopped), '2026-10-01')).toMatchObject({
      answer: 'do not use',
      why: 'PT-0043 was stopped. The left pin moved.',
    })
  })

  it('not when a test is accepted and its countersignature is missing', () => {
    const concluded: PressDraft = { kind: 'test-concluded', payload: { ...TEST, conclusion: 'accepted', jointIds: [] } }
    expect(mayItBeUsed(ledger(finished, opened, concluded), '2026-10-01')).toMatchObject({
      answer: 'do not use',
      why: 'PT-0043 is concluded, and a signature is missing.',
    })
  })

  it('not when a change withdrew the clearance, with the change as the reason', () => {
    const changed: PressDraft = { kind: 'changed', payload: { change: 'repair', jointIds: [], why: 'Hose changed' } }
    expect(mayItBeUsed(ledger(finished, given, changed), '2026-10-01')).toMatchObject({ answer: 'do not use', why: 'Repair: Hose changed' })
  })

  it('not while a late fact suspends the clearance', () => {
    const late: PressDraft = { kind: 'test-late-fact', payload: { ...TEST, why: 'A reading came in late.' } }
    expect(mayItBeUsed(ledger(finished, given, late), '2026-10-01')).toMatchObject({
      answer: 'do not use',
      why: expect.stringContaining('A reading came in late.'),
    })
  })

  it('not when something happened that this program is too old to read', () => {
    const state = { ...ledger(finished, given), unknownKinds: 1 }
    expect(mayItBeUsed(state, '2026-10-01').answer).toBe('do not use')
  })

  it('not while it is being built, and every joint that is missing is named once', () => {
    const [first, second, third, ...rest] = finished
    if (!first || !second || !third) throw new Error('The starting frame has joints.')
    const joints: Joint[] = [{ ...first, makeUp: 'tacked' }, { ...second, makeUp: 'open' }, third, ...rest]
    const answer = mayItBeUsed(ledger(joints, ...rest.map(accept)), '2026-10-01')
    expect(answer).toEqual({
      answer: 'do not use',
      why: 'It was never cleared.',
      missing: [
        'Joint 2 (Head beam to right upright) is open. Make it.',
        'Joint 1 (Head beam to left upright) is only tacked. Weld it out.',
        'Joint 3 (Ram seat to head beam) is not examined.',
        'A proof test, concluded and countersigned.',
      ],
    })
  })
})

describe('what is missing', () => {
  it('is nothing when every joint is finished and accepted', () => {
    expect(missingOf(ledger(finished, ...finished.map(accept)))).toEqual([])
  })

  it('names joints that fell back after work on a neighbour', () => {
    const [first] = finished
    if (!first) throw new Error('The starting frame has joints.')
    const worked: PressDraft = {
      kind: 'joint-worked',
      payload: { jointId: first.id, makeUp: 'finished', how: 'welded out', workedAt: '2026-09-15T09:00:00.000Z', test: null },
    }
    const sentences = missingOf(ledger(finished, ...finished.map(accept), worked))
    expect(sentences).toContainEqual(expect.stringMatching(/fell back to unexamined/))
    expect(sentences).toContain('Joint 1 (Head beam to left upright) is not examined.')
  })

  it('names the gap in the load path', () => {
    const withoutSeat = finished.filter((joint) => joint.name !== 'Ram seat to head beam')
    expect(missingOf(ledger(withoutSeat, ...withoutSeat.map(accept)))).toEqual([expect.stringContaining('Ram seat hangs on no joint')])
  })

  it('passes over joints that were retired', () => {
    const [first] = finished
    if (!first) throw new Error('The starting frame has joints.')
    const extra: Joint = { ...first, id: nextId(), number: 99, makeUp: 'open' }
    const retired: PressDraft = { kind: 'joint-retired', payload: { jointId: extra.id, why: 'cut away' } }
    expect(missingOf(ledger([...finished, extra], ...finished.map(accept), retired))).toEqual([])
  })
})

describe('a row of the register', () => {
  it('is cleared only while the clearance is in date', () => {
    expect(answerOfRow({ status: 'cleared', clearedUntil: '2027-03-15' }, '2027-03-15')).toEqual({ answer: 'cleared' })
    expect(answerOfRow({ status: 'cleared', clearedUntil: '2027-03-15' }, '2027-03-16')).toEqual({ answer: 'do not use', why: 'overdue' })
    expect(answerOfRow({ status: 'cleared', clearedUntil: null }, '2027-03-16')).toEqual({ answer: 'do not use', why: 'overdue' })
  })

  it('says why not in every other status', () => {
    const why = (status: 'building' | 'ready' | 'suspended' | 'withdrawn') => answerOfRow({ status, clearedUntil: null }, '2026-10-01')
    expect([why('building'), why('ready'), why('suspended'), why('withdrawn')]).toEqual([
      { answer: 'do not use', why: 'being built' },
      { answer: 'do not use', why: 'not tested' },
      { answer: 'do not use', why: 'suspended' },
      { answer: 'do not use', why: 'withdrawn' },
    ])
    expect(answerOfRow({ status: 'under test', clearedUntil: '2027-03-15' }, '2026-10-01')).toEqual({ answer: 'under test' })
  })
})

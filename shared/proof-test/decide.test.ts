import { describe, expect, it } from 'vitest'
import { firstClimb, recordedTest, stoppedTest, type RecordedTestOptions } from '../../tests/factories/recorded-test'
import { ids, openedPayload } from '../../tests/factories/test-press'
import type { LedgerEntry } from '../ledger/envelope'
import { findingsOf } from '../ledger/rules'
import { applyProofTest, emptyProofTest } from './apply'
import { decideProofTest } from './decide'
import { SET_UP_ITEMS, type Mark, type ProofTestDraft } from './entries'
import type { ProofTestQuestion } from './rule'
import type { ProofTestState } from './state'

/** The state just before the n-th entry of a kind in the record's example, and that entry. */
function before(kind: string, options: RecordedTestOptions & { nth?: number; where?: (entry: LedgerEntry) => boolean } = {}) {
  const { nth = 0, where = () => true, ...rest } = options
  const { entries, id } = recordedTest(rest)
  const found = entries.filter((entry) => entry.kind === kind && where(entry))[nth]
  if (!found) throw new Error(`No ${kind} in this test.`)
  const state = entries.filter((entry) => entry.seq < found.seq).reduce(applyProofTest, emptyProofTest(id))
  return { state, entry: found }
}

type Asked = ProofTestDraft & Partial<Omit<ProofTestQuestion, 'state' | 'kind' | 'payload'>>

function ask(state: ProofTestState, asked: Asked, at?: Mark) {
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

const markOf = (entry: LedgerEntry): Mark => ({ at: entry.observedAt, bootId: entry.bootId, monotonicMs: entry.monotonicMs })
const asEntered = (entry: LedgerEntry) =>
  ({ kind: entry.kind, payload: entry.payload, authorId: entry.authorId, mark: markOf(entry) }) as unknown as Asked
const later = (mark: Mark, seconds: number): Mark => ({
  ...mark,
  at: new Date(Date.parse(mark.at) + seconds * 1000).toISOString(),
  monotonicMs: mark.monotonicMs + seconds * 1000,
})
const withJoint = (state: ProofTestState, number: number, change: Partial<ProofTestState['joints'][number]>): ProofTestState => ({
  ...state,
  joints: state.joints.map((joint) => (joint.joint.number === number ? { ...joint, ...change } : joint)),
})
const jointId = (state: ProofTestState, number: number): string =>
  state.joints.find((joint) => joint.joint.number === number)?.joint.id ?? ''
const examined = (state: ProofTestState, number: number, more: object = {}) =>
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

describe('people and signatures', () => {
  it('R1: stop and release are always allowed, whatever the rest says', () => {
    const { state } = before('row-read')
    const odd = { ...state, paused: null, setUp: null, loadPathConfirmed: null }
    expect(
      ask(odd, { kind: 'stopped', payload: { cause: 'called', why: 'Called by the pump hand.' }, authorId: ids.pumpHand }).outcome,
    ).toBe('allowed')
    expect(ask(odd, { kind: 'released', payload: { gaugeZero: true, ramClear: true } }).outcome).toBe('allowed')
  })

  it('R2: only the people named in a test add to it', () => {
    const { state, entry } = before('joint-examined')
    expect(ask(state, { ...asEntered(entry), authorId: ids.shop }).rules).toEqual(['R2'])
  })

  it('R3: after the lead’s signature only the witness acts', () => {
    const { state } = before('countersigned')
    expect(ask(state, { kind: 'observed', payload: { at: null, what: 'other', note: 'One more thing.' } }).rules).toEqual(['R3'])
    const { state: sealed } = recordedTest()
    expect(ask(sealed, { kind: 'stopped', payload: { cause: 'called', why: 'Too late.' } }).rules).toEqual(['R3'])
  })

  it('R40: a device whose clock is more than five minutes off is marked', () => {
    const { state, entry } = before('set-read')
    expect(ask(state, { ...asEntered(entry), clockOff: 299_000 }).outcome).toBe('allowed')
    expect(ask(state, { ...asEntered(entry), clockOff: -301_000 }).rules).toEqual(['R40'])
  })

  it('R46 and R47: only the lead signs, and only a concluded test', () => {
    const { state, entry } = before('concluded')
    const signature = {
      kind: 'signed',
      payload: {
        personId: ids.lead,
        printedName: 'M',
        meaning: 'I ran it.',
        signedAt: entry.observedAt,
        headHash: state.headHash,
        relation: '',
      },
    } as Asked
    expect(ask(state, signature).rules).toEqual(['R47'])
    expect(ask(state, { ...asEntered(entry), authorId: ids.witness }).rules).toEqual(['R46'])
  })

  it('R48: the witness countersigns after the lead, and nobody else does', () => {
    const { state, entry } = before('countersigned')
    expect(ask(state, asEntered(entry)).outcome).toBe('allowed')
    expect(ask(state, { ...asEntered(entry), authorId: ids.lead }).rules).toEqual(['R48'])
    expect(ask(before('signed').state, asEntered(entry)).rules).toEqual(['R48'])
  })
})

/** A round bar of 40 mm across 640 mm: it yields far below 12 short tons. */
const weakBeam = {
  role: 'beam' as const,
  section: { shape: 'round bar' as const, diameter: { text: '40', unit: 'mm' as const }, sideBySide: 1, plates: [] },
  material: { grade: 'S355JR' as const },
  support: 'both ends' as const,
  span: { text: '640', unit: 'mm' as const },
  ramOffset: null,
  hole: null,
  loadShare: null,
}

describe('opening', () => {
  const open = (changes: Parameters<typeof openedPayload>[0] = {}) =>
    ask(emptyProofTest(ids.test), { kind: 'opened', payload: openedPayload(changes) })
  const payload = openedPayload()

  it('R4: a test is opened once, before anything else', () => {
    expect(open().outcome).toBe('allowed')
    expect(ask(recordedTest().state, { kind: 'opened', payload }).rules).toContain('R4')
    expect(ask(emptyProofTest(ids.test), { kind: 'paused', payload: { why: '' } }).rules).toEqual(['R4'])
  })

  it('R5: the witness is neither the lead nor the pump hand', () => {
    const { people } = payload
    expect(open({ opened: { people: { ...people, witness: people.lead } } }).rules).toContain('R5')
    expect(open({ opened: { people: { ...people, witness: { ...people.witness, id: people.pumpHand.id } } } }).rules).toContain('R5')
  })

  it('R6: neither the rated load nor a stage passes the lowest rating', () => {
    expect(open({ opened: { press: { ...payload.press, ratedLoad: { text: '16', unit: 'short-ton' } } } }).rules).toContain('R6')
    const stages = [...payload.protocol.content.stages, { percent: 130, holdSeconds: 600 }]
    const above = open({ protocol: { stages, aboveRatingRule: 'shop rule 4' } })
    expect(above.rules).toEqual(['R6'])
    expect(above.says).toContain('130 %')
  })

  it('R7: every target lies on the gauge’s scale', () => {
    const instruments = payload.instruments.map((one) =>
      one.details.kind === 'gauge' ? { ...one, details: { ...one.details, fullScale: { text: '6000', unit: 'psi' as const } } } : one,
    )
    expect(open({ opened: { instruments } }).rules).toEqual(['R7'])
    // One ram and two gauges: it is not known which reads what.
    const [gauge] = payload.instruments
    const second = gauge ? { ...gauge, id: ids.test } : gauge
    const two = { instruments: [...payload.instruments, ...(second ? [second] : [])], forceInstrumentIds: [ids.gauge, ids.test] }
    expect(open({ opened: two }).rules).toEqual(['R7'])
  })

  it('R8: an instrument out of date needs a reason', () => {
    const instruments = payload.instruments.map((one) =>
      one.calibration ? { ...one, calibration: { ...one.calibration, dueOn: '2026-09-13' } } : one,
    )
    expect(open({ opened: { instruments } }).rules).toEqual(['R8'])
    expect(open({ opened: { instruments, instrumentOverride: 'The gauge is at the laboratory next week.' } }).outcome).toBe('allowed')
  })

  it('R9: the load path closes', () => {
    const gap = open({ opened: { joints: payload.joints.filter((joint) => joint.number > 3) } })
    expect(gap.rules).toEqual(['R9'])
    expect(gap.says).toContain('hangs on no joint')
  })

  it('R52: a load path check over 100 % waits for an engineer’s document', () => {
    const weak = {
      ...payload.press,
      members: payload.press.members.map((member) => (member.kind === 'bed-beam' ? { ...member, strength: weakBeam } : member)),
    }
    expect(open({ opened: { press: weak } }).rules).toEqual(['R52'])
    const engineer = { name: 'P. Lindqvist', document: 'Calculation 26-118', on: '2026-09-01' }
    expect(open({ opened: { press: weak, engineer } }).outcome).toBe('allowed')
  })

  it('R10: every point has an indicator of its own', () => {
    const points = payload.points.map((point) => ({ ...point, instrumentId: payload.points[0]?.instrumentId ?? '' }))
    expect(open({ opened: { points } }).rules).toEqual(['R10'])
  })
})

describe('walk-down and set-up', () => {
  it('R11: a tacked joint cannot be accepted, and the sentence names it', () => {
    const { state } = before('joint-examined')
    const tacked = withJoint(state, 7, { makeUp: 'tacked' })
    const answer = ask(tacked, examined(tacked, 7))
    expect(answer.rules).toEqual(['R11'])
    expect(answer.says).toContain('Joint 7 is only tacked.')
  })

  it('R12: a weld is examined 12 hours after welding, or with a reason', () => {
    const { state } = before('joint-examined')
    const fresh = withJoint(state, 1, { workedAt: '2026-09-14T15:00:00.000Z' })
    const soon: Mark = { at: '2026-09-15T02:59:00.000Z', bootId: ids.test, monotonicMs: 0 }
    expect(ask(fresh, examined(fresh, 1), soon)).toMatchObject({ outcome: 'needs-reason', rules: ['R12'] })
    expect(ask(fresh, { ...examined(fresh, 1), overrides: [{ rule: 'R12', reason: 'Thin plate, preheated.' }] }, soon).outcome).toBe(
      'allowed',
    )
    expect(ask(fresh, examined(fresh, 1), later(soon, 120)).outcome).toBe('allowed')
  })

  it('R13: a warm weld is not accepted', () => {
    const { state } = before('joint-examined')
    expect(ask(state, examined(state, 1, { cold: false })).rules).toEqual(['R13'])
    // After load nobody has welded: the question is not asked again.
    expect(ask(state, examined(state, 1, { cold: false, occasion: 'after load' })).outcome).toBe('allowed')
  })

  const loading = () => before('seated')

  it('R14: no load while a joint is only tacked; it says which', () => {
    const { state, entry } = loading()
    const answer = ask(withJoint(state, 7, { makeUp: 'tacked' }), asEntered(entry))
    expect(answer.rules).toContain('R14')
    expect(answer.says).toContain('Joint 7 is only tacked.')
  })

  it('R15: no load until every joint is accepted', () => {
    const { state, entry } = loading()
    expect(ask(withJoint(state, 5, { before: null }), asEntered(entry)).rules).toContain('R15')
  })

  it('R16: a walk-down older than its hours is walked again', () => {
    const { state, entry } = loading()
    expect(ask(state, asEntered(entry), later(markOf(entry), 13 * 3600)).rules).toContain('R16')
  })

  it('R17: the witness has confirmed that no joint is missing', () => {
    const { state, entry } = loading()
    expect(ask({ ...state, loadPathConfirmed: null }, asEntered(entry)).rules).toContain('R17')
  })

  it('R18: as told to the lead it needs a reason', () => {
    const { state } = before('load-path-confirmed')
    const told = { kind: 'load-path-confirmed', payload: { by: 'witness, as told to the lead', joints: 8 } } as Asked
    expect(ask(state, told)).toMatchObject({ outcome: 'needs-reason', rules: ['R18'] })
    expect(ask(state, { kind: 'load-path-confirmed', payload: { by: 'witness', joints: 8 }, authorId: ids.lead }).rules).toEqual(['R18'])
  })

  it('R19: the set-up is confirmed whole, with the stroke between 10 and 80 %', () => {
    const { state, entry } = loading()
    expect(ask({ ...state, setUp: null }, asEntered(entry)).rules).toContain('R19')
    const setUp = (items: typeof SET_UP_ITEMS | [], strokePercent: string) =>
      ask(state, { kind: 'set-up-confirmed', payload: { items: [...items], reliefSet: null, strokePercent, note: '' } }).rules
    expect(setUp([], '40')).toEqual(['R19'])
    expect(setUp(SET_UP_ITEMS, '81')).toEqual(['R19'])
    expect(setUp(SET_UP_ITEMS, '80')).toEqual([])
  })
})

describe('under load', () => {
  it('R20: a stopped test never goes back under load', () => {
    const { state, entry } = before('row-read')
    const stopped: ProofTestState = { ...state, stopped: { seq: 1, at: '', by: ids.lead, cause: 'called', why: 'A noise.', atPercent: 25 } }
    expect(ask(stopped, asEntered(entry)).rules).toContain('R20')
    expect(ask(stopped, { kind: 'resumed', payload: {} }).rules).toContain('R20')
  })

  it('R21: legs are begun in order', () => {
    const { state } = before('leg-begun')
    expect(ask(state, { kind: 'leg-begun', payload: { leg: 1, bedHoleConfirmed: '4' } }).rules).toContain('R21')
  })

  it('R22: the seating load is put on once', () => {
    const { state } = before('datum-read')
    const { entry } = before('seated')
    expect(ask(state, asEntered(entry)).rules).toEqual(['R22'])
  })

  it('R23 and R24: a datum is read with the load off, after the seating', () => {
    const { state, entry } = before('datum-read')
    expect(ask({ ...state, loaded: { since: '', by: 'seating' } }, asEntered(entry)).rules).toContain('R23')
    expect(ask(before('seated').state, asEntered(entry)).rules).toContain('R24')
  })

  it('R25: the first stage waits for a datum that was watched and stood still', () => {
    const { entry } = before('stage-begun')
    expect(ask(before('datum-read', { nth: 1 }).state, asEntered(entry)).rules).toContain('R25')
  })

  it('R26: no stage is skipped, and none begins before the decision on the last', () => {
    const { state, entry } = before('stage-begun', { nth: 1 })
    const at = { leg: 0, climb: 0, stage: 2, attempt: 0 }
    const skipping = ask(state, { kind: 'stage-begun', payload: { at } }, markOf(entry))
    expect(skipping.rules).toEqual(['R26'])
    expect(skipping.says).toContain('50 % comes next')
    expect(ask(before('decided').state, asEntered(entry)).rules).toContain('R26')
    expect(ask(state, asEntered(entry)).outcome).toBe('allowed')
  })

  it('R27: a row belongs to the stage under way', () => {
    const { state, entry } = before('row-read', { nth: 2 })
    const payload = { ...entry.payload, at: { leg: 0, climb: 0, stage: 0, attempt: 0 } }
    expect(ask(state, { ...asEntered(entry), payload } as Asked).rules).toContain('R27')
  })

  it('R28: a row is entered whole', () => {
    const { state, entry } = before('row-read')
    const readings = (entry.payload.readings as object[]).slice(1)
    expect(ask(state, { ...asEntered(entry), payload: { ...entry.payload, readings } } as Asked).rules).toContain('R28')
  })

  const bend = (middle: string, typedAgain: string[] = []) => {
    const { state, entry } = before('row-read', { nth: 4 })
    const readings = (entry.payload.readings as { sourceId: string; text: string }[]).map((reading) =>
      reading.sourceId === ids.middle ? { ...reading, text: middle } : reading,
    )
    return ask(state, { ...asEntered(entry), payload: { ...entry.payload, readings, typedAgain } } as Asked)
  }

  it('R29: what the line does not predict is typed again', () => {
    expect(bend('1.64').outcome).toBe('allowed')
    expect(bend('16.4').rules).toEqual(['R29'])
    expect(bend('16.4', [ids.middle]).outcome).toBe('allowed')
    // On the stiff side too: a stuck or fallen indicator.
    expect(bend('1.08').rules).toEqual(['R29'])
  })

  it('R30: a hold ends when its time from the mark is over', () => {
    const { state, entry } = before('row-read', { nth: 1 })
    const mark = entry.payload.mark as Mark
    const early = later(mark, -10)
    const answer = ask(state, { ...asEntered(entry), payload: { ...entry.payload, mark: early } } as Asked)
    expect(answer.rules).toEqual(['R30'])
    expect(answer.says).toMatch(/^\d+ s of the hold are left\.$/)
  })

  it('R31: a second top-up at full load stops the test', () => {
    const { state, entry } = before('row-read', { nth: 7 })
    const { mark, at } = entry.payload as { mark: Mark; at: ProofTestDraft['payload'] }
    const topUp = {
      kind: 'topped-up',
      payload: { at, mark, readings: [{ sourceId: ids.gauge, text: '7850', unit: 'psi' }], typedAgain: [] },
    } as unknown as Asked
    expect(ask(state, topUp).outcome).toBe('allowed')
    const once = applyProofTest(state, { ...entry, kind: 'topped-up', payload: topUp.payload })
    expect(ask(once, topUp).rules).toEqual(['R31'])
  })

  it('R32: never “go on” past a limit', () => {
    const { entries, id } = stoppedTest()
    const decided = entries.filter((entry) => entry.kind === 'decided').at(-1)
    if (!decided) throw new Error('The test was decided.')
    const state = entries.filter((entry) => entry.seq < decided.seq).reduce(applyProofTest, emptyProofTest(id))
    const goOn = ask(state, { ...asEntered(decided), payload: { ...decided.payload, decision: 'go-on' } } as Asked)
    expect(goOn.rules).toContain('R32')
    expect(goOn.says).toContain('Softening')
    expect(ask(state, asEntered(decided)).outcome).toBe('allowed')
  })

  /** At 75 % the middle reads outside its prediction, on the stiff side, so that softening says nothing. */
  function outside(again: boolean) {
    const [first, second] = firstClimb.stages
    if (!first || !second) throw new Error('The climb has stages.')
    const third = { at: '10:41', start: ['5900', '1.50', '0.33', '0.31'], end: ['5850', '1.50', '0.33', '0.31'] } as const
    const { entries, id } = recordedTest({ climbs: [{ ...firstClimb, stages: [first, second, third] }] })
    const end = entries.filter((entry) => entry.kind === 'row-read').at(-1)
    if (!end) throw new Error('The hold ended.')
    const upTo = entries.filter((entry) => entry.seq < end.seq).reduce(applyProofTest, emptyProofTest(id))
    const reread = again ? applyProofTest(upTo, { ...end, kind: 'row-read', payload: { ...end.payload, occasion: 'again' } }) : upTo
    const state = applyProofTest(reread, end)
    return { state, goOn: { kind: 'decided', payload: { at: end.payload.at, decision: 'go-on', criteria: [] } } as unknown as Asked }
  }

  it('R33 and R34: outside the prediction, read again, then go on only with a reason', () => {
    const unread = outside(false)
    expect(ask(unread.state, unread.goOn).rules).toEqual(expect.arrayContaining(['R33', 'R34']))
    const reread = outside(true)
    expect(ask(reread.state, reread.goOn)).toMatchObject({ outcome: 'needs-reason', rules: ['R33'] })
    const overrides = [{ rule: 'R33', reason: 'Slack in the left pin was taken up.' }]
    expect(ask(reread.state, { ...reread.goOn, overrides }).outcome).toBe('allowed')
  })

  it('R35: at full load the witness reads the gauge first', () => {
    const { state, entry } = before('decided', { nth: 3 })
    const climb = state.legs[0]?.climbs[0]
    const stages =
      climb?.stages.map((stage) =>
        stage.percent < 100 ? stage : { ...stage, attempts: stage.attempts.map((attempt) => ({ ...attempt, independent: null })) },
      ) ?? []
    const unread: ProofTestState = { ...state, legs: state.legs.map((leg) => ({ ...leg, climbs: climb ? [{ ...climb, stages }] : [] })) }
    expect(ask(unread, asEntered(entry)).rules).toEqual(['R35'])
    expect(ask(state, asEntered(entry)).outcome).toBe('allowed')
  })

  it('R36: a pause under load of more than five minutes ends in release', () => {
    const { state, entry } = before('row-read')
    const mark = markOf(entry)
    const paused: ProofTestState = { ...state, paused: { at: mark.at, mark, why: '' } }
    expect(ask(paused, { kind: 'resumed', payload: {} }, later(mark, 299)).outcome).toBe('allowed')
    expect(ask(paused, { kind: 'resumed', payload: {} }, later(mark, 301)).rules).toEqual(['R36'])
  })

  it('R37: the set waits for release and recovery', () => {
    const { state, entry } = before('set-read')
    const released = state.legs[0]?.climbs[0]?.released?.mark
    if (!released) throw new Error('The climb was released.')
    expect(ask(state, { ...asEntered(entry), mark: later(released, 119) }).rules).toEqual(['R37'])
    expect(ask(before('released', { nth: 1 }).state, asEntered(entry)).rules).toContain('R37')
  })

  it('R38: nobody examines a joint of a loaded press', () => {
    const { state } = before('row-read')
    expect(ask(state, examined(state, 3, { occasion: 'after load' })).rules).toContain('R38')
  })

  it('R39: the witness reads the gauge or says why not', () => {
    const { state, entry } = before('independent-read')
    const empty = { ...entry.payload, readings: [] }
    expect(ask(state, { ...asEntered(entry), payload: empty } as unknown as Asked).rules).toEqual(['R39'])
    expect(ask(state, { ...asEntered(entry), payload: { ...empty, notTaken: 'Called away.' } } as unknown as Asked).outcome).toBe('allowed')
  })
})

describe('conclusion and corrections', () => {
  const conclude = (state: ProofTestState, conclusion: 'accepted' | 'rejected', why = '') =>
    ask(state, { kind: 'concluded', payload: { conclusion, why, evaluation: {}, coreVersion: '1' } })

  it('R41: a test is concluded with the load off', () => {
    expect(conclude(before('row-read').state, 'rejected', 'A crack.').rules).toContain('R41')
  })

  it('R42: accepted only when everything is in and within', () => {
    expect(conclude(before('set-read').state, 'accepted').rules).toContain('R42')
    expect(conclude(before('concluded').state, 'accepted').outcome).toBe('allowed')
  })

  it('R42: a test concluded as rejected does not turn into accepted', () => {
    const { state } = before('concluded')
    const rejected: ProofTestState = {
      ...state,
      conclusion: { seq: 90, conclusion: 'rejected', why: 'x', at: '', by: ids.lead, evaluation: {}, coreVersion: '1' },
    }
    expect(conclude(rejected, 'accepted').rules).toContain('R42')
  })

  it('R43 and R44: an irregular interlock bars accepted; anything else irregular needs a reason', () => {
    const { state } = before('concluded')
    expect(conclude({ ...state, irregular: [{ seq: 12, kind: 'stage-begun', rules: ['R15'] }] }, 'accepted').rules).toContain('R43')
    const clock = { ...state, irregular: [{ seq: 12, kind: 'row-read', rules: ['R40'] }] }
    expect(conclude(clock, 'accepted')).toMatchObject({ outcome: 'needs-reason', rules: ['R44'] })
  })

  it('R45: rejected says why', () => {
    const { state } = before('concluded')
    expect(conclude(state, 'rejected').rules).toEqual(['R45'])
    expect(conclude(state, 'rejected', 'The bed stayed bent.').outcome).toBe('allowed')
  })

  const correct = (state: ProofTestState, payload: object) =>
    ask(state, {
      kind: 'corrected',
      payload: { entryId: '', sourceId: ids.middle, text: '0.55', unit: 'mm', why: 'Misread.', readAgainByBoth: true, ...payload },
    } as unknown as Asked)

  it('R49: a correction names a reading and changes it', () => {
    const { state } = before('row-read', { nth: 1 })
    const row = state.legs[0]?.climbs[0]?.stages[0]?.attempts[0]?.rows[0]
    expect(correct(state, { entryId: ids.test }).rules).toEqual(['R49'])
    expect(correct(state, { entryId: row?.entryId, text: '0.54' }).rules).toEqual(['R49'])
    expect(correct(state, { entryId: row?.entryId }).outcome).toBe('allowed')
  })

  it('R50: under load lead and witness read it again together', () => {
    const { state } = before('row-read', { nth: 1 })
    const row = state.legs[0]?.climbs[0]?.stages[0]?.attempts[0]?.rows[0]
    expect(correct(state, { entryId: row?.entryId, readAgainByBoth: false }).rules).toEqual(['R50'])
  })

  it('R51: no decision lifts a stop', () => {
    const { entries, id } = stoppedTest()
    const concluded = entries.findIndex((entry) => entry.kind === 'concluded')
    const state = entries.slice(0, concluded).reduce(applyProofTest, emptyProofTest(id))
    const at = state.position ?? { leg: 0, climb: 0, stage: 0, attempt: 0 }
    expect(ask(state, { kind: 'decided', payload: { at, decision: 'go-on', criteria: [] } } as unknown as Asked).rules).toContain('R51')
  })
})

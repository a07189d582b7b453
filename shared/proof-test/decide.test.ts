import { describe, expect, it } from 'vitest'
import { ask, asEntered, before, type Asked } from '../../tests/factories/asked'
import { recordedTest, stoppedTest } from '../../tests/factories/recorded-test'
import { ids, openedPayload } from '../../tests/factories/test-press'
import { applyProofTest, emptyProofTest } from './apply'
import type { ProofTestState } from './state'

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

describe('photos and documents', () => {
  const [photo, page] = ['a'.repeat(64), 'b'.repeat(64)] as const
  const named = (state: ProofTestState, hashes: readonly string[]): ProofTestState => ({
    ...state,
    attachments: hashes.map((sha256) => ({ sha256, type: 'image/jpeg', size: 9, seq: 4, kind: 'observed', lost: null })),
  })
  const lost = (sha256: string) => ({ kind: 'attachment-lost', payload: { sha256, why: 'The tablet fell into the pit.' } }) as const

  it('R53: neither signs while a photo that the test names is missing', () => {
    for (const kind of ['signed', 'countersigned']) {
      const { state, entry } = before(kind)
      const held = named(state, [photo, page, photo])
      expect(ask(held, { ...asEntered(entry), absentFiles: [] }).outcome).toBe('allowed')
      const refused = ask(held, { ...asEntered(entry), absentFiles: [page] })
      expect(refused.rules).toEqual(['R53'])
      expect(refused.says).toContain('1 of 2 photos and documents is not on the server yet')
      expect(ask(held, { ...asEntered(entry), absentFiles: [page, photo] }).says).toContain('declare them lost')
      // The device can't know what the server has: the server says no when it is asked.
      expect(ask(held, asEntered(entry)).outcome).toBe('allowed')
    }
  })

  it('R53: what was declared lost keeps nobody from signing', () => {
    const { state, entry } = before('signed')
    const declared = { ...entry, kind: 'attachment-lost', payload: { ...lost(photo).payload } }
    const given = applyProofTest(named(state, [photo]), declared)
    expect(given.attachments[0]?.lost).toMatchObject({ why: 'The tablet fell into the pit.', by: ids.lead })
    expect(ask(given, { ...asEntered(entry), absentFiles: [photo] }).outcome).toBe('allowed')
  })

  it('R54: lead and witness declare a photo lost, the pump hand doesn’t, and nobody what was never named', () => {
    const { state, entry } = before('concluded')
    const held = named(state, [photo])
    expect(ask(held, lost(photo)).outcome).toBe('allowed')
    expect(ask(held, { ...lost(photo), authorId: ids.witness }).outcome).toBe('allowed')
    expect(ask(held, { ...lost(photo), authorId: ids.pumpHand }).rules).toEqual(['R54'])
    expect(ask(held, lost(page)).rules).toEqual(['R54'])
    // What the pump hand wrote stands in the ledger; the photo is still asked for.
    const byPumpHand = { ...entry, kind: 'attachment-lost', payload: { ...lost(photo).payload }, authorId: ids.pumpHand }
    expect(applyProofTest(held, byPumpHand).attachments[0]?.lost).toBeNull()
  })

  it('R3: after the lead’s signature the witness may still give a photo up, the lead may not', () => {
    const held = named(before('countersigned').state, [photo])
    expect(ask(held, { ...lost(photo), authorId: ids.witness }).outcome).toBe('allowed')
    expect(ask(held, lost(photo)).rules).toEqual(['R3'])
  })

  it('are remembered with the entry that names them, and asked for anew when another entry names a lost one', () => {
    const { state, entry } = before('concluded')
    const attachments = [{ sha256: photo, type: 'image/jpeg' as const, size: 9, name: 'Joint 7' }]
    const observed = { ...entry, kind: 'observed', payload: { at: null, what: 'other', note: 'See the photo.' }, attachments }
    const once = applyProofTest(state, observed)
    expect(once.attachments).toEqual([{ ...attachments[0], seq: entry.seq, kind: 'observed', lost: null }])
    const gone = applyProofTest(once, { ...entry, seq: entry.seq + 1, kind: 'attachment-lost', payload: { ...lost(photo).payload } })
    const again = applyProofTest(gone, { ...observed, seq: entry.seq + 2 })
    expect(again.attachments.map((one) => one.lost === null)).toEqual([false, true])
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

import { describe, expect, it } from 'vitest'
import { ask, asEntered, before, examined, later, markOf, withJoint, type Asked } from '../../tests/factories/asked'
import { firstClimb, recordedTest, stoppedTest } from '../../tests/factories/recorded-test'
import { ids } from '../../tests/factories/test-press'
import { applyProofTest, emptyProofTest } from './apply'
import { SET_UP_ITEMS, type Mark, type ProofTestDraft } from './entries'
import type { ProofTestState } from './state'

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
    const paused: ProofTestState = { ...state, paused: { at: mark.at, by: 'somebody', mark, why: '' } }
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

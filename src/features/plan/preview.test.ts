import { describe, expect, it } from 'vitest'
import { openTestRequestSchema } from '#shared/api/proof-tests'
import { foldPress } from '#shared/press/apply'
import type { PressState } from '#shared/press/state'
import type { PlanRegisters } from './api/get-plan-registers'
import { ids, names, openedPayload } from '../../../tests/factories/test-press'
import { SHIPPED_PROTOCOLS } from '#shared/proof-test/protocol'
import { legsOf, netOf, newPlan, toRequest, usualPoints, type PlanDraft, type PlanLookup } from './draft'
import { beforeLoad, plannedStages, previewOpened, tellsSetFrom, wouldRefuse, type Chosen } from './preview'

const example = openedPayload()
const mark = { at: '2026-09-14T15:20:00.000Z', bootId: ids.test, monotonicMs: 0 }
const stamp = { deviceId: ids.test, bootId: ids.test, monotonicMs: 0, observedAt: mark.at }
const nameOf = (userId: string) => names[userId] ?? ''
const lookup: PlanLookup = { nameOf, contentOf: () => example.protocol.content }

const press: PressState = foldPress(ids.press, [
  {
    id: ids.press,
    ledgerId: ids.press,
    kind: 'registered',
    v: 1,
    payload: { description: example.press, joints: example.joints, lastWorkedOn: null },
    authorId: ids.lead,
    deviceId: ids.test,
    deviceSeq: 1,
    basedOnSeq: 0,
    observedAt: mark.at,
    bootId: ids.test,
    monotonicMs: 0,
    attachments: [],
    overrides: [],
    seq: 1,
    receivedAt: mark.at,
    irregular: [],
    prevHash: '0'.repeat(64),
    hash: '1'.repeat(64),
  },
])

const registers: PlanRegisters = {
  presses: [],
  protocols: [{ ...example.protocol, archived: false }],
  instruments: example.instruments.map((instrument) => ({ ...instrument, retired: false })),
  tooling: [],
  people: Object.entries(names).map(([userId, name]) => ({ userId, name, role: 'lead' as const, addedAt: mark.at, endedAt: null })),
}

let made = 0
const nextId = () => {
  made += 1
  return `01990000-0000-7000-8000-${String(made).padStart(12, '0')}`
}

function plan(change: Partial<PlanDraft> = {}): PlanDraft {
  const points = usualPoints(example.press, nextId).map((point, index) => ({ ...point, instrumentId: ids.indicators[index] ?? '' }))
  return {
    ...newPlan(nextId, ids.press),
    protocolId: ids.protocol,
    forceInstrumentIds: [ids.gauge],
    points,
    legs: legsOf(example.protocol.content, []).map((leg) => ({ ...leg, bedHole: '4' })),
    pumpHand: { id: ids.pumpHand, name: '' },
    witness: { id: ids.witness, relation: 'works next door' },
    ...change,
  }
}

const shop = {
  id: ids.shop,
  name: 'Hollin Bridge',
  forceUnit: 'short-ton',
  pressureUnit: 'psi',
  lengthUnit: 'mm',
  walkDownHours: 12,
} as const
const chosen = (change: Partial<PlanDraft> = {}, given: Partial<Chosen> = {}): Chosen => ({
  draft: plan(change),
  registers,
  press,
  shop,
  lead: { id: ids.lead, name: nameOf(ids.lead) },
  ...given,
})

function findings(change: Partial<PlanDraft> = {}, given: Partial<Chosen> = {}): string[] {
  const opened = previewOpened(chosen(change, given))
  if (!opened) throw new Error('The plan is whole enough to preview.')
  return wouldRefuse(ids.test, opened, mark).map((finding) => finding.rule)
}

describe('what a plan asks for', () => {
  it('is a request that the server takes', () => {
    const request = openTestRequestSchema.parse(toRequest(plan(), stamp, lookup))
    expect(request.pumpHand).toEqual({ id: ids.pumpHand, name: 'Pell Navarre' })
    expect(request.net).toMatchObject({ label: 'bed middle less mean of left pin and right pin', plus: request.points[0]?.id })
    expect(request.repeatsId).toBeNull()
  })

  it('names a pump hand without an account', () => {
    const request = openTestRequestSchema.parse(toRequest(plan({ pumpHand: { id: 'somebody else', name: 'Ola Berg' } }), stamp, lookup))
    expect(request.pumpHand).toEqual({ id: null, name: 'Ola Berg' })
  })

  it('keeps the bed holes that were typed when the protocol changes', () => {
    const [leg] = legsOf(example.protocol.content, [{ label: 'Ram central', ramPosition: 'central', bedHole: '4' }])
    expect(leg?.bedHole).toBe('4')
  })

  it('combines no points when each goes by itself', () => {
    expect(netOf(plan({ combine: 'no' }))).toBeNull()
  })
})

describe('a protocol that goes above rating', () => {
  const shipped = SHIPPED_PROTOCOLS.find((one) => one.content.aboveRating)
  if (!shipped) throw new Error('A protocol that goes above rating is shipped.')
  const { content } = shipped
  const given = { registers: { ...registers, protocols: [{ ...example.protocol, content, archived: false }] } }
  const legs = legsOf(content, []).map((leg, index) => ({ ...leg, bedHole: String(4 + index) }))
  const above = (percent: string, rule = 'Customer’s order, clause 4') => ({ legs, aboveRating: { percent, rule } })
  const asked = (change: Partial<PlanDraft>) =>
    openTestRequestSchema.safeParse(toRequest(plan(change), stamp, { nameOf, contentOf: () => content }))
  const wrong = (change: Partial<PlanDraft>) => asked(change).error?.issues.map((issue) => [issue.path.join('.'), issue.message])

  it('asks for the percentage and its rule, and fills in neither', () => {
    expect(newPlan(nextId, ids.press).aboveRating).toEqual({ percent: '', rule: '' })
    expect(wrong(above('', ''))).toEqual([
      ['aboveRating.percent', 'Enter a percentage.'],
      ['aboveRating.rule', 'Name the rule that asks for it.'],
    ])
    expect(wrong(above('100'))).toEqual([['aboveRating.percent', 'Above the rated load means more than 100 %.']])
  })

  it('takes a comma', () => {
    expect(asked(above('112,5')).data?.aboveRating).toEqual({ percent: 112.5, rule: 'Customer’s order, clause 4' })
  })

  it('sends nothing of it with a protocol that does not ask', () => {
    expect(openTestRequestSchema.parse(toRequest(plan(above('110')), stamp, lookup)).aboveRating).toBeNull()
  })

  it('says what to pump to above rating', () => {
    const opened = previewOpened(chosen(above('110'), given))
    const last = opened && plannedStages(opened).at(-1)
    // 110 % of 24 000 lbf over 3.0434 in²: 8 675 psi, in steps of 50.
    expect(last).toMatchObject({ holdSeconds: 600, target: { percent: 110, exactText: '8674', text: '8650' } })
    const unknown = previewOpened(chosen(above('90'), given))
    expect(unknown && plannedStages(unknown).map((stage) => stage.target.percent)).toEqual([25, 50, 75, 100])
  })

  it('is kept shut by a rating in the train that it would pass', () => {
    expect(findings(above('150'), given)).toContain('R6')
    expect(findings(above('110'), given)).toEqual([])
  })
})

describe('what would keep a test shut', () => {
  it('is nothing when everything is in order', () => {
    expect(findings()).toEqual([])
  })

  it('is an instrument out of date, unless a reason is written down', () => {
    const late = registers.instruments.map((one) => ({
      ...one,
      calibration: one.calibration && { ...one.calibration, dueOn: '2026-09-13' },
    }))
    const given = { registers: { ...registers, instruments: late } }
    expect(findings({}, given)).toEqual(['R8'])
    expect(findings({ instrumentOverride: 'Compared with G-09 this morning.' }, given)).toEqual([])
  })

  it('is a witness who leads or pumps', () => {
    expect(findings({ witness: { id: ids.lead, relation: 'the lead' } })).toEqual(['R5'])
    expect(findings({ witness: { id: ids.pumpHand, relation: 'the pump hand' } })).toEqual(['R5'])
  })

  it('is no matter of a witness and a pump hand who are not chosen yet', () => {
    expect(findings({ witness: { id: '', relation: '' }, pumpHand: { id: '', name: '' } })).toEqual([])
  })

  it('is a target past the end of the gauge', () => {
    const short = registers.instruments.map((one) =>
      one.details.kind === 'gauge' ? { ...one, details: { ...one.details, fullScale: { text: '7000', unit: 'psi' as const } } } : one,
    )
    expect(findings({}, { registers: { ...registers, instruments: short } })).toEqual(['R7'])
  })

  it('is a gap in the load path', () => {
    const gap: PressState = {
      ...press,
      joints: press.joints.filter((joint) => !joint.name.includes('left pin') && !joint.name.includes('Left pin')),
    }
    expect(findings({}, { press: gap })).toEqual(['R9'])
  })

  it('names the joints that no load goes on before', () => {
    const [first, ...rest] = press.joints
    if (!first) throw new Error('The press has joints.')
    const tacked: PressState = { ...press, joints: [{ ...first, makeUp: 'tacked' }, ...rest] }
    expect(beforeLoad(tacked)[0]).toBe('Joint 1 (Head beam to left upright) is only tacked. Weld it out.')
  })
})

describe('what to pump to', () => {
  it('is rounded down to what the gauge can be read to', () => {
    const opened = previewOpened(chosen())
    // 12 short tons are 24 000 lbf; a 50 mm bore is π/4 · (50/25.4)² = 3.0434 in²: 24 000/3.0434 = 7 886 psi, in steps of 50.
    const full = opened && plannedStages(opened).at(-1)
    expect(full?.target).toMatchObject({ percent: 100, exactText: '7886', text: '7850' })
    expect(full?.target.window).toMatchObject({ fromText: '7750', toText: '8250' })
  })

  it('warns where the gauge is low on its scale, or cannot tell', () => {
    const opened = previewOpened(chosen())
    const warnings = opened ? plannedStages(opened).flatMap((stage) => stage.warnings) : []
    expect(warnings).toContainEqual(expect.stringContaining('below one quarter'))
  })

  it('says how far a point has to move for its indicator to tell the permanent set', () => {
    const opened = previewOpened(chosen())
    // Increments of 0.01 mm: two of them are 5 % of 0.40 mm.
    expect(tellsSetFrom(opened, ids.indicators[0] ?? '')).toMatch(/^Two of its increments are 5 % of 0\.40\smm\./)
    expect(tellsSetFrom(opened, ids.gauge)).toBeNull()
    expect(tellsSetFrom(null, ids.indicators[0] ?? '')).toBeNull()
  })

  it('warns where the gauge is above three quarters of its scale', () => {
    const short = registers.instruments.map((one) =>
      one.details.kind === 'gauge' ? { ...one, details: { ...one.details, fullScale: { text: '10000', unit: 'psi' as const } } } : one,
    )
    const opened = previewOpened(chosen({}, { registers: { ...registers, instruments: short } }))
    const full = opened && plannedStages(opened).at(-1)
    // 7 850 psi of 10 000.
    expect(full?.warnings).toContainEqual(expect.stringMatching(/^100 %: The target is at 79 % of the scale, above three quarters/))
  })

  it('says in the gauge’s own unit where what can be read falls short of the stage', () => {
    const coarse = registers.instruments.map((one) =>
      one.details.kind === 'gauge' ? { ...one, details: { ...one.details, increment: { text: '200', unit: 'psi' as const } } } : one,
    )
    const opened = previewOpened(chosen({}, { registers: { ...registers, instruments: coarse } }))
    const first = opened && plannedStages(opened)[0]
    // A quarter of 7 886 psi is 1 971: in steps of 200 that is 1 800, 8.7 % less, and 2 000 is 1.4 % more.
    expect(first?.warnings[0]).toMatch(
      /^25 %: 1\s?800\spsi makes 2\.74\sshort tons, less than.*The next value that can be read, 2\s?000\spsi makes/,
    )
  })

  it('says that a gauge cannot tell whether a stage is reached', () => {
    const coarse = registers.instruments.map((one) =>
      one.details.kind === 'gauge'
        ? { ...one, calibration: null, details: { ...one.details, accuracy: { standard: 'en-837-1' as const, class: 4 as const } } }
        : one,
    )
    const opened = previewOpened(chosen({}, { registers: { ...registers, instruments: coarse } }))
    const first = opened && plannedStages(opened)[0]
    expect(first?.warnings).toContainEqual(expect.stringContaining('25 %: this gauge cannot tell whether the stage is reached'))
  })

  it('is not said before press, protocol and gauge are chosen', () => {
    expect(previewOpened(chosen({ protocolId: '' }))).toBeNull()
    expect(previewOpened(chosen({ forceInstrumentIds: [''] }))).toBeNull()
  })
})

import { v7 as newId } from 'uuid'
import { appendResponseSchema, entriesResponseSchema, type AppendResponse } from '#shared/api/ledger'
import type { InstrumentRow } from '#shared/api/instruments'
import { openTestResponseSchema, type OpenTestRequest } from '#shared/api/proof-tests'
import { protocolListSchema } from '#shared/api/protocols'
import type { EntryDraft, Override } from '#shared/ledger/envelope'
import { foldProofTest } from '#shared/proof-test/apply'
import { snapshotsOf } from '#shared/proof-test/decide'
import { SET_UP_ITEMS, type Mark, type ProofTestDraft, type Reading } from '#shared/proof-test/entries'
import { CORE_VERSION, evaluateTest, freezeEvaluation } from '#shared/proof-test/evaluate'
import { stageTarget } from '#shared/proof-test/force'
import { nextStep, type Step } from '#shared/proof-test/steps'
import type { ProofTestState } from '#shared/proof-test/state'
import { answered } from './client'
import { calibration, enterInstrument, gauge, indicator } from './instruments'
import { openStaffedShop, type SignedInPerson } from './people'
import { openedPayload } from './test-press'

export type Staff = Awaited<ReturnType<typeof openStaffedShop>>

/** A draft as the device of a person would make it; marks are made so that holds are long enough. */
export class Device {
  readonly deviceId = newId()
  readonly bootId = newId()
  private deviceSeq = 0
  private elapsed = 0

  constructor(
    readonly person: SignedInPerson,
    readonly ledgerId: string,
  ) {}

  mark(afterSeconds = 0): Mark {
    this.elapsed += afterSeconds * 1000
    return { at: new Date().toISOString(), bootId: this.bootId, monotonicMs: this.elapsed }
  }

  /** Where this device's clock stands: marks move it on. */
  get clock(): Pick<EntryDraft, 'bootId' | 'monotonicMs'> {
    return { bootId: this.bootId, monotonicMs: this.elapsed }
  }

  draft(draft: { kind: string; payload: object }, overrides: Override[] = []): EntryDraft {
    this.deviceSeq += 1
    return {
      id: newId(),
      ledgerId: this.ledgerId,
      kind: draft.kind,
      v: 1,
      payload: { ...draft.payload },
      authorId: this.person.userId,
      deviceId: this.deviceId,
      deviceSeq: this.deviceSeq,
      basedOnSeq: 0,
      observedAt: new Date().toISOString(),
      bootId: this.bootId,
      monotonicMs: this.elapsed,
      attachments: [],
      overrides,
    }
  }
}

export async function post(person: SignedInPerson, path: string, entries: readonly EntryDraft[], status = 200): Promise<AppendResponse> {
  const response = await answered(() => person.client.post(path, { sentAt: new Date().toISOString(), entries }))
  if (response.status !== status) throw new Error(`${path} answered ${response.status}, not ${status}: ${response.text}`)
  return appendResponseSchema.parse(response.body)
}

/** Enters the press of the record's example, or one like it, and returns its id. */
export async function enterPress(
  person: SignedInPerson,
  change: (payload: ReturnType<typeof openedPayload>) => object = () => ({}),
): Promise<string> {
  const example = openedPayload()
  const pressId = newId()
  const payload = { description: example.press, joints: example.joints, lastWorkedOn: null, ...change(example) }
  const { results } = await post(
    person,
    `/api/presses?shop=${person.shopId}`,
    [new Device(person, pressId).draft({ kind: 'registered', payload })],
    201,
  )
  if (results[0]?.outcome !== 'kept') throw new Error('The press was not kept.')
  return pressId
}

const day = (fromToday: number): string => new Date(Date.now() + fromToday * 86_400_000).toISOString().slice(0, 10)
const inDate = () => calibration({ calibratedOn: day(-100), dueOn: day(265) })

/** Gauge (psi) at each stage and the stiffness of net deflection, N/m; the pins move a fifth of the middle. */
export interface Frame {
  stiffness: (percent: number) => number
  set: number
}
const spring: Frame = { stiffness: () => 60e6, set: 0 }

/** A test over HTTP: lead and witness each with a device, driven forward by what the core asks for next. */
export class ApiRun {
  readonly lead: Device
  readonly witness: Device
  state: ProofTestState
  number = ''

  private constructor(
    readonly staff: Staff,
    readonly id: string,
    readonly pressId: string,
  ) {
    this.lead = new Device(staff.lead, id)
    this.witness = new Device(staff.witness, id)
    this.state = foldProofTest(id, [])
  }

  static async open(
    given: { staff?: Staff; pressId?: string; protocol?: string; change?: (request: OpenTestRequest) => OpenTestRequest } = {},
  ): Promise<ApiRun> {
    const staff = given.staff ?? (await openStaffedShop())
    const run = new ApiRun(staff, newId(), given.pressId ?? (await enterPress(staff.lead)))
    const request = await run.request(given.protocol)
    const response = await staff.lead.client.post(
      `/api/proof-tests?shop=${staff.lead.shopId}`,
      given.change ? given.change(request) : request,
    )
    if (response.status !== 201) throw new Error(`${response.status} ${JSON.stringify(response.body)}`)
    run.number = openTestResponseSchema.parse(response.body).number
    await run.refresh()
    return run
  }

  /** Goes on with a test that somebody opened elsewhere, as in a browser. */
  static async follow(staff: Staff, id: string, pressId: string): Promise<ApiRun> {
    const run = new ApiRun(staff, id, pressId)
    await run.refresh()
    run.number = run.state.opened?.number ?? ''
    return run
  }

  async request(name = 'First load by quarters'): Promise<OpenTestRequest> {
    const { lead } = this.staff
    const unique = newId().slice(-8)
    const read = await enterInstrument(
      lead,
      gauge({ code: `G-${unique}`, fullScale: { text: '15000', unit: 'psi' }, increment: { text: '50', unit: 'psi' } }),
      [inDate()],
    )
    const indicators: InstrumentRow[] = []
    for (const letter of ['M', 'L', 'R']) {
      const details = indicator({
        code: `${letter}-${unique}`,
        increment: { text: '0.01', unit: 'mm' },
        errorLimit: { text: '0.005', unit: 'mm' },
      })
      indicators.push((await enterInstrument(lead, details, [inDate()])).instrument)
    }
    const protocols = protocolListSchema.parse((await lead.client.get(`/api/protocols?shop=${lead.shopId}`).expect(200)).body).protocols
    const protocol = protocols.find((one) => one.name === name)
    if (!protocol) throw new Error('A shop has the shipped protocols.')
    const points = openedPayload().points.map((point, index) => ({ ...point, instrumentId: indicators[index]?.id ?? '' }))
    return {
      id: this.id,
      entryId: newId(),
      deviceId: this.lead.deviceId,
      bootId: this.lead.bootId,
      monotonicMs: 0,
      observedAt: new Date().toISOString(),
      pressId: this.pressId,
      protocolId: protocol.id,
      forceInstrumentIds: [read.instrument.id],
      points,
      net: openedPayload().net,
      legs: protocol.content.legs.map(({ label, ramPosition }, index) => ({ label, ramPosition, bedHole: String(4 + index) })),
      pumpHand: { id: null, name: 'Pim Noor' },
      witness: { id: this.staff.witness.userId, relation: 'works next door' },
      repeatsId: null,
      instrumentOverride: null,
    }
  }

  get path(): string {
    return `/api/proof-tests/${this.id}/entries`
  }

  async refresh(): Promise<void> {
    const response = await answered(() => this.staff.lead.client.get(this.path))
    if (response.status !== 200) throw new Error(`${this.path} answered ${response.status}: ${response.text}`)
    this.state = foldProofTest(this.id, entriesResponseSchema.parse(response.body).entries)
  }

  /** Sends one entry of a device and folds what came of it. */
  async send(device: Device, draft: ProofTestDraft, overrides: Override[] = []): Promise<AppendResponse['results'][number]> {
    const { results } = await post(device.person, this.path, [device.draft(draft, overrides)])
    await this.refresh()
    const [result] = results
    if (!result) throw new Error('Every entry has a result.')
    return result
  }

  private readings(percent: number, frame: Frame, set = 0): Reading[] {
    const { opened } = this.state
    if (!opened) throw new Error('The test is open.')
    const target = percent > 0 ? stageTarget(opened, percent) : null
    const net = target ? (target.readableForce / frame.stiffness(percent)) * 1000 : set * 1000
    const pins = net * 0.25
    const [middle, left, right] = opened.points.map((point) => point.id)
    return [
      { sourceId: opened.forceInstrumentIds[0] ?? '', text: target?.text ?? '0', unit: 'psi' },
      { sourceId: middle ?? '', text: (net + pins).toFixed(2), unit: 'mm' },
      { sourceId: left ?? '', text: pins.toFixed(2), unit: 'mm' },
      { sourceId: right ?? '', text: pins.toFixed(2), unit: 'mm' },
    ]
  }

  /** The drafts that a lead and a witness would make for a step. */
  draftsFor(step: Step, frame: Frame = spring): [Device, ProofTestDraft][] {
    const { lead, witness } = this
    const { opened } = this.state
    if (!opened) throw new Error('The test is open.')
    const row = (percent: number, after: number, set = 0) => ({
      mark: lead.mark(after),
      readings: this.readings(percent, frame, set),
      typedAgain: opened.points.map((point) => point.id),
    })
    const examine = (occasion: 'before load' | 'after load'): [Device, ProofTestDraft][] =>
      this.state.joints.map(({ joint }) => [
        lead,
        { kind: 'joint-examined', payload: { occasion, jointId: joint.id, method: 'visual', result: 'accepted', remark: '', cold: true } },
      ])
    switch (step.name) {
      case 'walk-down':
        return [
          ...examine('before load'),
          [witness, { kind: 'load-path-confirmed', payload: { by: 'witness', joints: this.state.joints.length } }],
        ]
      case 'set-up':
        return [[lead, { kind: 'set-up-confirmed', payload: { items: [...SET_UP_ITEMS], reliefSet: null, strokePercent: '40', note: '' } }]]
      case 'begin-leg':
        return [[lead, { kind: 'leg-begun', payload: { leg: step.leg, bedHoleConfirmed: '4' } }]]
      case 'seating': {
        const payload = {
          leg: step.leg,
          ...row(0, 0),
          readings: [{ sourceId: opened.forceInstrumentIds[0] ?? '', text: '350', unit: 'psi' as const }],
        }
        return [[lead, { kind: 'seated', payload }]]
      }
      case 'seating-release':
      case 'release':
      case 'stopped-release':
        return [[lead, { kind: 'released', payload: { gaugeZero: true, ramClear: true } }]]
      case 'datum':
      case 'datum-watch':
        return [[lead, { kind: 'datum-read', payload: { leg: step.leg, climb: step.climb, ...row(0, 125), temperature: null } }]]
      case 'begin-stage':
        return [[lead, { kind: 'stage-begun', payload: { at: step.at } }]]
      case 'read-row':
        return [[lead, { kind: 'row-read', payload: { at: step.at, occasion: 'hold start', ...row(step.percent, 20) } }]]
      case 'hold':
        return [[lead, { kind: 'row-read', payload: { at: step.at, occasion: 'hold end', ...row(step.percent, 601) } }]]
      case 'independent':
        return [
          [
            witness,
            {
              kind: 'independent-read',
              payload: { at: step.at, readings: this.readings(step.percent, frame).slice(0, 1), notTaken: null, where: 'own device' },
            },
          ],
        ]
      case 'decide':
        return [[lead, { kind: 'decided', payload: { at: step.at, decision: 'go-on', criteria: snapshotsOf(step.stage) } }]]
      case 'stop-now':
      case 'wait':
        return [[lead, { kind: 'decided', payload: { at: step.at, decision: 'stop', criteria: snapshotsOf(step.stage) } }]]
      case 'recovery':
        return [[lead, { kind: 'set-read', payload: { leg: step.leg, climb: step.climb, ...row(0, 130, frame.set), temperature: null } }]]
      case 'after-walk-down':
        return examine('after load')
      case 'conclude': {
        const evaluation = evaluateTest(this.state)
        const conclusion = evaluation.against.length === 0 ? ('accepted' as const) : ('rejected' as const)
        const why = conclusion === 'accepted' ? '' : (evaluation.against[0] ?? 'Stopped.')
        return [
          [lead, { kind: 'concluded', payload: { conclusion, why, evaluation: freezeEvaluation(evaluation), coreVersion: CORE_VERSION } }],
        ]
      }
      case 'sign':
      case 'countersign':
      case 'sealed':
        return []
    }
  }

  /** Drives the test until it asks for `until`; every entry on the way must be kept without a mark. */
  async driveTo(until: Step['name'], frame: Frame = spring): Promise<Step> {
    for (let turns = 0; turns < 200; turns += 1) {
      const step = nextStep(this.state)
      if (step.name === until) return step
      const drafts = this.draftsFor(step, frame)
      if (drafts.length === 0) throw new Error(`The test waits at ${step.name}, not at ${until}.`)
      for (const [device, draft] of drafts) {
        const { results } = await post(device.person, this.path, [device.draft(draft)])
        const [result] = results
        if (result?.outcome !== 'kept')
          throw new Error(`${draft.kind}: ${result?.outcome === 'refused' ? result.problem.detail : 'no result'}`)
        if (result.entry.irregular.length > 0) throw new Error(`${draft.kind} is marked ${result.entry.irregular.join(', ')}.`)
      }
      await this.refresh()
    }
    throw new Error(`The test never came to ${until}.`)
  }

  sign(as: 'lead' | 'witness', changes: object = {}) {
    const device = as === 'lead' ? this.lead : this.witness
    const meaning = as === 'lead' ? 'I ran this test and these are its readings.' : 'I was present and read the gauge myself.'
    const body = { as, entryId: newId(), password: device.person.password, headHash: this.state.headHash, meaning, ...changes }
    return device.person.client.post(`/api/proof-tests/${this.id}/signatures`, body)
  }
}

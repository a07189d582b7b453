import { v7 as newId } from 'uuid'
import { openTestRequestSchema, type OpenTestRequest } from '#shared/api/proof-tests'
import { surprising } from '#shared/proof-test/rules-under-load'
import { snapshotsOf } from '#shared/proof-test/decide'
import {
  PROOF_TEST_VERSION,
  SET_UP_ITEMS,
  type Conclusion,
  type Opened,
  type Position,
  type ProofTestDraft,
  type ProofTestPayload,
  type Reading,
} from '#shared/proof-test/entries'
import { CORE_VERSION, evaluateTest, freezeEvaluation } from '#shared/proof-test/evaluate'
import { forceOf, leadInstrument, stageTarget } from '#shared/proof-test/force'
import type { JointState, ProofTestState } from '#shared/proof-test/state'
import { nextStep, type Step } from '#shared/proof-test/steps'
import { decimalsOf, toSI, toUnit } from '#shared/units'
import type { Attachment, LedgerEntry } from '#shared/ledger/envelope'
import { appendToTest, lockTest } from '../../services/test-entries'
import { openTest } from '../../services/open-test'
import { parseProofTestDraft } from '../../ledger/parse'
import { signTest } from '../../services/sign-test'
import { keepDemoPhoto } from './demo-files'
import type { DrawnSubject } from './demo-drawings'
import { Tablets, workAt, writingAt, type Desk } from './desk'
import { asRead, FrameUnderLoad, type FrameBehaviour } from './frame-behaviour'

/** A slip of the pen at one row: two digits swapped, and put right under load by lead and witness together. */
export interface Slip {
  percent: number
  occasion: 'hold start' | 'hold end'
  point: number
  why: string
}

/** Something that somebody heard or saw while a stage was held. */
export interface Remark {
  percent: number
  by: 'lead' | 'witness'
  what: ProofTestPayload<'observed'>['what']
  note: string
  photo?: { of: DrawnSubject; name: string }
}

export interface RunScript {
  shopId: string
  leadId: string
  /** When the test is opened, in ms. */
  at: number
  request: Omit<
    OpenTestRequest,
    'id' | 'entryId' | 'deviceId' | 'bootId' | 'monotonicMs' | 'observedAt' | 'repeatsId' | 'instrumentOverride'
  >
  repeatsId?: string
  /** One for each leg. */
  frames: readonly FrameBehaviour[]
  reliefSet: ProofTestPayload<'set-up-confirmed'>['reliefSet']
  strokePercent: string
  temperature: string
  slips?: readonly Slip[]
  remarks?: readonly Remark[]
  conclusion?: { conclusion: Conclusion; why: string }
}

/** Seconds that things take on the floor; holds and waits come from the protocol. */
const PACE = { joint: 105, setUp: 320, leg: 150, pump: 70, typing: 16, settle: 45, decide: 12, release: 55, read: 35, sign: 240 } as const
const MOST_STEPS = 400

const METHODS = { weld: 'dye penetrant', pin: 'measured', bolt: 'visual', thread: 'measured', bearing: 'visual' } as const

/** The same text with its last two different neighbouring digits swapped, as it happens when typing. */
export function swapDigits(text: string): string {
  for (let index = text.length - 1; index > 0; index -= 1) {
    const [left = '', right = ''] = text.slice(index - 1, index + 1)
    if (/\d/.test(left) && /\d/.test(right) && left !== right) return text.slice(0, index - 1) + right + left + text.slice(index + 1)
  }
  throw new Error(`No two digits of ${text} can be swapped.`)
}

/**
 * A proof test as a lead and a witness would make it, driven forward by the core's own next step and written
 * by the real writer. It decides nothing: what the core says to each reading is what happens.
 */
export class ScriptedRun {
  private readonly tablets: Tablets
  private frame: FrameUnderLoad | undefined
  private holdFrom = 0

  private constructor(
    private readonly desk: Desk,
    private readonly script: RunScript,
    readonly id: string,
    private clock: number,
    private current: ProofTestState,
    tablets: Tablets,
  ) {
    this.tablets = tablets
  }

  /** Opens the test: what the registers say at that moment is frozen into it. */
  static async open(desk: Desk, script: RunScript): Promise<ScriptedRun> {
    const { at, shopId, leadId } = script
    const id = newId({ msecs: at })
    const tablets = new Tablets(id, at - 47 * 60_000)
    const request = openTestRequestSchema.parse({
      ...script.request,
      id,
      entryId: newId({ msecs: at }),
      ...tablets.stamp(leadId, at),
      repeatsId: script.repeatsId ?? null,
      instrumentOverride: null,
    })
    tablets.count(leadId)
    const writing = writingAt(desk, at + 430)
    await openTest(writing, await workAt(desk, shopId, leadId, at + 430), request)
    const { state } = await lockTest(writing, leadId, id)
    return new ScriptedRun(desk, script, id, at, state, tablets)
  }

  get state(): ProofTestState {
    return this.current
  }

  /** Goes on to the first step that is wanted, or to the end of the test. */
  async until(wanted: (step: Step) => boolean = () => false): Promise<this> {
    for (let taken = 0; taken < MOST_STEPS; taken += 1) {
      const step = nextStep(this.current)
      if (step.name === 'sealed' || wanted(step)) return this
      await this.take(step)
    }
    throw new Error('The scripted test does not come to an end.')
  }

  /** Nothing happens until this moment, in ms. */
  waitUntil(at: number): this {
    this.clock = Math.max(this.clock, at)
    return this
  }

  /** The witness calls a stop. */
  async stop(why: string): Promise<this> {
    this.pass(8)
    await this.write({ kind: 'stopped', payload: { cause: 'called', why } }, this.witnessId)
    return this
  }

  private get opened(): Opened {
    const { opened } = this.current
    if (!opened) throw new Error('The test is not open.')
    return opened
  }

  private get witnessId(): string {
    return this.script.request.witness.id
  }

  private pass(seconds: number): void {
    // Nobody takes the same time twice; the entries made so far stand in for chance, so that every load tells the same story.
    this.clock += (seconds + ((this.current.entryCount * 7) % 11)) * 1000
  }

  private async write(draft: ProofTestDraft, by = this.script.leadId, attachments: Attachment[] = []): Promise<LedgerEntry> {
    const at = this.clock
    const entry = this.tablets.draft({ personId: by, at, ...draft, v: PROOF_TEST_VERSION, basedOnSeq: this.current.headSeq, attachments })
    const writing = writingAt(this.desk, at + 190 + ((this.current.entryCount * 137) % 430))
    const locked = await lockTest(writing, by, this.id)
    const written = await appendToTest(writing, locked, parseProofTestDraft(entry), { clockOff: 0 })
    this.current = locked.state
    return written
  }

  private async take(step: Step): Promise<void> {
    switch (step.name) {
      case 'walk-down':
        return step.joint ? this.examine(step.joint, 'before load') : this.confirmLoadPath()
      case 'after-walk-down':
        return step.joint ? this.examine(step.joint, 'after load') : undefined
      case 'set-up':
        return this.setUp()
      case 'begin-leg':
        return this.beginLeg(step.leg)
      case 'seating':
        return this.seat(step.leg)
      case 'seating-release':
      case 'release':
      case 'stopped-release':
        this.pass(PACE.release)
        await this.write({ kind: 'released', payload: { gaugeZero: true, ramClear: true } })
        return
      case 'datum':
      case 'datum-watch':
        return this.readDatum(step)
      case 'recovery':
        return this.readSet(step.leg, step.climb)
      case 'begin-stage':
        this.pass(PACE.decide)
        await this.write({ kind: 'stage-begun', payload: { at: step.at } })
        return
      case 'read-row':
        return this.readRow(step.at, step.percent, 'hold start')
      case 'hold':
        return this.readRow(step.at, step.percent, 'hold end')
      case 'independent':
        return this.readIndependently(step.at)
      case 'decide':
      case 'stop-now':
        this.pass(PACE.decide)
        await this.write({
          kind: 'decided',
          payload: { at: step.at, decision: step.name === 'decide' ? 'go-on' : 'stop', criteria: snapshotsOf(step.stage) },
        })
        return
      case 'conclude':
        return this.conclude()
      case 'sign':
        return this.sign('lead')
      case 'countersign':
        return this.sign('witness')
      case 'wait':
      case 'sealed':
        throw new Error(`The script has no part for the step “${step.name}”.`)
    }
  }

  private async examine({ joint }: JointState, occasion: 'before load' | 'after load'): Promise<void> {
    this.pass(PACE.joint)
    await this.write({
      kind: 'joint-examined',
      payload: { occasion, jointId: joint.id, method: METHODS[joint.kind], result: 'accepted', remark: '', cold: true },
    })
  }

  private async confirmLoadPath(): Promise<void> {
    this.pass(PACE.joint)
    await this.write({ kind: 'load-path-confirmed', payload: { by: 'witness', joints: this.current.joints.length } }, this.witnessId)
  }

  private async setUp(): Promise<void> {
    this.pass(PACE.setUp)
    const { reliefSet, strokePercent } = this.script
    await this.write({ kind: 'set-up-confirmed', payload: { items: [...SET_UP_ITEMS], reliefSet, strokePercent, note: '' } })
  }

  private async beginLeg(leg: number): Promise<void> {
    this.pass(PACE.leg)
    const behaviour = this.script.frames[leg]
    if (!behaviour) throw new Error(`No frame is written for leg ${leg + 1}.`)
    this.frame = new FrameUnderLoad(behaviour, toSI(this.opened.press.ratedLoad) / 1000)
    await this.write({ kind: 'leg-begun', payload: { leg, bedHoleConfirmed: this.opened.legs[leg]?.bedHole ?? '' } })
  }

  private async seat(leg: number): Promise<void> {
    this.pass(PACE.pump)
    const mark = this.tablets.mark(this.script.leadId, this.clock)
    this.pass(PACE.typing)
    const readings = this.readings(this.opened.protocol.content.seatingPercent, 0)
    await this.write({ kind: 'seated', payload: { leg, mark, readings, typedAgain: [] } })
  }

  private async readDatum(step: { name: 'datum' | 'datum-watch'; leg: number; climb: number }): Promise<void> {
    if (step.name === 'datum') this.pass(PACE.read)
    else this.clock = this.holdFrom + this.opened.protocol.content.datumWatchSeconds * 1000 + 2_000
    const { mark, readings } = this.unloadedRow()
    this.holdFrom = Date.parse(mark.at)
    this.pass(PACE.typing)
    const { leg, climb } = step
    await this.write({ kind: 'datum-read', payload: { leg, climb, mark, readings, typedAgain: [], temperature: this.temperature() } })
  }

  private async readSet(leg: number, climb: number): Promise<void> {
    const released = this.current.legs[leg]?.climbs[climb]?.released
    this.clock = Math.max(this.clock, Date.parse(released?.at ?? '')) + this.opened.protocol.content.recoverySeconds * 1000
    this.pass(4)
    const { mark, readings } = this.unloadedRow()
    this.pass(PACE.typing)
    await this.write({ kind: 'set-read', payload: { leg, climb, mark, readings, typedAgain: [], temperature: this.temperature() } })
  }

  private async readRow(at: Position, percent: number, occasion: 'hold start' | 'hold end'): Promise<void> {
    const stage = this.current.legs[at.leg]?.climbs[at.climb]?.stages[at.stage]
    if (occasion === 'hold start') {
      this.pass(PACE.pump + PACE.settle)
      this.holdFrom = this.clock
    } else this.clock = Math.max(this.clock, this.holdFrom + (stage?.holdSeconds ?? 0) * 1000 + 3_000)
    const minutes = (this.clock - this.holdFrom) / 60_000
    const mark = this.tablets.mark(this.script.leadId, this.clock)
    const right = this.readings(percent, minutes)
    const slip = at.climb === 0 ? this.script.slips?.find((one) => one.percent === percent && one.occasion === occasion) : undefined
    const sourceId = slip && this.opened.points[slip.point]?.id
    const readings = right.map((reading) => (reading.sourceId === sourceId ? { ...reading, text: swapDigits(reading.text) } : reading))
    this.pass(PACE.typing)
    const typedAgain = surprising(this.current, at, readings)
    const row = await this.write({ kind: 'row-read', payload: { at, occasion, mark, readings, typedAgain } })
    const meant = right.find((reading) => reading.sourceId === sourceId)
    if (slip && meant) {
      this.pass(PACE.decide)
      const payload = { entryId: row.id, ...meant, why: slip.why, readAgainByBoth: true }
      await this.write({ kind: 'corrected', payload })
    }
    if (occasion === 'hold start' && at.climb === 0) await this.remark(at, percent)
  }

  private async remark(at: Position, percent: number): Promise<void> {
    for (const { by, what, note, photo } of this.script.remarks?.filter((one) => one.percent === percent) ?? []) {
      this.pass(5)
      const photos = photo ? [await keepDemoPhoto(this.desk, this.script.shopId, this.clock, photo.of, photo.name)] : []
      await this.write({ kind: 'observed', payload: { at, what, note } }, by === 'witness' ? this.witnessId : this.script.leadId, photos)
    }
  }

  private async readIndependently(at: Position): Promise<void> {
    this.pass(PACE.decide)
    const last = this.current.legs[at.leg]?.climbs[at.climb]?.stages[at.stage]?.attempts[at.attempt]?.rows.at(-1)
    const readings = (last?.readings ?? []).filter((reading) => this.opened.forceInstrumentIds.includes(reading.sourceId))
    await this.write({ kind: 'independent-read', payload: { at, readings, notTaken: null, where: 'own device' } }, this.witnessId)
  }

  private async conclude(): Promise<void> {
    this.pass(PACE.sign)
    const { conclusion, why } = this.script.conclusion ?? { conclusion: 'accepted', why: '' }
    const evaluation = freezeEvaluation(evaluateTest(this.current))
    await this.write({ kind: 'concluded', payload: { conclusion, why, evaluation, coreVersion: CORE_VERSION } })
  }

  private async sign(as: 'lead' | 'witness'): Promise<void> {
    this.pass(as === 'lead' ? PACE.decide * 3 : PACE.sign * 2)
    const userId = as === 'lead' ? this.script.leadId : this.witnessId
    const writing = writingAt(this.desk, this.clock)
    const meaning = as === 'lead' ? 'I ran this test and these are its readings.' : 'I was present and read the gauge myself.'
    const request = { as, entryId: newId({ msecs: this.clock }), password: '', headHash: this.current.headHash, meaning }
    await signTest(writing, this.desk.sealing, userId, this.id, request)
    this.current = (await lockTest(writing, userId, this.id)).state
  }

  private temperature(): { text: string; unit: 'C' } {
    return { text: this.script.temperature, unit: 'C' }
  }

  private unloadedRow(): { mark: ReturnType<Tablets['mark']>; readings: Reading[] } {
    return { mark: this.tablets.mark(this.script.leadId, this.clock), readings: this.readings(0, 0) }
  }

  /** What gauge and indicators show at a percentage of the rated load, after so many minutes of hold. */
  private readings(percent: number, minutes: number): Reading[] {
    const { opened, frame } = this
    const instrument = leadInstrument(opened)
    if (!instrument || instrument.details.kind === 'indicator' || !frame) throw new Error('The leg has not been begun.')
    const { increment } = instrument.details
    const step = toSI(increment)
    const target = percent > 0 ? stageTarget(opened, percent) : null
    const pumpedTo = target ? (target.belowTolerance ? target.window.from : target.readable) : 0
    const text = asRead((pumpedTo * frame.leftAfter(minutes)) / step, 1, 0)
    const gauge: Reading = {
      sourceId: instrument.id,
      text: toUnit(Number(text) * step, increment.unit).toFixed(decimalsOf(increment)),
      unit: increment.unit,
    }
    const force = (forceOf(opened, [gauge])?.force ?? 0) / 1000
    const points = opened.points.map((point, index): Reading => {
      const details = opened.instruments.find((one) => one.id === point.instrumentId)?.details
      if (details?.kind !== 'indicator') throw new Error(`No indicator reads ${point.label}.`)
      const inUnit = toUnit(frame.standsAt(index, force, minutes) / 1000, details.increment.unit)
      const smallest = toUnit(toSI(details.increment), details.increment.unit)
      return { sourceId: point.id, text: asRead(inUnit, smallest, decimalsOf(details.increment)), unit: details.increment.unit }
    })
    return [gauge, ...points]
  }
}

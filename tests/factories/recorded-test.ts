import { entryText, type StoredEntry } from '#shared/ledger/chain'
import type { LedgerEntry } from '#shared/ledger/envelope'
import { CORE_VERSION, evaluateTest, freezeEvaluation } from '#shared/proof-test/evaluate'
import { evaluateClimb } from '#shared/proof-test/evaluate-climb'
import { SET_UP_ITEMS } from '#shared/proof-test/entries'
import type { Conclusion, Opened, Position, ProofTestDraft, ProofTestKind, Reading } from '#shared/proof-test/entries'
import type { ProtocolContent } from '#shared/proof-test/protocol'
import { surprising } from '#shared/proof-test/rules-under-load'
import type { ProofTestState } from '#shared/proof-test/state'
import { LedgerBuilder, testId } from './ledger-builder'
import { ids, names, openedPayload } from './test-press'

/** Gauge (psi), middle, left pin, right pin (mm), as typed. */
export type TypedRow = readonly [gauge: string, middle: string, left: string, right: string]

/** A stage of one climb: rows at the start and the end of its hold, and corrections of either. */
export interface StageScript {
  /** Clock time of the first mark, UTC. */
  at: string
  start: TypedRow
  end: TypedRow
  corrections?: { row: 'start' | 'end'; column: 0 | 1 | 2 | 3; to: string; why: string }[]
}

export interface ClimbScript {
  datumAt: string
  datum: TypedRow
  stages: readonly StageScript[]
  releasedAt: string
  setAt: string
  set: TypedRow
}

export interface RecordedTestOptions {
  climbs?: readonly ClimbScript[]
  protocol?: Partial<ProtocolContent>
  opened?: Partial<Opened>
  /** Ends the ledger with the first entry of this kind. */
  until?: ProofTestKind
  conclusion?: Conclusion
  conclusionWhy?: string
  /** An observation of the lead, written before the conclusion. */
  observed?: string
}

export interface RecordedTest {
  id: string
  entries: LedgerEntry[]
  state: ProofTestState
  people: Record<string, string>
}

const zero: TypedRow = ['0', '0.00', '0.00', '0.00']

/** The climb of the record's own example, with two slips of the pen that were corrected under load. */
export const firstClimb: ClimbScript = {
  datumAt: '10:02',
  datum: zero,
  stages: [
    { at: '10:12', start: ['1950', '0.54', '0.12', '0.10'], end: ['1950', '0.54', '0.12', '0.10'] },
    {
      at: '10:24',
      start: ['3900', '1.08', '0.23', '0.91'],
      end: ['3900', '1.09', '0.23', '0.19'],
      corrections: [{ row: 'start', column: 3, to: '0.19', why: 'Digits swapped when typed. Both read the indicator again.' }],
    },
    {
      at: '10:41',
      start: ['5900', '1.64', '0.33', '0.31'],
      end: ['5580', '1.65', '0.33', '0.31'],
      corrections: [{ row: 'end', column: 0, to: '5850', why: 'Digits swapped when typed. Witness saw 5850.' }],
    },
    { at: '11:03', start: ['7850', '2.20', '0.44', '0.42'], end: ['7750', '2.21', '0.44', '0.42'] },
  ],
  releasedAt: '11:10',
  setAt: '11:14',
  set: ['0', '0.03', '0.01', '0.01'],
}

export const repeatClimb: ClimbScript = {
  datumAt: '11:17',
  datum: ['0', '0.03', '0.01', '0.01'],
  stages: [
    { at: '11:21', start: ['1950', '0.55', '0.12', '0.10'], end: ['1950', '0.55', '0.12', '0.10'] },
    { at: '11:24', start: ['3900', '1.09', '0.23', '0.21'], end: ['3900', '1.09', '0.23', '0.21'] },
    { at: '11:27', start: ['5900', '1.64', '0.33', '0.31'], end: ['5900', '1.64', '0.33', '0.31'] },
    { at: '11:31', start: ['7850', '2.20', '0.44', '0.42'], end: ['7800', '2.20', '0.44', '0.42'] },
  ],
  releasedAt: '11:33',
  setAt: '11:37',
  set: ['0', '0.03', '0.01', '0.01'],
}

const DAY = '2026-09-15'
const PLACES = [ids.gauge, ids.middle, ids.left, ids.right] as const

function readings(row: TypedRow): Reading[] {
  return row.map((text, index) => ({ sourceId: PLACES[index] ?? '', text, unit: index === 0 ? 'psi' : 'mm' }))
}

class Ended extends Error {}

/** Writes one test from its script, entry by entry. */
class TestWriter {
  private readonly book: LedgerBuilder
  private readonly until: ProofTestKind | undefined

  constructor(id: string, until: ProofTestKind | undefined) {
    this.until = until
    this.book = new LedgerBuilder(id, '2026-09-14T14:00:00Z', (personId) => {
      const own = personId === ids.witness ? 3 : 1
      return { deviceId: testId(0xd, own), bootId: testId(0xd, own + 0x10) }
    })
  }

  get entries(): LedgerEntry[] {
    return this.book.entries
  }
  get state(): ProofTestState {
    return this.book.state
  }

  /** `clock` is "10:02" or "10:02:30" of the test's day, or a whole ISO moment. */
  moment(clock: string, afterSeconds = 0): string {
    const iso = clock.includes('T') ? clock : `${DAY}T${clock.length === 5 ? `${clock}:00` : clock}Z`
    return new Date(Date.parse(iso) + afterSeconds * 1000).toISOString()
  }

  write(draft: ProofTestDraft, at: string, by: string = ids.lead): LedgerEntry {
    const entry = this.book.append(draft, { by, at })
    if (draft.kind === this.until) throw new Ended()
    return entry
  }

  private row(at: string, row: TypedRow, typedAgain: string[] = []) {
    return { mark: this.book.mark(ids.lead, at), readings: readings(row), typedAgain }
  }

  /** Who types what the line doesn't predict is asked to type it again. */
  private typedAgain(at: Position, row: TypedRow): string[] {
    return surprising(this.state, at, readings(row))
  }

  walkDown(occasion: 'before load' | 'after load', from: string): void {
    this.state.joints.forEach(({ joint }, index) => {
      const payload = {
        occasion,
        jointId: joint.id,
        method: joint.kind === 'weld' ? ('dye penetrant' as const) : ('visual' as const),
        result: 'accepted' as const,
        remark: '',
        cold: joint.kind === 'weld',
      }
      this.write({ kind: 'joint-examined', payload }, this.moment(from, index * 150))
    })
  }

  setUp(): void {
    this.write(
      { kind: 'load-path-confirmed', payload: { by: 'witness', joints: this.state.joints.length } },
      this.moment('09:41'),
      ids.witness,
    )
    const payload = { items: [...SET_UP_ITEMS], reliefSet: { text: '8500', unit: 'psi' as const }, strokePercent: '40', note: '' }
    this.write({ kind: 'set-up-confirmed', payload }, this.moment('09:50'))
  }

  beginLeg(leg: number, hours: number): void {
    const bedHoleConfirmed = this.state.opened?.legs[leg]?.bedHole ?? ''
    this.write({ kind: 'leg-begun', payload: { leg, bedHoleConfirmed } }, this.moment('09:54', hours * 3600))
    const at = this.moment('09:55', hours * 3600)
    this.write({ kind: 'seated', payload: { leg, ...this.row(at, ['350', '0.12', '0.03', '0.02']) } }, at)
    this.write({ kind: 'released', payload: { gaugeZero: true, ramClear: true } }, this.moment('09:57', hours * 3600))
  }

  /** Returns false when the script ran out of stages before full load. */
  climb(leg: number, climb: number, script: ClimbScript, hours: number): boolean {
    const shift = hours * 3600
    for (const early of [120, 0]) {
      const at = this.moment(script.datumAt, shift - early)
      const payload = { leg, climb, ...this.row(at, script.datum), temperature: { text: '19', unit: 'C' as const } }
      this.write({ kind: 'datum-read', payload }, this.moment(at, 15))
    }
    const stages = this.state.legs[leg]?.climbs[climb]?.stages ?? []
    for (const [stage, planned] of stages.entries()) {
      const scripted = script.stages[stage]
      if (scripted === undefined) return false
      if (!this.stage({ leg, climb, stage, attempt: 0 }, scripted, planned.holdSeconds, shift)) return false
    }
    this.write({ kind: 'released', payload: { gaugeZero: true, ramClear: true } }, this.moment(script.releasedAt, shift))
    const setAt = this.moment(script.setAt, shift)
    const set = { leg, climb, ...this.row(setAt, script.set), temperature: { text: '19', unit: 'C' as const } }
    this.write({ kind: 'set-read', payload: set }, this.moment(setAt, 15))
    return true
  }

  private correct(row: LedgerEntry, stage: StageScript, which: 'start' | 'end', at: string): void {
    for (const slip of stage.corrections ?? []) {
      if (slip.row !== which) continue
      const unit = slip.column === 0 ? ('psi' as const) : ('mm' as const)
      const payload = { entryId: row.id, sourceId: PLACES[slip.column], text: slip.to, unit, why: slip.why, readAgainByBoth: true }
      this.write({ kind: 'corrected', payload }, at)
    }
  }

  /** True when the stage was decided "go on". */
  private stage(at: Position, script: StageScript, holdSeconds: number, shift: number): boolean {
    const mark = this.moment(script.at, shift)
    this.write({ kind: 'stage-begun', payload: { at } }, this.moment(mark, -45))
    const start = { at, occasion: 'hold start' as const, ...this.row(mark, script.start, this.typedAgain(at, script.start)) }
    const startRow = this.write({ kind: 'row-read', payload: start }, this.moment(mark, 18))
    this.correct(startRow, script, 'start', this.moment(mark, 40))
    if (this.state.opened && at.climb === 0 && (this.state.opened.protocol.content.stages[at.stage]?.percent ?? 0) >= 100) {
      const own: Reading[] = [{ sourceId: ids.gauge, text: script.start[0], unit: 'psi' }]
      const payload = { at, readings: own, notTaken: null, where: 'own device' as const }
      this.write({ kind: 'independent-read', payload }, this.moment(mark, 50), ids.witness)
    }
    const endMark = this.moment(mark, holdSeconds + 4)
    const end = { at, occasion: 'hold end' as const, ...this.row(endMark, script.end, this.typedAgain(at, script.end)) }
    const endRow = this.write({ kind: 'row-read', payload: end }, this.moment(endMark, 14))
    this.correct(endRow, script, 'end', this.moment(endMark, 30))
    const evaluated = evaluateClimb(this.state, at.leg, at.climb)?.stages.find((candidate) => candidate.at.stage === at.stage)
    if (!evaluated) throw new Error('A stage that was read can be evaluated.')
    const criteria = evaluated.criteria.map(({ id, label, verdict, reading, limitText, stops }) => ({
      id,
      label,
      verdict,
      reading,
      limit: limitText,
      stops,
    }))
    const decision = evaluated.suggestion === 'go-on' ? 'go-on' : 'stop'
    this.write({ kind: 'decided', payload: { at, decision, criteria } }, this.moment(endMark, 50))
    return decision === 'go-on'
  }

  release(clock: string): void {
    this.write({ kind: 'released', payload: { gaugeZero: true, ramClear: true } }, this.moment(clock))
  }

  conclude(conclusion: Conclusion, why: string, hours: number): void {
    const evaluation = freezeEvaluation(evaluateTest(this.state))
    const shift = hours * 3600
    const lead = { personId: ids.lead, printedName: names[ids.lead] ?? '', relation: 'shop lead' }
    this.write({ kind: 'concluded', payload: { conclusion, why, evaluation, coreVersion: CORE_VERSION } }, this.moment('12:04', shift))
    const signedAt = this.moment('12:05', shift)
    const signed = { ...lead, meaning: 'I ran this test and these are its readings.', signedAt, headHash: this.state.headHash }
    this.write({ kind: 'signed', payload: signed }, signedAt)
    const witness = { personId: ids.witness, printedName: names[ids.witness] ?? '', relation: 'works next door, no part in the build' }
    const countersignedAt = this.moment('12:11', shift)
    const meaning = 'I was present and read the gauge myself.'
    const countersigned = { ...witness, meaning, signedAt: countersignedAt, headHash: this.state.headHash }
    this.write({ kind: 'countersigned', payload: countersigned }, countersignedAt, ids.witness)
  }

  observe(note: string, clock: string): void {
    this.write({ kind: 'observed', payload: { at: null, what: 'other', note } }, this.moment(clock))
  }
}

function record(id: string, until: ProofTestKind | undefined, script: (writer: TestWriter) => void): RecordedTest {
  const writer = new TestWriter(id, until)
  try {
    script(writer)
  } catch (ended) {
    if (!(ended instanceof Ended)) throw ended
  }
  return { id, entries: writer.entries, state: writer.state, people: names }
}

/**
 * A whole test, from `opened` to `countersigned`: the example of the record, or one like it with other
 * readings, protocol or press. A climb whose evaluation says stop ends loaded, stopped, released and rejected.
 */
export function recordedTest(options: RecordedTestOptions = {}): RecordedTest {
  const opened = openedPayload({ protocol: options.protocol, opened: options.opened })
  const climbs = options.climbs ?? [firstClimb, repeatClimb]
  return record(ids.test, options.until, (writer) => {
    writer.write({ kind: 'opened', payload: opened }, '2026-09-14T15:20:00Z')
    writer.walkDown('before load', '09:20')
    writer.setUp()
    let went = true
    opened.legs.forEach((_leg, leg) => {
      if (!went) return
      const hours = leg * 2
      writer.beginLeg(leg, hours)
      for (const [climb, script] of climbs.entries()) went = went && writer.climb(leg, climb, script, hours)
    })
    const hours = (opened.legs.length - 1) * 2
    if (went) writer.walkDown('after load', writer.moment('11:42', hours * 3600))
    else writer.release('11:20')
    if (options.observed !== undefined) writer.observe(options.observed, writer.moment('12:02', hours * 3600))
    const conclusion = options.conclusion ?? (went ? 'accepted' : 'rejected')
    writer.conclude(conclusion, options.conclusionWhy ?? (went ? '' : 'The frame stopped behaving like a spring.'), hours)
  })
}

/** The readings of 75 % bend away: the run says stop, and the test is concluded rejected. */
export function stoppedTest(options: RecordedTestOptions = {}): RecordedTest {
  const [first, second] = firstClimb.stages
  const stages = [first, second].filter((stage) => stage !== undefined)
  const bent: StageScript = { at: '10:41', start: ['5900', '1.82', '0.33', '0.31'], end: ['5850', '1.85', '0.33', '0.31'] }
  return recordedTest({ climbs: [{ ...firstClimb, stages: [...stages, bent] }], ...options })
}

/** Two legs, ram far left and far right, each with a climb and its repeat. */
export function twoLegTest(options: RecordedTestOptions = {}): RecordedTest {
  const legs: ProtocolContent['legs'] = [
    { label: 'Ram far left', ramPosition: 'far left', bed: 'where it is used most' },
    { label: 'Ram far right', ramPosition: 'far right', bed: 'where it is used most' },
  ]
  return recordedTest({ ...options, protocol: { legs, ...options.protocol } })
}

/** Entries as the database keeps them: the canonical text that was hashed, and the hash. */
export function storedEntries(entries: readonly LedgerEntry[]): StoredEntry[] {
  return entries.map(({ hash, seq, receivedAt, irregular, prevHash, ...draft }) => ({
    seq,
    hash,
    canonical: entryText(draft, { seq, receivedAt, irregular, prevHash }),
  }))
}

/** The same test with the countersignature so many hours after the lead's. */
export function countersignedLater(recorded: RecordedTest, hours: number): RecordedTest {
  const signed = recorded.entries.find((entry) => entry.kind === 'signed')
  if (!signed) throw new Error('The test has not been signed.')
  const signedAt = new Date(Date.parse(String(signed.payload['signedAt'])) + hours * 3_600_000).toISOString()
  const entries = recorded.entries.map((entry) =>
    entry.kind === 'countersigned' ? { ...entry, payload: { ...entry.payload, signedAt } } : entry,
  )
  return { ...recorded, entries }
}

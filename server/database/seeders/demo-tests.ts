import { v7 as newId } from 'uuid'
import type { MeasuringPoint } from '#shared/proof-test/entries'
import type { TypedPressure } from '#shared/units'
import { daysBefore, minutesBefore, type Desk } from './desk'
import type { DemoInstruments, DemoProtocols, InstrumentKey } from './demo-instruments'
import type { DemoTooling, ToolingKey } from './demo-tooling'
import { nameOf, type DemoShops, type PersonKey } from './demo-people'
import type { FrameBehaviour, PointBehaviour } from './frame-behaviour'
import type { PressBook } from './press-book'
import { ScriptedRun, type RunScript } from './scripted-run'

/** What a test of the demo draws on. */
export interface DemoRegisters {
  shops: DemoShops
  instruments: DemoInstruments
  protocols: DemoProtocols
  tooling: DemoTooling | null
}

type Opening = Pick<RunScript, 'at' | 'frames' | 'strokePercent' | 'temperature' | 'slips' | 'remarks' | 'conclusion' | 'repeatsId'> & {
  press: PressBook
  protocol: keyof DemoProtocols
  lead: PersonKey
  pumpHand: PersonKey
  witness: { who: PersonKey; relation: string }
  force: InstrumentKey
  points: MeasuringPoint[]
  net: RunScript['request']['net']
  legs: RunScript['request']['legs']
  reliefSet: TypedPressure
  uses?: readonly ToolingKey[]
}

function open(desk: Desk, { shops, instruments, protocols, tooling }: DemoRegisters, opening: Opening): Promise<ScriptedRun> {
  const { press, protocol, lead, pumpHand, witness, force, points, net, legs, uses = [], ...script } = opening
  return ScriptedRun.open(desk, {
    ...script,
    shopId: shops.main,
    leadId: shops.people[lead],
    request: {
      pressId: press.id,
      protocolId: protocols[protocol],
      forceInstrumentIds: [instruments[force]],
      points,
      net,
      legs,
      pumpHand: { id: shops.people[pumpHand], name: nameOf(pumpHand) },
      witness: { id: shops.people[witness.who], relation: witness.relation },
      toolingIds: uses.flatMap((key) => tooling?.[key] ?? []),
    },
  })
}

const psi = (text: string): TypedPressure => ({ text, unit: 'psi' })
const NEIGHBOUR = 'runs the forge next door, no part in the build'
const COLLEAGUE = 'machinist of the shop, no part in the build'

function point(letter: string, label: string, place: string, instrumentId: string, memberId: string): MeasuringPoint {
  return { id: newId(), letter, label, place, instrumentId, risesWithLoad: true, memberId }
}

/** Bed middle against the mean of its two ends. */
function bedPoints(press: PressBook, ids: readonly string[]): Pick<Opening, 'points' | 'net'> {
  const [middle = '', left = '', right = ''] = ids
  const points = [
    point('M', 'Bed middle', 'bed-middle', middle, press.member('bed-beam')),
    point('L', 'Bed at the left', 'bed-pin-left', left, press.member('upright', 'left')),
    point('R', 'Bed at the right', 'bed-pin-right', right, press.member('upright', 'right')),
  ]
  const [plus, ...minus] = points.map((one) => one.id)
  return { points, net: plus === undefined ? null : { label: 'bed middle less mean of its ends', plus, minus } }
}

const behaves = (setTo: number, compliance: number, bedsIn = 0, slack = 0): PointBehaviour => ({ setTo, compliance, bedsIn, slack })
const central = (bedHole: string): Opening['legs'] => [{ label: 'Ram central', ramPosition: 'central', bedHole }]
const dials = (ids: DemoInstruments): string[] => [ids.dial1, ids.dial2, ids.dial3]
const digitals = (ids: DemoInstruments): string[] => [ids.digital1, ids.digital2, ids.digital3]

/** Long ago, by a gauge in bar on a press rated in metric tons-force: its clearance has run out since. */
export async function testFerry(desk: Desk, registers: DemoRegisters, press: PressBook): Promise<ScriptedRun> {
  const run = await open(desk, registers, {
    press,
    at: daysBefore(desk, 245, '13:35'),
    protocol: 'quarters',
    lead: 'lead',
    pumpHand: 'crew',
    witness: { who: 'witness', relation: NEIGHBOUR },
    force: 'barGauge',
    ...bedPoints(press, dials(registers.instruments)),
    legs: central('3'),
    frames: [{ points: [behaves(1, 0.0125, 0.004, 0.015), behaves(0.5, 0.0026), behaves(0.5, 0.0024)], leak: 0.002, creep: 0.001 }],
    reliefSet: { text: '560', unit: 'bar' },
    strokePercent: '35',
    temperature: '17',
  })
  return run.until()
}

const badgerFrame = (bedsIn: number): FrameBehaviour => ({
  points: [behaves(2, 0.0032, bedsIn, 0.015), behaves(0.5, 0.0011), behaves(0.5, 0.0012)],
  leak: 0.0015,
  creep: 0.001,
})

/** Half a year ago: the clearance that today's test of the same press suspends. */
export async function testBadgerFirst(desk: Desk, registers: DemoRegisters, press: PressBook): Promise<ScriptedRun> {
  const run = await open(desk, registers, {
    press,
    at: daysBefore(desk, 170, '14:05'),
    protocol: 'quarters',
    lead: 'secondLead',
    pumpHand: 'lead',
    witness: { who: 'secondWitness', relation: COLLEAGUE },
    force: 'dialGauge',
    ...bedPoints(press, dials(registers.instruments)),
    legs: central('fixed bed'),
    frames: [badgerFrame(0.006)],
    reliefSet: psi('7000'),
    strokePercent: '45',
    temperature: '19',
  })
  return run.until()
}

/** Abandoned: oil came out of the coupler at 50 %, and the witness called stop. */
export async function testWrenFirst(desk: Desk, registers: DemoRegisters, press: PressBook): Promise<ScriptedRun> {
  const run = await open(desk, registers, {
    ...wren(press, registers),
    at: daysBefore(desk, 120, '15:15'),
    witness: { who: 'witness', relation: NEIGHBOUR },
    conclusion: { conclusion: 'abandoned', why: 'The coupler leaked. A new one is fitted before this is tried again.' },
  })
  await run.until((step) => step.name === 'hold' && step.percent === 50)
  await run.stop('Oil at the coupler, a thread of it down the hose.')
  return run.until()
}

function wren(press: PressBook, { instruments }: DemoRegisters) {
  return {
    press,
    protocol: 'bench',
    lead: 'lead',
    pumpHand: 'lead',
    force: 'loadCell',
    points: [point('M', 'Bed plate, middle', 'bed-middle', instruments.digital1, press.member('bed-beam'))],
    net: null,
    legs: central('fixed bed'),
    frames: [{ points: [behaves(1, 0.0212, 0.004, 0.008)], leak: 0.002, creep: 0.001 }],
    reliefSet: psi('8600'),
    strokePercent: '40',
    temperature: '20',
  } satisfies Partial<Opening>
}

/** The same press again, by the shop's own shorter protocol; two digits were swapped at 75 % and put right. */
export async function testWrenAgain(desk: Desk, registers: DemoRegisters, press: PressBook, repeatsId: string): Promise<ScriptedRun> {
  const run = await open(desk, registers, {
    ...wren(press, registers),
    at: daysBefore(desk, 27, '18:10'),
    witness: { who: 'secondWitness', relation: COLLEAGUE },
    repeatsId,
    slips: [{ percent: 75, occasion: 'hold start', point: 0, why: 'Two digits swapped when typed. Both read the indicator again.' }],
  })
  return run.until()
}

/** Stopped at 75 %, where the head arm no longer came up in proportion. */
export async function testHeron(desk: Desk, registers: DemoRegisters, press: PressBook): Promise<ScriptedRun> {
  const { instruments } = registers
  const run = await open(desk, registers, {
    press,
    at: daysBefore(desk, 40, '14:45'),
    protocol: 'quarters',
    lead: 'secondLead',
    pumpHand: 'crew',
    witness: { who: 'secondWitness', relation: COLLEAGUE },
    force: 'dialGauge',
    points: [
      point('A', 'Nose of the head arm', 'head-left', instruments.dial1, press.member('head-beam')),
      point('B', 'Nose of the bed', 'bed-middle', instruments.dial2, press.member('bed-beam')),
    ],
    net: null,
    legs: central('fixed bed'),
    frames: [
      { points: [behaves(1, 0.0218, 0, 0.015), behaves(0.5, 0.0079)], givesWay: { above: 47, times: 1.65 }, leak: 0.002, creep: 0.001 },
    ],
    reliefSet: psi('7200'),
    strokePercent: '50',
    temperature: '18',
    remarks: [{ percent: 50, by: 'witness', what: 'noise', note: 'A tick from the top of the column while the pump was worked.' }],
    conclusion: { conclusion: 'rejected', why: 'The head arm gave way between 50 and 75 %. The column weld is opened and looked at.' },
  })
  return run.until()
}

/** Accepted and countersigned, with the repeat climb that its first set called for. */
export async function testOx(desk: Desk, registers: DemoRegisters, press: PressBook): Promise<ScriptedRun> {
  const run = await open(desk, registers, {
    press,
    at: daysBefore(desk, 12, '13:20'),
    protocol: 'quarters',
    lead: 'lead',
    pumpHand: 'crew',
    witness: { who: 'witness', relation: NEIGHBOUR },
    force: 'dialGauge',
    ...bedPoints(press, dials(registers.instruments)),
    legs: central('4'),
    uses: ['bearingPlate', 'steppedNose'],
    frames: [
      { points: [behaves(1, 0.0071, 0.034, 0.02), behaves(0.5, 0.0024, 0.006), behaves(0.5, 0.0022, 0.005)], leak: 0.002, creep: 0.001 },
    ],
    reliefSet: psi('8400'),
    strokePercent: '40',
    temperature: '19',
    remarks: [
      {
        percent: 75,
        by: 'lead',
        what: 'other',
        note: 'Scale flaked off the head beam at the left. Chalked, nothing under it.',
        photo: { of: 'scaled beam', name: 'Head beam, left' },
      },
    ],
  })
  return run.until()
}

/** Concluded and signed a few hours ago; the witness has still to countersign. */
export async function testLongMeg(desk: Desk, registers: DemoRegisters, press: PressBook): Promise<ScriptedRun> {
  const run = await open(desk, registers, {
    press,
    at: minutesBefore(desk, 6 * 60),
    protocol: 'offCentre',
    lead: 'lead',
    pumpHand: 'crew',
    witness: { who: 'witness', relation: NEIGHBOUR },
    force: 'digitalGauge',
    ...bedPoints(press, digitals(registers.instruments)),
    legs: [
      { label: 'Ram far left', ramPosition: 'far left', bedHole: '5' },
      { label: 'Ram far right', ramPosition: 'far right', bedHole: '5' },
    ],
    frames: [
      { points: [behaves(1, 0.0082, 0.004, 0.01), behaves(0.5, 0.0034), behaves(0.5, 0.0013)], leak: 0.0015, creep: 0.001 },
      { points: [behaves(1, 0.0084, 0.003, 0.01), behaves(0.5, 0.0013), behaves(0.5, 0.0036)], leak: 0.0015, creep: 0.001 },
    ],
    reliefSet: psi('7800'),
    strokePercent: '30',
    temperature: '18',
  })
  return run.until((step) => step.name === 'countersign')
}

/** From the first pumping to the decision at 25 % takes about this long. */
const FIRST_QUARTER_MINUTES = 13

/** Under way now: 25 % is carried, and 50 % comes next. The walk-down was made earlier the same day. */
export async function testBadgerNow(desk: Desk, registers: DemoRegisters, press: PressBook): Promise<ScriptedRun> {
  const run = await open(desk, registers, {
    press,
    at: minutesBefore(desk, 78),
    protocol: 'quarters',
    lead: 'secondLead',
    pumpHand: 'crew',
    witness: { who: 'secondWitness', relation: COLLEAGUE },
    force: 'dialGauge',
    ...bedPoints(press, dials(registers.instruments)),
    legs: central('fixed bed'),
    frames: [badgerFrame(0)],
    remarks: [
      {
        percent: 25,
        by: 'witness',
        what: 'other',
        note: 'Weld at the left upright, looked at through the shield: nothing to see.',
        photo: { of: 'sound weld', name: 'Left upright' },
      },
    ],
    reliefSet: psi('7000'),
    strokePercent: '45',
    temperature: '20',
  })
  await run.until((step) => step.name === 'begin-leg')
  run.waitUntil(minutesBefore(desk, FIRST_QUARTER_MINUTES))
  return run.until((step) => step.name === 'begin-stage' && step.percent === 50)
}

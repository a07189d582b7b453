import { instrumentRequestSchema } from '#shared/api/instruments'
import { protocolRequestSchema } from '#shared/api/protocols'
import { calibrationSchemaFor, type Calibration, type InstrumentDetails } from '#shared/instruments/model'
import { SHIPPED_PROTOCOLS } from '#shared/proof-test/protocol'
import { addCalibration } from '../../services/calibrations'
import { addInstrument, lockInstrument } from '../../services/instruments'
import { addProtocol, addProtocolVersion, listProtocols } from '../../services/protocols'
import { keepDemoCertificate } from './demo-files'
import { dayOf, daysBefore, workAt, type Desk } from './desk'
import type { DemoShops } from './demo-people'

const dial = (code: string): InstrumentDetails => ({
  kind: 'indicator',
  code,
  description: 'On a magnet stand',
  style: 'dial',
  range: { text: '10', unit: 'mm' },
  increment: { text: '0.01', unit: 'mm' },
  errorLimit: { text: '0.005', unit: 'mm' },
  revolution: { text: '1', unit: 'mm' },
})

const digital = (code: string): InstrumentDetails => ({
  kind: 'indicator',
  code,
  description: 'With a data lead',
  style: 'digital',
  range: { text: '25', unit: 'mm' },
  increment: { text: '0.005', unit: 'mm' },
  errorLimit: { text: '0.005', unit: 'mm' },
  revolution: null,
})

const INSTRUMENTS = {
  dialGauge: {
    kind: 'gauge',
    code: 'PG-1',
    description: 'Glycerine-filled, 150 mm',
    style: 'dial',
    fullScale: { text: '10000', unit: 'psi' },
    increment: { text: '50', unit: 'psi' },
    accuracy: { standard: 'asme-b40.100', grade: '2A' },
  },
  digitalGauge: {
    kind: 'gauge',
    code: 'PG-2',
    description: 'Battery, five digits',
    style: 'digital',
    fullScale: { text: '10000', unit: 'psi' },
    increment: { text: '10', unit: 'psi' },
    accuracy: { standard: 'stated', percentOfSpan: 0.5 },
  },
  barGauge: {
    kind: 'gauge',
    code: 'PG-3',
    description: '100 mm, from the old baler',
    style: 'dial',
    fullScale: { text: '700', unit: 'bar' },
    increment: { text: '5', unit: 'bar' },
    accuracy: { standard: 'en-837-1', class: 1 },
  },
  smallGauge: {
    kind: 'gauge',
    code: 'PG-4',
    description: '63 mm, dropped once',
    style: 'dial',
    fullScale: { text: '6000', unit: 'psi' },
    increment: { text: '100', unit: 'psi' },
    accuracy: { standard: 'asme-b40.100', grade: 'B' },
  },
  loadCell: {
    kind: 'load-cell',
    code: 'LC-1',
    description: 'Hollow, with display',
    fullScale: { text: '100', unit: 'kN' },
    increment: { text: '0.05', unit: 'kN' },
    errorPercentOfSpan: 0.3,
  },
  dial1: dial('DI-1'),
  dial2: dial('DI-2'),
  dial3: dial('DI-3'),
  digital1: digital('DD-1'),
  digital2: digital('DD-2'),
  digital3: digital('DD-3'),
  lateDial: { ...dial('DI-4'), description: 'On the lever stand' },
  badDigital: { ...digital('DD-4'), description: 'Display flickers' },
  rule: {
    kind: 'indicator',
    code: 'SR-1',
    description: '1 m, with a steel rule',
    style: 'straight-edge and rule',
    range: { text: '150', unit: 'mm' },
    increment: { text: '0.5', unit: 'mm' },
    errorLimit: null,
    revolution: null,
  },
} as const satisfies Record<string, InstrumentDetails>

export type InstrumentKey = keyof typeof INSTRUMENTS
export type DemoInstruments = Readonly<Record<InstrumentKey, string>>

/** Enters the shop's instruments on its first days. */
export async function enterInstruments(desk: Desk, { main, people }: DemoShops): Promise<DemoInstruments> {
  const work = await workAt(desk, main, people.lead, daysBefore(desk, 416, '14:10'))
  const ids = {} as Record<InstrumentKey, string>
  for (const [key, details] of Object.entries(INSTRUMENTS)) {
    ids[key as InstrumentKey] = await addInstrument(work, instrumentRequestSchema.parse(details))
  }
  return ids
}

interface Compared {
  instrument: InstrumentKey
  daysAgo: number
  /** Days from the comparison to the next one. */
  lasts?: number
  result?: Calibration['result']
  uncertainty?: Calibration['uncertainty']
  /** Whether its certificate is kept as a file. */
  filed?: boolean
}

const psi = (text: string): Calibration['uncertainty'] => ({ value: { text, unit: 'psi' }, k: 2 })
const kN = (text: string): Calibration['uncertainty'] => ({ value: { text, unit: 'kN' }, k: 2 })

/** Comparisons as they were made, the oldest first; each is entered before the next test that rests on it. */
const CALIBRATIONS: readonly Compared[] = [
  { instrument: 'barGauge', daysAgo: 410 },
  { instrument: 'lateDial', daysAgo: 400 },
  { instrument: 'dialGauge', daysAgo: 395, uncertainty: psi('60') },
  { instrument: 'dial1', daysAgo: 395 },
  { instrument: 'dial2', daysAgo: 395 },
  { instrument: 'dial3', daysAgo: 395 },
  { instrument: 'smallGauge', daysAgo: 390 },
  { instrument: 'digitalGauge', daysAgo: 347 },
  { instrument: 'digital1', daysAgo: 300 },
  { instrument: 'digital2', daysAgo: 300 },
  { instrument: 'digital3', daysAgo: 300 },
  { instrument: 'badDigital', daysAgo: 280 },
  { instrument: 'loadCell', daysAgo: 200, uncertainty: kN('0.25') },
  { instrument: 'dialGauge', daysAgo: 34, uncertainty: psi('60'), filed: true },
  { instrument: 'dial1', daysAgo: 33 },
  { instrument: 'dial2', daysAgo: 33 },
  { instrument: 'dial3', daysAgo: 33 },
  { instrument: 'smallGauge', daysAgo: 26, result: 'out of tolerance' },
  { instrument: 'badDigital', daysAgo: 20, result: 'out of tolerance' },
]

const COMPARED_WITH = { gauge: 'dead-weight tester DT-2', 'load-cell': 'proving ring PR-7', indicator: 'gauge blocks, set B' } as const

/** Enters the comparisons made from one day to another, counted back from today. */
export async function enterCalibrations(
  desk: Desk,
  { main, people }: DemoShops,
  ids: DemoInstruments,
  from: number,
  to: number,
): Promise<void> {
  for (const { instrument, daysAgo, lasts = 365, result = 'in tolerance', uncertainty = null, filed = false } of CALIBRATIONS) {
    if (daysAgo > from || daysAgo <= to) continue
    const at = daysBefore(desk, daysAgo, '19:15')
    const work = await workAt(desk, main, people.lead, at)
    const { kind, code } = INSTRUMENTS[instrument]
    const calibration = calibrationSchemaFor[kind].parse({
      calibratedOn: dayOf(daysBefore(desk, daysAgo, '12:00')),
      dueOn: dayOf(daysBefore(desk, daysAgo - lasts, '12:00')),
      certificate: `WB-${code}-${String(420 - daysAgo).padStart(3, '0')}`,
      comparedWith: COMPARED_WITH[kind],
      result,
      uncertainty,
    })
    const { calibratedOn, certificate, comparedWith } = calibration
    const lines = [`Number ${certificate}`, `Instrument ${code}, compared on ${calibratedOn} with ${comparedWith}`, `Found ${result}`]
    const file = filed ? await keepDemoCertificate(desk, main, at, lines, `${certificate}.pdf`) : null
    await addCalibration(desk.database, work, await lockInstrument(work, ids[instrument]), calibration, file)
  }
}

export interface DemoProtocols {
  quarters: string
  offCentre: string
  bench: string
}

export const BENCH_PROTOCOL = 'First load, bench press'

function shippedContent(name: string) {
  const shipped = SHIPPED_PROTOCOLS.find((one) => one.name === name)
  if (!shipped) throw new Error(`No protocol called ${name} is shipped.`)
  return shipped.content
}

/** The shop's own protocol for its bench press: the shipped first load to begin with. */
export async function writeProtocols(desk: Desk, { main, people }: DemoShops): Promise<DemoProtocols> {
  const work = await workAt(desk, main, people.lead, daysBefore(desk, 131, '16:20'))
  const purpose = 'The first load of the bench press, read by a load cell under the ram.'
  const content = { ...shippedContent('First load by quarters'), purpose }
  const bench = await addProtocol(work, protocolRequestSchema.parse({ name: BENCH_PROTOCOL, content }))
  const rows = await listProtocols(work)
  const idOf = (name: string): string => rows.find((row) => row.name === name)?.id ?? ''
  return { quarters: idOf('First load by quarters'), offCentre: idOf('Off-centre'), bench }
}

/** Its second version, with shorter holds: the bench press holds little oil and settles at once. */
export async function shortenHolds(desk: Desk, { main, people }: DemoShops, protocols: DemoProtocols): Promise<void> {
  const work = await workAt(desk, main, people.lead, daysBefore(desk, 31, '20:05'))
  const content = {
    ...shippedContent('First load by quarters'),
    purpose: 'The first load of the bench press, read by a load cell under the ram. Shorter holds: it settles at once.',
    stages: [
      { percent: 25, holdSeconds: 30 },
      { percent: 50, holdSeconds: 30 },
      { percent: 75, holdSeconds: 60 },
      { percent: 100, holdSeconds: 120 },
    ],
    datumWatchSeconds: 60,
    recoverySeconds: 60,
    repeatHoldSeconds: 30,
  }
  await addProtocolVersion(work, protocols.bench, protocolRequestSchema.parse({ name: BENCH_PROTOCOL, content }))
}

import { gaugeErrorLimit } from '../hydraulics/gauge'
import type { FrozenInstrument } from '../instruments/model'
import type { Ram } from '../press/model'
import { decimalsOf, formatForce, formatQuantity, toSI } from '../units'
import { fullestForce } from './budget'
import { checkText, engineerText } from './check-record'
import type { Opened } from './entries'
import type { PrintDates } from './print-dates'
import { clearanceArithmetic, energyText, inPrint } from './record'
import type { RecordParts } from './record-words'

/** "50 mm bore, 15 short tons at 10 000 psi". */
export function ramText(ram: Ram): string {
  const area = ram.effectiveArea ? `${inPrint(ram.effectiveArea)} effective` : ram.bore ? `${inPrint(ram.bore)} bore` : ''
  return `${area}, ${inPrint(ram.ratedCapacity)} at ${inPrint(ram.ratedPressure)}`
}

function due({ calibration }: FrozenInstrument, dates: PrintDates): string {
  return calibration ? `due ${dates.shortDate(calibration.dueOn)}` : 'never calibrated'
}

/** "G-02, 15 000 psi, ± 40 psi, due 9 Dec 2026": by its certificate, else by its class at full scale. */
export function forceInstrumentText(instrument: FrozenInstrument, dates: PrintDates): string {
  const { details, calibration } = instrument
  if (details.kind === 'indicator') return details.code
  const certificate = calibration?.uncertainty
  const limit =
    details.kind === 'load-cell'
      ? (details.errorPercentOfSpan / 100) * toSI(details.fullScale)
      : gaugeErrorLimit({ accuracy: details.accuracy, spanMin: 0, spanMax: toSI(details.fullScale), reading: toSI(details.fullScale) })
  const within = certificate ? inPrint(certificate.value) : formatQuantity(limit, details.fullScale.unit, decimalsOf(details.increment))
  return `${details.code}, ${inPrint(details.fullScale)}, ±\u00a0${within}, ${due(instrument, dates)}`
}

/** "T-01 Flat nose, 20 short tons": the tooling of the train, each piece with what it carries. Null where there is none. */
export function toolingText({ press }: Opened): string | null {
  const pieces = press.train.filter(({ kind }) => kind === 'tooling')
  if (pieces.length === 0) return null
  return pieces
    .map(({ name, ratedForce, ratedPressure }) =>
      [name, ...[ratedForce, ratedPressure].flatMap((rating) => (rating ? [inPrint(rating)] : []))].join(', '),
    )
    .join('; ')
}

/** "I-04 to I-06, 0.01 ± 0.005 mm, due 7 Nov 2026": alike ones together, the earliest date due. */
export function indicatorsText(opened: Opened, dates: PrintDates): string {
  const used = new Set(opened.points.map((point) => point.instrumentId))
  const groups = new Map<string, FrozenInstrument[]>()
  for (const instrument of opened.instruments) {
    if (!used.has(instrument.id) || instrument.details.kind !== 'indicator') continue
    const { increment, errorLimit } = instrument.details
    const kind = `${increment.text}${errorLimit ? ` ± ${errorLimit.text}` : ''} ${increment.unit}`
    groups.set(kind, [...(groups.get(kind) ?? []), instrument])
  }
  return [...groups]
    .map(([kind, alike]) => {
      const codes = alike.map((instrument) => instrument.details.code)
      const earliest = [...alike].sort((a, b) => (a.calibration?.dueOn ?? '').localeCompare(b.calibration?.dueOn ?? ''))[0]
      return `${codes.join(', ')}; ${kind}, ${earliest ? due(earliest, dates) : ''}`
    })
    .join('. ')
}

export type RecordFact = readonly [name: string, value: string]

/** What the figures rest on, a line each. */
export function recordFacts(record: RecordParts, dates: PrintDates): RecordFact[] {
  const { opened, evaluation, state } = record
  const { pumpHand } = opened.people
  const fullest = fullestForce(evaluation)
  const arithmetic = clearanceArithmetic(opened, evaluation)
  const confirmed = state.loadPathConfirmed
  const rule = opened.protocol.content.decisionRule === 'simple' ? 'Simple acceptance' : 'Guard band of U'
  const rams = opened.press.rams.map((ram): RecordFact => [opened.press.rams.length > 1 ? ram.name : 'Ram', ramText(ram)])
  const read = opened.forceInstrumentIds.flatMap((id): RecordFact[] => {
    const instrument = opened.instruments.find((candidate) => candidate.id === id)
    return instrument ? [[instrument.details.kind === 'load-cell' ? 'Load cell' : 'Gauge', forceInstrumentText(instrument, dates)]] : []
  })
  const indicators = indicatorsText(opened, dates)
  const tooling = toolingText(opened)
  return [
    ...(arithmetic ? [['Load', arithmetic] as const] : []),
    ...(fullest && fullest.force.pressure !== null
      ? [
          [
            'Delivered',
            `At least ${formatForce(fullest.force.deliveredAtLeast, opened.forceUnit)} at ${fullest.percent} %, after ${opened.protocol.content.frictionPercent} % for seal friction`,
          ] as const,
        ]
      : []),
    [
      'Load path',
      confirmed ? `${state.joints.length} joints, none missing: ${record.nameOf(confirmed.by)}` : 'Not confirmed whole by the witness',
    ],
    ['Check', checkText(opened)],
    ...(opened.engineer ? [['Engineer', engineerText(opened.engineer)] as const] : []),
    ['Pump hand', pumpHand.relation ? `${pumpHand.name}, ${pumpHand.relation}` : pumpHand.name],
    ...rams,
    ...read,
    ...(tooling ? [['Tooling', tooling] as const] : []),
    ...(indicators ? [['Indicators', indicators] as const] : []),
    ['Relief', state.setUp?.reliefSet ? `Set to ${state.setUp.reliefSet.text} ${state.setUp.reliefSet.unit}` : 'No setting noted'],
    ['Rule', `${rule}, k\u00a0=\u00a02.${opened.repeats ? ` Repeats ${opened.repeats.number}` : ''}`],
    ...(evaluation.energy ? [['Energy', energyText(evaluation.energy)] as const] : []),
    ['Rated', inPrint(opened.press.ratedLoad)],
    ...(opened.instrumentOverride ? [['Calibration', `Used out of date: ${opened.instrumentOverride}`] as const] : []),
  ]
}

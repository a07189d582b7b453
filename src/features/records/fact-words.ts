import type { FrozenInstrument } from '#shared/instruments/model'
import type { Ram } from '#shared/press/model'
import type { Opened } from '#shared/proof-test/entries'
import { inPrint } from '#shared/proof-test/record'
import { gaugeErrorLimit } from '#shared/hydraulics/gauge'
import { decimalsOf, formatQuantity, toSI } from '#shared/units'
import { shortDate } from '../../lib/dates'

/** "50 mm bore, 15 short tons at 10 000 psi". */
export function ramText(ram: Ram): string {
  const area = ram.effectiveArea ? `${inPrint(ram.effectiveArea)} effective` : ram.bore ? `${inPrint(ram.bore)} bore` : ''
  return `${area}, ${inPrint(ram.ratedCapacity)} at ${inPrint(ram.ratedPressure)}`
}

function due({ calibration }: FrozenInstrument): string {
  return calibration ? `due ${shortDate(calibration.dueOn)}` : 'never calibrated'
}

/** "G-02, 15 000 psi, ± 40 psi, due 9 Dec 2026": by its certificate, else by its class at full scale. */
export function forceInstrumentText(instrument: FrozenInstrument): string {
  const { details, calibration } = instrument
  if (details.kind === 'indicator') return details.code
  const certificate = calibration?.uncertainty
  const limit =
    details.kind === 'load-cell'
      ? (details.errorPercentOfSpan / 100) * toSI(details.fullScale)
      : gaugeErrorLimit({ accuracy: details.accuracy, spanMin: 0, spanMax: toSI(details.fullScale), reading: toSI(details.fullScale) })
  const within = certificate ? inPrint(certificate.value) : formatQuantity(limit, details.fullScale.unit, decimalsOf(details.increment))
  return `${details.code}, ${inPrint(details.fullScale)}, ±\u00a0${within}, ${due(instrument)}`
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
export function indicatorsText(opened: Opened): string {
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
      return `${codes.join(', ')}; ${kind}, ${earliest ? due(earliest) : ''}`
    })
    .join('. ')
}

import { ASME_B40_GRADES, gaugeErrorLimit } from '../hydraulics/gauge'
import { decimalsOfStep, formatQuantity, groupDigits, parseDecimal, toSI, unitLabel } from '../units'
import type { Typed, Unit } from '../units'
import type { GaugeDetails, IndicatorDetails, InstrumentDetails, LoadCellDetails } from './model'

const NO_BREAK = '\u00a0'

const GAUGE_WORDS = { dial: 'dial gauge', digital: 'digital gauge', transducer: 'pressure transducer' } as const
const INDICATOR_WORDS = {
  dial: 'dial indicator',
  digital: 'digital indicator',
  feeler: 'feeler gauges',
  'straight-edge and rule': 'straight-edge and rule',
} as const

/** What sort of instrument it is, in the trade's words: "dial gauge", "load cell", "digital indicator". */
export function instrumentWords(details: InstrumentDetails): string {
  if (details.kind === 'gauge') return GAUGE_WORDS[details.style]
  return details.kind === 'load-cell' ? 'load cell' : INDICATOR_WORDS[details.style]
}

/** A quantity as it was typed, with its unit in words: "10 000 psi". What can't be read stays as it is. */
export function typedWords(typed: Typed<Unit>): string {
  const parsed = parseDecimal(typed.text, { signed: true })
  const number = parsed.ok ? groupDigits(parsed.canonical) : typed.text
  return `${number}${NO_BREAK}${unitLabel(typed.unit, { plural: !(parsed.ok && parsed.value === 1) })}`
}

/** The end of the instrument's scale, as typed: full scale, or the range of an indicator. */
export function scaleEnd(details: InstrumentDetails): Typed<Unit> {
  return details.kind === 'indicator' ? details.range : details.fullScale
}

/** The class, grade or limit that is stated for the instrument: "EN 837-1 class 1.6", "± 0.5 % of span", "± 0.02 mm". */
export function accuracyWords(details: InstrumentDetails): string {
  if (details.kind === 'load-cell') return `± ${details.errorPercentOfSpan}${NO_BREAK}% of span`
  if (details.kind === 'indicator') return details.errorLimit ? `± ${typedWords(details.errorLimit)}` : 'one step'
  const { accuracy } = details
  if (accuracy.standard === 'en-837-1') return `EN${NO_BREAK}837-1 class${NO_BREAK}${accuracy.class}`
  if (accuracy.standard === 'asme-b40.100') return `ASME${NO_BREAK}B40.100 grade${NO_BREAK}${accuracy.grade}`
  return `± ${accuracy.percentOfSpan}${NO_BREAK}% of span`
}

const inUnit = (si: number, unit: Unit) => `± ${formatQuantity(si, unit, decimalsOfStep(si, unit))}`

function gaugeErrorWords({ accuracy, fullScale }: Pick<GaugeDetails, 'accuracy' | 'fullScale'>): string {
  const spanMax = toSI(fullScale)
  const at = (reading: number) => inUnit(gaugeErrorLimit({ accuracy, spanMin: 0, spanMax, reading }), fullScale.unit)
  const [outer, middle] = [at(0), at(spanMax / 2)]
  const twoZones = accuracy.standard === 'asme-b40.100' && ASME_B40_GRADES[accuracy.grade].outer !== ASME_B40_GRADES[accuracy.grade].middle
  if (twoZones) return `${outer} in the lower and the upper quarter of its scale, ${middle} between them`
  return `${outer} anywhere on its scale`
}

const loadCellErrorWords = ({ fullScale, errorPercentOfSpan }: Pick<LoadCellDetails, 'fullScale' | 'errorPercentOfSpan'>) =>
  `${inUnit((toSI(fullScale) * errorPercentOfSpan) / 100, fullScale.unit)} anywhere on its scale`

const indicatorErrorWords = ({ errorLimit, increment }: Pick<IndicatorDetails, 'errorLimit' | 'increment'>) =>
  errorLimit ? `± ${typedWords(errorLimit)}, as its maker states` : `± ${typedWords(increment)}, one step, because no limit is stated`

/**
 * The limit of error in the instrument's own unit, and where on the scale it holds. Sources: EN 837-1 and
 * ASME B40.100 as in `gaugeErrorLimit`; one step for an indicator without a limit is common practice, no source.
 * @throws RangeError for details that the schema doesn't take.
 */
export function errorLimitWords(details: InstrumentDetails): string {
  switch (details.kind) {
    case 'gauge':
      return gaugeErrorWords(details)
    case 'load-cell':
      return loadCellErrorWords(details)
    case 'indicator':
      return indicatorErrorWords(details)
  }
}

import type { GaugeAccuracy } from '#shared/hydraulics/gauge'
import type { IndicatorDetails, GaugeDetails, InstrumentDetails } from '#shared/instruments/model'
import type { ForceUnit, LengthUnit, PressureUnit, Typed, Unit } from '#shared/units'
import { optionalTyped, typedNumber } from '../../../lib/draft-resolver'

type TypedDraft<U extends Unit> = Typed<U> | { text: string; unit: '' }

/** What stands in the form: every number as text, and the fields of all kinds at once, so that a look at another kind loses nothing. */
export type InstrumentDraft = {
  kind: InstrumentDetails['kind']
  code: string
  description: string
  style: GaugeDetails['style'] | IndicatorDetails['style'] | ''
  fullScale: TypedDraft<PressureUnit | ForceUnit>
  range: TypedDraft<LengthUnit>
  increment: TypedDraft<PressureUnit | ForceUnit | LengthUnit>
  accuracy: { standard: GaugeAccuracy['standard']; class: string; grade: string; percentOfSpan: string }
  errorPercentOfSpan: string
  errorLimit: TypedDraft<LengthUnit>
  revolution: TypedDraft<LengthUnit>
}

export type ShopUnits = { pressureUnit: PressureUnit; lengthUnit: LengthUnit }

/** Unit that a kind's scale begins with. Which ton a load cell reads is never taken for granted: it has to be said. */
export function unitsOf(kind: InstrumentDraft['kind'], units: ShopUnits) {
  if (kind === 'gauge') return { fullScale: units.pressureUnit, increment: units.pressureUnit } as const
  if (kind === 'load-cell') return { fullScale: '', increment: '' } as const
  return { fullScale: '', increment: units.lengthUnit } as const
}

export function emptyDraft(units: ShopUnits): InstrumentDraft {
  const length = { text: '', unit: units.lengthUnit }
  return {
    kind: 'gauge',
    code: '',
    description: '',
    style: 'dial',
    fullScale: { text: '', unit: units.pressureUnit },
    range: length,
    increment: { text: '', unit: units.pressureUnit },
    accuracy: { standard: 'en-837-1', class: '', grade: '', percentOfSpan: '' },
    errorPercentOfSpan: '',
    errorLimit: length,
    revolution: length,
  }
}

/** An instrument as it stands, to be changed. */
export function draftOf(details: InstrumentDetails, units: ShopUnits): InstrumentDraft {
  const empty = emptyDraft(units)
  const { kind, code, description } = details
  const common = { ...empty, kind, code, description, increment: details.increment }
  if (details.kind === 'load-cell') {
    return { ...common, style: '', fullScale: details.fullScale, errorPercentOfSpan: String(details.errorPercentOfSpan) }
  }
  if (details.kind === 'indicator') {
    const { style, range } = details
    return {
      ...common,
      style,
      range,
      errorLimit: details.errorLimit ?? empty.errorLimit,
      revolution: details.revolution ?? empty.revolution,
    }
  }
  const { accuracy, style, fullScale } = details
  return {
    ...common,
    style,
    fullScale,
    accuracy: {
      standard: accuracy.standard,
      class: accuracy.standard === 'en-837-1' ? String(accuracy.class) : '',
      grade: accuracy.standard === 'asme-b40.100' ? accuracy.grade : '',
      percentOfSpan: accuracy.standard === 'stated' ? String(accuracy.percentOfSpan) : '',
    },
  }
}

function accuracyOf({ standard, class: number, grade, percentOfSpan }: InstrumentDraft['accuracy']) {
  if (standard === 'en-837-1') return { standard, class: typedNumber(number) }
  if (standard === 'asme-b40.100') return { standard, grade }
  return { standard, percentOfSpan: typedNumber(percentOfSpan) }
}

/** The draft as the schema wants it: the fields of its kind only, and numbers where it holds numbers. */
export function toInstrumentRequest(draft: InstrumentDraft) {
  const { kind, code, description, style, fullScale, increment } = draft
  if (kind === 'gauge') return { kind, code, description, style, fullScale, increment, accuracy: accuracyOf(draft.accuracy) }
  if (kind === 'load-cell') {
    return { kind, code, description, fullScale, increment, errorPercentOfSpan: typedNumber(draft.errorPercentOfSpan) }
  }
  return {
    kind,
    code,
    description,
    style,
    range: draft.range,
    increment,
    errorLimit: optionalTyped(draft.errorLimit),
    revolution: style === 'dial' ? optionalTyped(draft.revolution) : null,
  }
}

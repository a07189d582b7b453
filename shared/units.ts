import { z } from 'zod'

/**
 * Quantities as people type them, and the way to SI and back.
 *
 * Inside the program: newton, pascal, metre, square metre, kilogram, joule, and degree Celsius
 * (an SI unit too: nothing here needs the absolute scale). "Ton" never stands alone: there are
 * three, and they differ by 12 %.
 *
 * Factors: exact by definition (1 in = 0.0254 m, 1 lb = 0.45359237 kg, g_n = 9.80665 m/s²);
 * they agree with NIST SP 811 (2008), appendix B.8, in every digit printed there.
 */

export const FORCE_UNITS = ['N', 'kN', 'lbf', 'short-ton', 'long-ton', 'metric-ton-force'] as const
export const PRESSURE_UNITS = ['Pa', 'kPa', 'bar', 'MPa', 'psi'] as const
export const LENGTH_UNITS = ['mm', 'in', 'm'] as const
export const AREA_UNITS = ['mm2', 'in2'] as const
export const MASS_UNITS = ['kg', 'lb'] as const
export const TEMPERATURE_UNITS = ['C', 'F'] as const
export const ENERGY_UNITS = ['J', 'ft-lbf'] as const

export type ForceUnit = (typeof FORCE_UNITS)[number]
export type PressureUnit = (typeof PRESSURE_UNITS)[number]
export type LengthUnit = (typeof LENGTH_UNITS)[number]
export type AreaUnit = (typeof AREA_UNITS)[number]
export type MassUnit = (typeof MASS_UNITS)[number]
export type TemperatureUnit = (typeof TEMPERATURE_UNITS)[number]
export type EnergyUnit = (typeof ENERGY_UNITS)[number]
export type Unit = ForceUnit | PressureUnit | LengthUnit | AreaUnit | MassUnit | TemperatureUnit | EnergyUnit

/** The units that measure the same kind of quantity as `U`. */
export type SameQuantity<U extends Unit> = U extends ForceUnit
  ? ForceUnit
  : U extends PressureUnit
    ? PressureUnit
    : U extends LengthUnit
      ? LengthUnit
      : U extends AreaUnit
        ? AreaUnit
        : U extends MassUnit
          ? MassUnit
          : U extends TemperatureUnit
            ? TemperatureUnit
            : EnergyUnit

/** A number kept as it was typed, with the unit it was typed in. */
export type Typed<U extends Unit> = { text: string; unit: U }

export type TypedForce = Typed<ForceUnit>
export type TypedPressure = Typed<PressureUnit>
export type TypedLength = Typed<LengthUnit>
export type TypedArea = Typed<AreaUnit>
export type TypedMass = Typed<MassUnit>
export type TypedTemperature = Typed<TemperatureUnit>

/** Standard acceleration of free fall, m/s². Exact: 3rd CGPM (1901); NIST SP 811, B.8. */
export const STANDARD_GRAVITY = 9.80665

type Quantity = 'force' | 'pressure' | 'length' | 'area' | 'mass' | 'temperature' | 'energy'
type UnitFacts = {
  quantity: Quantity
  /** SI = (value − offset) × times ÷ over; whole numbers, so that short decimals stay exact. */
  times: number
  over: number
  offset: number
  singular: string
  plural: string
}

const facts = (quantity: Quantity, times: number, over: number, singular: string, plural = singular, offset = 0): UnitFacts => ({
  quantity,
  times,
  over,
  offset,
  singular,
  plural,
})

const UNITS: Record<Unit, UnitFacts> = {
  N: facts('force', 1, 1, 'N'),
  kN: facts('force', 1000, 1, 'kN'),
  lbf: facts('force', 44482216152605, 1e13, 'lbf'),
  'short-ton': facts('force', 8896443230521, 1e9, 'short ton', 'short tons'),
  'long-ton': facts('force', 996401641818352, 1e11, 'long ton', 'long tons'),
  'metric-ton-force': facts('force', 980665, 100, 'metric ton-force', 'metric tons-force'),
  Pa: facts('pressure', 1, 1, 'Pa'),
  kPa: facts('pressure', 1000, 1, 'kPa'),
  bar: facts('pressure', 100000, 1, 'bar'),
  MPa: facts('pressure', 1000000, 1, 'MPa'),
  psi: facts('pressure', 44482216152605, 6451600000, 'psi'),
  mm: facts('length', 1, 1000, 'mm'),
  in: facts('length', 254, 10000, 'in'),
  m: facts('length', 1, 1, 'm'),
  mm2: facts('area', 1, 1e6, 'mm²'),
  in2: facts('area', 64516, 1e8, 'in²'),
  kg: facts('mass', 1, 1, 'kg'),
  lb: facts('mass', 45359237, 1e8, 'lb'),
  C: facts('temperature', 1, 1, '°C'),
  F: facts('temperature', 5, 9, '°F', '°F', 32),
  J: facts('energy', 1, 1, 'J'),
  'ft-lbf': facts('energy', 3389544870828501, 2.5e15, 'ft·lbf'),
}

/** The words for a unit on a screen, label or export: "short tons", "kN", "mm²". */
export function unitLabel(unit: Unit, options: { plural?: boolean } = {}): string {
  return options.plural ? UNITS[unit].plural : UNITS[unit].singular
}

const NO_BREAK = '\u00a0'
const NARROW_NO_BREAK = '\u202f'
const MINUS = '\u2212'

export type ParsedDecimal = { ok: true; value: number; decimals: number; canonical: string } | { ok: false; message: string }

const refuse = (message: string): ParsedDecimal => ({ ok: false, message })

/**
 * Reads a number as typed. Comma or point is the decimal sign, so "1,234" is 1.234: callers echo
 * the parsed value with its unit. Grouping, a bare ".5", a trailing "3." and exponents are refused
 * with a sentence, never coerced. Blanks at the ends are ignored. A minus is refused unless
 * `signed`. `canonical` has a decimal point, no superfluous leading zeros, and every decimal typed.
 */
export function parseDecimal(text: string, options: { signed?: boolean } = {}): ParsedDecimal {
  const trimmed = text.trim()
  if (trimmed === '') return refuse('Enter a number.')
  const negative = /^[-\u2212]/.test(trimmed)
  const digits = negative ? trimmed.slice(1) : trimmed
  if (/^\d+([.,]?\d+)?[eE][-+]?\d+$/.test(digits)) {
    return refuse('Write the number out in full, without an exponent.')
  }
  if (/[^\d.,\s'’_]/.test(digits) || digits === '') {
    return refuse('Use digits and one decimal sign only; the unit stands beside the number.')
  }
  if (/[\s'’_]/.test(digits)) {
    return refuse('Leave out the grouping: write 1234.5, with nothing between the thousands.')
  }
  if ((digits.match(/[.,]/g) ?? []).length > 1) {
    return refuse('There is more than one decimal sign: write 1234.5, without grouping.')
  }
  if (/^[.,]/.test(digits)) return refuse('Put a digit before the decimal sign, as in 0.5.')
  if (/[.,]$/.test(digits)) {
    return refuse('A digit is missing after the decimal sign: finish the number or take it out.')
  }
  if (negative && !options.signed) return refuse('This number can’t be below zero.')
  const [whole = '', fraction = ''] = digits.split(/[.,]/)
  const significant = (whole + fraction).replace(/^0+/, '')
  if (significant.length > 15) return refuse('That is more than 15 digits: write it shorter.')
  const unsigned = whole.replace(/^0+(?=\d)/, '') + (fraction === '' ? '' : `.${fraction}`)
  const canonical = negative && significant !== '' ? `-${unsigned}` : unsigned
  return { ok: true, value: Number(canonical), decimals: fraction.length, canonical }
}

/** The unit's value in SI: N, Pa, m, m², kg, J or °C. */
function scaleToSI(value: number, unit: Unit): number {
  const { times, over, offset } = UNITS[unit]
  return ((value - offset) * times) / over
}

/**
 * A typed quantity in SI (N, Pa, m, m², kg, J; temperatures in °C).
 * @throws RangeError with a sentence when the text isn't a number as `parseDecimal` takes it.
 */
export function toSI(typed: { text: string; unit: Unit }): number {
  const parsed = parseDecimal(typed.text, { signed: true })
  if (!parsed.ok) throw new RangeError(`“${typed.text}” is not a number. ${parsed.message}`)
  return scaleToSI(parsed.value, typed.unit)
}

/** An SI value (N, Pa, m, m², kg, J; °C) in the given unit. */
export function toUnit(si: number, unit: Unit): number {
  const { times, over, offset } = UNITS[unit]
  return (si * over) / times + offset
}

/** A value in one unit as a value in another of the same quantity. */
export function convert<U extends Unit>(value: number, from: U, to: SameQuantity<U>): number {
  return toUnit(scaleToSI(value, from), to)
}

/** The weight of a mass, N; mass in kg, standard gravity. */
export function weightOf(mass: number): number {
  return mass * STANDARD_GRAVITY
}

/**
 * Sets thousands apart by a narrow no-break space from four digits on, as the dials show them
 * ("5 900"), and turns a hyphen before the number into a minus sign. Decimals stay together.
 */
export function groupDigits(text: string): string {
  const match = /^([-\u2212]?)(\d+)(.*)$/s.exec(text)
  if (!match) return text
  const [, sign = '', whole = '', rest = ''] = match
  const grouped = whole.replace(/\B(?=(\d{3})+$)/g, NARROW_NO_BREAK)
  return (sign === '' ? '' : MINUS) + grouped + rest
}

/** A bare number with fixed decimals, grouped, with a true minus and no minus before zero. */
export function formatNumber(value: number, decimals: number): string {
  if (!Number.isFinite(value)) return value > 0 ? '∞' : value < 0 ? `${MINUS}∞` : '–'
  const fixed = value.toFixed(decimals)
  return groupDigits(/^-0(\.0+)?$/.test(fixed) ? fixed.slice(1) : fixed)
}

/** An SI value as a number in the unit, without the unit's name. */
export function formatValue(si: number, unit: Unit, decimals: number): string {
  return formatNumber(toUnit(si, unit), decimals)
}

/** An SI value in the unit, with its name: "7 850 psi", "11.42 short tons", "1 short ton". */
export function formatQuantity(si: number, unit: Unit, decimals: number): string {
  const number = formatValue(si, unit, decimals)
  const plural = number !== '1' && number !== `${MINUS}1`
  return `${number}${NO_BREAK}${unitLabel(unit, { plural })}`
}

/** Decimals that a force is shown with, by unit; a short ton's second decimal is 89 N. */
export const FORCE_DECIMALS: Record<ForceUnit, number> = {
  N: 0,
  kN: 1,
  lbf: 0,
  'short-ton': 2,
  'long-ton': 2,
  'metric-ton-force': 2,
}

/** A force (N) in the unit with sensible digits: "11.42 short tons", "101.6 kN". */
export function formatForce(si: number, unit: ForceUnit): string {
  return formatQuantity(si, unit, FORCE_DECIMALS[unit])
}

/**
 * How many decimals an instrument's increment, as typed, asks of its readings: "0.05" → 2, "50" → 0.
 * @throws RangeError when the text isn't a number.
 */
export function decimalsOf(increment: { text: string }): number {
  const parsed = parseDecimal(increment.text)
  if (!parsed.ok) throw new RangeError(`“${increment.text}” is no increment. ${parsed.message}`)
  return parsed.decimals
}

/**
 * Decimals that show every multiple of an SI step in the unit without rounding, six at most:
 * a step of 50 psi needs none, one of half a bar needs one.
 */
export function decimalsOfStep(step: number, unit: Unit): number {
  const value = toUnit(step, unit)
  for (let decimals = 0; decimals < 6; decimals += 1) {
    const scaled = value * 10 ** decimals
    if (Math.round(scaled) > 0 && Math.abs(scaled - Math.round(scaled)) < 1e-6 * scaled) return decimals
  }
  return 6
}

/**
 * The largest multiple of `step` that is not above `value`, both in one unit. A value that is a
 * multiple but for rounding in the last digits is taken as that multiple.
 * @throws RangeError when the step is not above zero.
 */
export function roundDownTo(value: number, step: number): number {
  if (!(step > 0)) throw new RangeError('The step to round to must be above zero.')
  const count = value / step
  const whole = Math.floor(count + 1e-9 * Math.max(1, Math.abs(count)))
  return whole === 0 ? 0 : whole * step
}

const THREE_TONS = 'Say which ton: short ton (2,000 lbf), long ton (2,240 lbf) or metric ton-force (1,000 kgf).'

const unitSchema = <const U extends readonly [string, ...string[]]>(units: U, sentence: string) => z.enum(units, { error: sentence })

export const forceUnitSchema = z.enum(FORCE_UNITS, {
  error: (issue) =>
    typeof issue.input === 'string' && /ton/i.test(issue.input)
      ? THREE_TONS
      : 'Choose a unit of force: N, kN, lbf, short ton, long ton or metric ton-force.',
})
export const pressureUnitSchema = unitSchema(PRESSURE_UNITS, 'Choose a unit of pressure: Pa, kPa, bar, MPa or psi.')
export const lengthUnitSchema = unitSchema(LENGTH_UNITS, 'Choose a unit of length: mm, in or m.')
export const areaUnitSchema = unitSchema(AREA_UNITS, 'Choose a unit of area: mm² or in².')
export const massUnitSchema = unitSchema(MASS_UNITS, 'Choose a unit of mass: kg or lb.')
export const temperatureUnitSchema = unitSchema(TEMPERATURE_UNITS, 'Choose a unit of temperature: °C or °F.')

/** Text that `parseDecimal` takes, trimmed and otherwise kept as typed. */
export function decimalTextSchema(options: { signed?: boolean; positive?: boolean } = {}) {
  return z
    .string({ error: 'Enter a number.' })
    .trim()
    .superRefine((text, context) => {
      const parsed = parseDecimal(text, { signed: options.signed ?? false })
      if (!parsed.ok) context.addIssue({ code: 'custom', message: parsed.message })
      else if (options.positive && parsed.value <= 0) {
        context.addIssue({ code: 'custom', message: 'Enter a number above zero.' })
      }
    })
}

const typedSchema = <S extends z.ZodType<Unit>>(unit: S, options: { signed?: boolean; positive?: boolean } = {}) =>
  z.strictObject({ text: decimalTextSchema(options), unit })

export const typedForceSchema = typedSchema(forceUnitSchema)
export const typedPressureSchema = typedSchema(pressureUnitSchema)
export const typedLengthSchema = typedSchema(lengthUnitSchema)
export const typedAreaSchema = typedSchema(areaUnitSchema)
export const typedMassSchema = typedSchema(massUnitSchema)
/** Temperatures may be below zero. */
export const typedTemperatureSchema = typedSchema(temperatureUnitSchema, { signed: true })

/** Forces that may be negative: a weight the ram lifts. */
export const typedSignedForceSchema = typedSchema(forceUnitSchema, { signed: true })
/** Lengths that may be negative: an indicator's reading. */
export const typedSignedLengthSchema = typedSchema(lengthUnitSchema, { signed: true })

export const typedPositiveForceSchema = typedSchema(forceUnitSchema, { positive: true })
export const typedPositivePressureSchema = typedSchema(pressureUnitSchema, { positive: true })
export const typedPositiveLengthSchema = typedSchema(lengthUnitSchema, { positive: true })
export const typedPositiveAreaSchema = typedSchema(areaUnitSchema, { positive: true })
export const typedPositiveMassSchema = typedSchema(massUnitSchema, { positive: true })

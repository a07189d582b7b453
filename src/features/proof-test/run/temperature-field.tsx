import { useId, type ReactElement } from 'react'
import { parseDecimal, unitLabel, type LengthUnit, type TypedTemperature } from '#shared/units'

/** A shop that reads inches reads degrees Fahrenheit. */
export const temperatureUnit = (lengthUnit: LengthUnit): TypedTemperature['unit'] => (lengthUnit === 'in' ? 'F' : 'C')

/** The temperature as typed, or null where the field was left empty or can't be read. */
export function typedTemperature(text: string, lengthUnit: LengthUnit): TypedTemperature | null {
  const trimmed = text.trim()
  return parseDecimal(trimmed, { signed: true }).ok ? { text: trimmed, unit: temperatureUnit(lengthUnit) } : null
}

interface TemperatureFieldProps {
  value: string
  onChange: (text: string) => void
  lengthUnit: LengthUnit
}

/** The air's temperature, which may be left out: steel grows by it. */
export function TemperatureField({ value, onChange, lengthUnit }: TemperatureFieldProps): ReactElement {
  const id = useId()
  const parsed = parseDecimal(value, { signed: true })
  const wrong = value.trim() !== '' && !parsed.ok ? parsed.message : null
  return (
    <div className="mt-3 flex flex-wrap items-center gap-x-4">
      <label htmlFor={id} className="min-w-0 flex-1 text-16 leading-[20px]">
        <span className="block font-medium">Air, {unitLabel(temperatureUnit(lengthUnit))}</span>
        <span className="block text-graphite">may be left empty</span>
      </label>
      <input
        id={id}
        type="text"
        inputMode="decimal"
        autoComplete="off"
        value={value}
        aria-invalid={wrong !== null}
        aria-describedby={wrong ? `${id}-says` : undefined}
        onChange={(event) => onChange(event.target.value)}
        className="block h-14 w-28 rounded-field border border-rule bg-field px-[10px] text-26 font-medium text-ink"
      />
      {wrong && (
        <p id={`${id}-says`} className="mt-1 w-full font-medium text-stop-ink">
          {wrong}
        </p>
      )}
    </div>
  )
}

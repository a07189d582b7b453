import type { UseFormRegisterReturn } from 'react-hook-form'
import { FORCE_UNITS, LENGTH_UNITS, PRESSURE_UNITS, unitLabel, type Unit } from '#shared/units'
import { SelectField } from '../../../components/select-field'

const FIELDS = [
  { name: 'forceUnit', label: 'Force in', units: FORCE_UNITS },
  { name: 'pressureUnit', label: 'Pressure in', units: PRESSURE_UNITS },
  { name: 'lengthUnit', label: 'Length in', units: LENGTH_UNITS },
] as const
type UnitName = (typeof FIELDS)[number]['name']

const choicesOf = (units: readonly Unit[]) => units.map((unit) => ({ value: unit, label: unitLabel(unit, { plural: true }) }))

type UnitFieldsProps = {
  register: (name: UnitName) => UseFormRegisterReturn
  errors: Partial<Record<UnitName, { message?: string }>>
}

/** The units that a shop's screens show first. */
export function UnitFields({ register, errors }: UnitFieldsProps) {
  return FIELDS.map(({ name, label, units }) => (
    <SelectField key={name} label={label} choices={choicesOf(units)} message={errors[name]?.message} {...register(name)} />
  ))
}

import { GRADES } from '#shared/structure/materials'
import { LENGTH_UNITS, PRESSURE_UNITS } from '#shared/units'
import { QuantityField } from '../../../../../components/decimal-field'
import { TextField } from '../../../../../components/field'
import { SelectField } from '../../../../../components/select-field'
import type { MaterialDraft, PartDraft } from './draft'
import { chosen, held, text, within, type Part } from './part'
import { gradeChoices } from './words'

/** A grade that the program knows, or another with its yield and where that is read from. */
export function MaterialFields({ part, label, optional }: { part: Part<MaterialDraft>; label: string; optional?: boolean | undefined }) {
  return (
    <>
      <SelectField
        label={label}
        nothing="Choose a grade"
        choices={gradeChoices}
        optional={optional ?? false}
        {...chosen(part, 'grade', ['', ...GRADES, 'custom'], 'Choose a grade, or another by its certificate.')}
      />
      {part.value.grade === 'custom' && (
        <>
          <TextField label="Name of the material" autoComplete="off" {...text(part, 'name')} />
          <QuantityField label="Yield strength" units={PRESSURE_UNITS} {...held(part, 'yield')} />
          <TextField label="Where the yield comes from" autoComplete="off" {...text(part, 'source')} />
        </>
      )}
    </>
  )
}

/** A piece of plate or wall: what it is of and how thick it bears. */
export function PartFields({ part, what, optional, thick }: { part: Part<PartDraft>; what: string; optional?: boolean; thick?: string }) {
  return (
    <>
      <MaterialFields part={within(part, 'material')} label={`Material of ${what}`} optional={optional} />
      <QuantityField
        label={thick ?? `Thickness of ${what}`}
        optional={optional ?? false}
        units={LENGTH_UNITS}
        {...held(part, 'thickness')}
      />
    </>
  )
}

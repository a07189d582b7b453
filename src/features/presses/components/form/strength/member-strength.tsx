import { useController } from 'react-hook-form'
import { useWatch } from 'react-hook-form'
import { BEAM_SUPPORTS } from '#shared/structure/member-data'
import { LENGTH_UNITS } from '#shared/units'
import { DecimalField, QuantityField } from '../../../../../components/decimal-field'
import { RadioRow } from '../../../../../components/radio-row'
import type { FormUnits } from '../draft'
import type { PressForm } from '../use-press-form'
import { blankMemberStrength, type MemberStrengthDraft } from './draft'
import { FoldedStrength } from './folded-strength'
import { MaterialFields } from './material-fields'
import { chosen, held, within, type Part } from './part'
import { SectionFields } from './section-fields'
import { roleChoices, shapeChoices, supportChoices } from './words'

const SHARE_HINT = 'In percent, where it isn’t what the check works out by itself.'

function BeamFields({ part }: { part: Part<MemberStrengthDraft> }) {
  const oneEnd = part.value.support === 'one end'
  return (
    <>
      <RadioRow label="It is held" choices={supportChoices} {...chosen(part, 'support', BEAM_SUPPORTS)} />
      <QuantityField
        label={oneEnd ? 'From its root to the ram’s line' : 'Span between its supports'}
        units={LENGTH_UNITS}
        {...held(part, 'span')}
      />
      {!oneEnd && (
        <QuantityField
          label="Ram off the middle, at most"
          hint="Left empty, the ram stays in the middle."
          optional
          units={LENGTH_UNITS}
          {...held(part, 'ramOffset')}
        />
      )}
    </>
  )
}

function TieFields({ part }: { part: Part<MemberStrengthDraft> }) {
  return (
    <>
      <QuantityField label="Length that the force stretches" units={LENGTH_UNITS} {...held(part, 'length')} />
      <QuantityField
        label="Force beside its middle by"
        hint="From the line of the force to the middle of the section."
        optional
        units={LENGTH_UNITS}
        {...held(part, 'eccentricity')}
      />
    </>
  )
}

function Fields({ part }: { part: Part<MemberStrengthDraft> }) {
  const hole = within(part, 'hole')
  return (
    <>
      <RadioRow
        label="Under load"
        choices={roleChoices}
        {...chosen(part, 'role', ['beam', 'tie'], 'Choose whether it bends or is pulled.')}
      />
      <MaterialFields part={within(part, 'material')} label="Material" />
      <SectionFields part={within(part, 'section')} />
      {part.value.role === 'tie' ? <TieFields part={part} /> : <BeamFields part={part} />}
      <QuantityField label="Hole through it, diameter" optional units={LENGTH_UNITS} {...held(hole, 'diameter')} />
      <QuantityField
        label="Metal that the hole goes through"
        hint="Both walls of a tube together."
        optional
        units={LENGTH_UNITS}
        {...held(hole, 'metal')}
      />
      <DecimalField label="Its share of the force" hint={SHARE_HINT} optional unit="%" {...held(part, 'loadShare')} />
    </>
  )
}

function summaryOf({ section, material }: MemberStrengthDraft): string {
  const shape = shapeChoices.find(({ value }) => value === section.shape)?.label
  const grade = material.grade === 'custom' ? material.name : material.grade
  return [shape ?? 'No section yet', grade || 'no material yet'].join(', ')
}

type MemberStrengthFieldsProps = { form: PressForm; index: number; name: string; units: FormUnits }

/** The optional part of a member: how the force goes through it, its section, material and span. */
export function MemberStrengthFields({ form, index, name, units }: MemberStrengthFieldsProps) {
  const at = `description.members.${index}.strength` as const
  const { field, fieldState } = useController({ control: form.control, name: at })
  const kind = useWatch({ control: form.control, name: `description.members.${index}.kind` })
  const value = field.value ?? null
  const part: Part<MemberStrengthDraft> | null = value && { value, onChange: field.onChange, at, errors: form.formState.errors, units }
  return (
    <FoldedStrength
      ref={field.ref}
      of={name || `member ${index + 1}`}
      given={value !== null}
      wrong={fieldState.invalid}
      give="Give its section"
      summary={value ? summaryOf(value) : ''}
      onGive={() => field.onChange(blankMemberStrength(kind, units))}
      onTakeOut={() => field.onChange(null)}
    >
      {part && <Fields part={part} />}
    </FoldedStrength>
  )
}

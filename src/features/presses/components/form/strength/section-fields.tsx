import { memberSectionSchema, sectionProperties } from '#shared/structure/sections'
import {
  FLANGE_SLOPES,
  PLATE_PLACES,
  SECOND_MOMENT_UNITS,
  SECTION_MODULUS_UNITS,
  SECTION_SHAPES,
  SECTION_UNIT_LABELS,
} from '#shared/structure/section-shapes'
import { AREA_UNITS, LENGTH_UNITS, groupDigits } from '#shared/units'
import { Button } from '../../../../../components/button'
import { DecimalField, QuantityField } from '../../../../../components/decimal-field'
import { FieldMessage, TextField } from '../../../../../components/field'
import { WholeRow } from '../../../../../components/form-steps'
import { SectionDrawing } from '../../../../../components/instruments/section-drawing'
import { SelectField } from '../../../../../components/select-field'
import { blankPlate, type SectionDraft } from './draft'
import { chosen, held, messageOf, text, within, type Part } from './part'
import { DIMENSIONS, sectionOf } from './payload'
import { placeChoices, shapeChoices, slopeChoices } from './words'

const FIGURES = 4

/** A figure with four digits that count, in mm: "1 365 000". */
function figure(si: number, power: 2 | 3 | 4): string {
  return groupDigits(String(Number((si * 1000 ** power).toPrecision(FIGURES))))
}

/** The section as it is understood so far: drawn, and its properties about the axis it bends about. */
export function SectionSoFar({ section: draft }: { section: SectionDraft }) {
  const parsed = memberSectionSchema.safeParse(sectionOf(draft))
  if (!parsed.success) return null
  const { area, secondMoment, sectionModulus, cautions } = sectionProperties(parsed.data)
  return (
    <WholeRow>
      <div role="status" className="ground-dye flex flex-wrap items-center gap-x-6 gap-y-3 p-4">
        <SectionDrawing section={parsed.data} />
        <dl className="grid grid-cols-[auto_auto_auto] items-baseline gap-x-3 gap-y-1">
          <dt>Area A</dt>
          <dd className="text-right font-semibold tabular-nums">{figure(area, 2)}</dd>
          <dd>mm²</dd>
          <dt>Second moment I</dt>
          <dd className="text-right font-semibold tabular-nums">{figure(secondMoment, 4)}</dd>
          <dd>mm⁴</dd>
          <dt>Section modulus S</dt>
          <dd className="text-right font-semibold tabular-nums">{figure(sectionModulus, 3)}</dd>
          <dd>mm³</dd>
        </dl>
        {cautions.map((caution) => (
          <p key={caution} className="basis-full text-faint-scribe">
            {caution}
          </p>
        ))}
      </div>
    </WholeRow>
  )
}

function SectionUnit<U extends keyof typeof SECTION_UNIT_LABELS>({
  label,
  part,
  units,
}: {
  label: string
  part: Part<{ text: string; unit: U }>
  units: readonly U[]
}) {
  const { value, name, message, onChange } = held(part, 'text')
  return (
    <div className="grid grid-cols-[minmax(0,1fr)_6.5rem] items-start gap-2">
      <DecimalField
        label={label}
        unit={SECTION_UNIT_LABELS[part.value.unit]}
        value={value}
        name={name}
        onChange={onChange}
        {...(message && { message })}
      />
      <SelectField
        label="in"
        aria-label={`Unit of ${label.toLowerCase()}`}
        choices={units.map((unit) => ({ value: unit, label: SECTION_UNIT_LABELS[unit] }))}
        {...chosen(part, 'unit', units)}
      />
    </div>
  )
}

function ByFigures({ part }: { part: Part<SectionDraft> }) {
  return (
    <>
      <TextField label="What it is, and where its figures come from" autoComplete="off" {...text(part, 'name')} />
      <QuantityField label="Area A" units={AREA_UNITS} {...held(part, 'area')} />
      <SectionUnit label="Second moment I" part={within(part, 'secondMoment')} units={SECOND_MOMENT_UNITS} />
      <SectionUnit label="Section modulus S" part={within(part, 'sectionModulus')} units={SECTION_MODULUS_UNITS} />
      <QuantityField label="Area that carries shear" optional units={AREA_UNITS} {...held(part, 'shearArea')} />
    </>
  )
}

function Plates({ part }: { part: Part<SectionDraft> }) {
  const { value: plates, onChange } = held(part, 'plates')
  return (
    <>
      {plates.map((plate, index) => {
        const one: Part<typeof plate> = {
          ...part,
          at: `${part.at}.plates.${index}`,
          value: plate,
          onChange: (next) => onChange(plates.map((other, at) => (at === index ? next : other))),
        }
        return (
          <WholeRow key={index}>
            <div className="grid items-start gap-4 border-t border-hairline pt-3 tablet:grid-cols-[10rem_1fr_1fr_auto]">
              <SelectField label={`Plate ${index + 1}`} choices={placeChoices} {...chosen(one, 'place', PLATE_PLACES)} />
              <QuantityField label="Its width" units={LENGTH_UNITS} {...held(one, 'width')} />
              <QuantityField label="Its thickness" units={LENGTH_UNITS} {...held(one, 'thickness')} />
              <Button
                className="tablet:mt-7"
                aria-label={`Take plate ${index + 1} out`}
                onClick={() => onChange(plates.filter((_, at) => at !== index))}
              >
                Take out
              </Button>
            </div>
          </WholeRow>
        )
      })}
      <WholeRow>
        <Button size="line" onClick={() => onChange([...plates, blankPlate(part.units)])}>
          Add a reinforcing plate
        </Button>
      </WholeRow>
    </>
  )
}

/** The cross-section of a member: its shape, its measures, how often it stands side by side, plates on it. */
export function SectionFields({ part }: { part: Part<SectionDraft> }) {
  const { shape } = part.value
  const whole = messageOf({ ...part, at: part.at.slice(0, part.at.lastIndexOf('.')) }, 'section')
  return (
    <>
      <SelectField
        label="Shape of the section"
        nothing="Choose a shape"
        choices={shapeChoices}
        {...chosen(part, 'shape', ['', ...SECTION_SHAPES], 'Choose the shape of the section.')}
      />
      {shape !== '' && (
        <>
          <DecimalField
            label="How many side by side"
            unit={part.value.sideBySide.trim() === '1' ? 'piece' : 'pieces'}
            {...held(part, 'sideBySide')}
          />
          {DIMENSIONS[shape].map(({ key, ...words }) => (
            <QuantityField key={key} units={LENGTH_UNITS} {...words} {...held(part, key)} />
          ))}
        </>
      )}
      {shape === 'channel' && (
        <SelectField label="Inside of the flanges" choices={slopeChoices} {...chosen(part, 'slope', FLANGE_SLOPES)} />
      )}
      {shape === 'custom' && <ByFigures part={part} />}
      {shape !== '' && shape !== 'custom' && <Plates part={part} />}
      {whole && (
        <WholeRow>
          <FieldMessage id={`${part.at}-message`}>{whole}</FieldMessage>
        </WholeRow>
      )}
      <SectionSoFar section={part.value} />
    </>
  )
}

import { BOLT_CLASSES, ELECTRODES } from '#shared/structure/member-data'
import { AREA_UNITS, LENGTH_UNITS, PRESSURE_UNITS } from '#shared/units'
import { DecimalField, QuantityField } from '../../../../../components/decimal-field'
import { TextField } from '../../../../../components/field'
import { RadioRow } from '../../../../../components/radio-row'
import { SelectField } from '../../../../../components/select-field'
import type { JointStrengthDraft } from './draft'
import { MaterialFields, PartFields } from './material-fields'
import { chosen, held, text, within, type Part } from './part'
import { boltChoices, electrodeChoices } from './words'

type Joint = { part: Part<JointStrengthDraft> }

const planeChoices = [
  { value: '2', label: 'Two, held on both sides' },
  { value: '1', label: 'One' },
]
const seriesChoices = [
  { value: 'metric', label: 'Metric' },
  { value: 'inch', label: 'Inch' },
]

export function WeldFields({ part }: Joint) {
  const size = within(part, 'size')
  const electrode = within(part, 'electrode')
  return (
    <>
      <RadioRow
        label="Its size was measured as"
        choices={[
          { value: 'leg', label: 'Leg' },
          { value: 'throat', label: 'Throat' },
        ]}
        {...chosen(size, 'by', ['leg', 'throat'])}
      />
      <QuantityField
        label={part.value.size.by === 'leg' ? 'Leg of the fillet' : 'Throat of the weld'}
        units={LENGTH_UNITS}
        {...held(size, 'value')}
      />
      <QuantityField label="Length that carries the force" hint="All its runs together." units={LENGTH_UNITS} {...held(part, 'length')} />
      <SelectField
        label="Filler"
        nothing="Choose a class"
        choices={electrodeChoices}
        {...chosen(electrode, 'grade', ['', ...ELECTRODES, 'custom'], 'Choose the class of the filler.')}
      />
      {electrode.value.grade === 'custom' && (
        <>
          <TextField label="Name of the filler" autoComplete="off" {...text(electrode, 'name')} />
          <QuantityField label="Its tensile strength" units={PRESSURE_UNITS} {...held(electrode, 'tensile')} />
        </>
      )}
      <PartFields part={within(part, 'base')} what="the weaker part" optional />
    </>
  )
}

export function PinFields({ part }: Joint) {
  const single = part.value.shearPlanes === '1'
  return (
    <>
      <QuantityField label="Diameter of the pin" units={LENGTH_UNITS} {...held(part, 'diameter')} />
      <MaterialFields part={within(part, 'material')} label="Material of the pin" />
      <RadioRow label="Planes that shear it" choices={planeChoices} {...chosen(part, 'shearPlanes', ['1', '2'])} />
      <QuantityField
        label="Gap, on the wider side"
        hint="Clear space between outer and middle part."
        units={LENGTH_UNITS}
        {...held(part, 'gap')}
      />
      <PartFields part={within(part, 'outer')} what={single ? 'one part' : 'each outer part'} />
      <PartFields
        part={within(part, 'inner')}
        what={single ? 'the other part' : 'the middle part'}
        thick="Metal of the middle part that bears, together"
      />
      <QuantityField
        label="Outer part: hole to edge"
        hint="From the middle of the hole, the way the pin pushes."
        optional
        units={LENGTH_UNITS}
        {...held(part, 'outerEdge')}
      />
      <QuantityField
        label="Middle part: hole to edge"
        hint="From the middle of the hole, the way the pin pushes."
        optional
        units={LENGTH_UNITS}
        {...held(part, 'innerEdge')}
      />
    </>
  )
}

function Tapped({ part }: Joint) {
  const tapped = within(part, 'tapped')
  return (
    <>
      <QuantityField
        label="Length of thread screwed in"
        hint="Left empty for a full nut of the bolt’s class."
        optional
        units={LENGTH_UNITS}
        {...held(tapped, 'engagement')}
      />
      <PartFields
        part={{ ...tapped, onChange: (next) => tapped.onChange({ ...tapped.value, ...next }) }}
        what="what it is screwed into"
        optional
      />
    </>
  )
}

function Shoulder({ part }: Joint) {
  const shoulder = within(part, 'shoulder')
  return (
    <>
      <QuantityField label="Area on which it bottoms" optional units={AREA_UNITS} {...held(shoulder, 'area')} />
      <PartFields part={within(shoulder, 'part')} what="the softer face" optional />
    </>
  )
}

export function ThreadFields({ part }: Joint) {
  const thread = within(part, 'thread')
  const strength = within(part, 'strength')
  return (
    <>
      <RadioRow label="Thread" choices={seriesChoices} {...chosen(thread, 'series', ['metric', 'inch'])} />
      <QuantityField label="Nominal diameter" units={LENGTH_UNITS} {...held(thread, 'diameter')} />
      {thread.value.series === 'metric' ? (
        <QuantityField label="Pitch" units={LENGTH_UNITS} {...held(thread, 'pitch')} />
      ) : (
        <DecimalField label="Threads per inch" unit="per inch" {...held(thread, 'threadsPerInch')} />
      )}
      <SelectField
        label="Class of the bolt"
        nothing="Choose a class"
        choices={boltChoices}
        {...chosen(strength, 'class', ['', ...BOLT_CLASSES, 'custom'], 'Choose the class of the bolt, or another by its certificate.')}
      />
      {strength.value.class === 'custom' && (
        <>
          <TextField label="Name of the bolt" autoComplete="off" {...text(strength, 'name')} />
          <QuantityField label="Its proof strength" units={PRESSURE_UNITS} {...held(strength, 'proof')} />
        </>
      )}
      <DecimalField label="How many" unit="of them" {...held(part, 'count')} />
      <RadioRow
        label="The force goes"
        choices={[
          { value: 'along', label: 'Along it' },
          { value: 'across', label: 'Across it' },
        ]}
        {...chosen(part, 'loaded', ['along', 'across'])}
      />
      {part.value.loaded === 'across' && (
        <RadioRow label="Planes that shear it" choices={planeChoices} {...chosen(part, 'shearPlanes', ['1', '2'])} />
      )}
      <RadioRow
        label="The force is carried by"
        choices={[
          { value: 'thread', label: 'The thread' },
          { value: 'shank', label: 'A shank that bottoms' },
        ]}
        {...chosen(part, 'carriedBy', ['thread', 'shank'])}
      />
      {part.value.carriedBy === 'thread' ? <Tapped part={part} /> : <Shoulder part={part} />}
    </>
  )
}

export function BearingFields({ part }: Joint) {
  return (
    <>
      <QuantityField label="Area of the bearing face" units={AREA_UNITS} {...held(part, 'area')} />
      <PartFields part={within(part, 'part')} what="the softer face" />
    </>
  )
}

import { GRADES } from '#shared/structure/materials'
import { BOLT_CLASSES, ELECTRODES } from '#shared/structure/member-data'
import { SECTION_SHAPES } from '#shared/structure/section-shapes'

const capital = (text: string) => text.charAt(0).toUpperCase() + text.slice(1)
const named = (values: readonly string[], custom: string) => [
  ...values.map((value) => ({ value, label: value })),
  { value: 'custom', label: custom },
]

export const shapeChoices = SECTION_SHAPES.map((shape) => ({
  value: shape,
  label: shape === 'custom' ? 'Another, by its figures' : capital(shape),
}))
export const gradeChoices = named(GRADES, 'Another, by its certificate')
export const electrodeChoices = named(ELECTRODES, 'Another, by its certificate')
export const boltChoices = named(BOLT_CLASSES, 'Another, by its certificate')
export const slopeChoices = [
  { value: 'parallel', label: 'Parallel' },
  { value: 'one in six', label: 'Leaning one in six' },
  { value: '8 percent', label: 'Leaning 8 percent' },
]
export const placeChoices = [
  { value: 'on top', label: 'On top' },
  { value: 'underneath', label: 'Underneath' },
  { value: 'beside', label: 'Beside' },
]
export const roleChoices = [
  { value: 'beam', label: 'It bends' },
  { value: 'tie', label: 'It is pulled' },
]
export const supportChoices = [
  { value: 'both ends', label: 'At both ends' },
  { value: 'one end', label: 'At one end' },
]

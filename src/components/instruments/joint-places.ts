export type FrameKind = 'h-frame' | 'c-frame' | 'four-post' | 'bench'

export interface JointPlace {
  place: string
  label: string
}

const sides = (place: string, label: string): JointPlace[] => [
  { place: `${place}-left`, label: `${label}, left` },
  { place: `${place}-right`, label: `${label}, right` },
]
const RAM: JointPlace[] = [
  { place: 'ram-seat', label: 'Ram seat at the head' },
  { place: 'ram-adaptor', label: 'Adaptor on the ram rod' },
]
const HEAD = sides('head', 'Head beam to upright')
const FOOT = sides('foot', 'Foot of the upright')

/** Spots of each elevation that a joint can be pinned to, in the order they are walked. */
export const jointPlaces: Record<FrameKind, JointPlace[]> = {
  'h-frame': [
    ...HEAD,
    ...RAM,
    ...sides('bed-pin', 'Bed pin'),
    ...sides('bed-stiffener', 'Bed stiffener'),
    ...sides('upright', 'Along the upright'),
    ...FOOT,
  ],
  bench: [
    ...HEAD,
    ...RAM,
    ...sides('bed', 'Upright to bed'),
    ...sides('bed-stiffener', 'Bed stiffener'),
    ...sides('upright', 'Along the upright'),
  ],
  'four-post': [
    ...sides('column-top', 'Nut above the head, front column'),
    ...sides('head', 'Nut under the head, front column'),
    ...sides('column-back', 'Nut above the head, back column'),
    ...RAM,
    ...sides('bed', 'Column to bed'),
    ...sides('bed-stiffener', 'Bed stiffener'),
    ...FOOT,
  ],
  'c-frame': [
    { place: 'throat-top', label: 'Upper arm to column' },
    { place: 'throat-bottom', label: 'Bed to column' },
    ...RAM,
    { place: 'head-left', label: 'Nose of the upper arm' },
    { place: 'bed-left', label: 'Nose of the bed' },
    { place: 'bed-stiffener-left', label: 'Bed stiffener' },
    { place: 'column-back', label: 'Back of the column' },
    { place: 'head-right', label: 'Top of the column' },
    ...sides('foot', 'Foot'),
  ],
}

/** Spots that a measuring point can be pinned to. */
export const measuringPlaces: JointPlace[] = [
  { place: 'bed-middle', label: 'Middle of the bed' },
  { place: 'bed-pin-left', label: 'Left pin' },
  { place: 'bed-pin-right', label: 'Right pin' },
  { place: 'head-middle', label: 'Middle of the head beam' },
  { place: 'head-left', label: 'Head beam, left' },
  { place: 'head-right', label: 'Head beam, right' },
]

import type { FrameKind } from './model'

/** A spot of an elevation that a joint's leader or a measuring point's triangle can stand at. */
export interface Spot {
  place: string
  label: string
}

const sides = (place: string, label: string): Spot[] => [
  { place: `${place}-left`, label: `${label}, left` },
  { place: `${place}-right`, label: `${label}, right` },
]

const RAM: Spot[] = [
  { place: 'ram-seat', label: 'Ram seat at the head' },
  { place: 'ram-adaptor', label: 'Adaptor on the ram rod' },
]
const HEAD = sides('head', 'Head beam to upright')
const FOOT = sides('foot', 'Foot of the upright')

/** Spots of each elevation that a joint can be pinned to, in the order they are walked. */
export const jointPlaces: Record<FrameKind, readonly Spot[]> = {
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
export const measuringPlaces: readonly Spot[] = [
  { place: 'bed-middle', label: 'Middle of the bed' },
  { place: 'bed-pin-left', label: 'Left pin' },
  { place: 'bed-pin-right', label: 'Right pin' },
  { place: 'head-middle', label: 'Middle of the head beam' },
  { place: 'head-left', label: 'Head beam, left' },
  { place: 'head-right', label: 'Head beam, right' },
]

/** The order joints are walked in: round the frame as its spots are listed, then what has none, by number. */
export function walkingOrder<J extends { number: number; place: string | null }>(kind: FrameKind, joints: readonly J[]): J[] {
  const rank = new Map(jointPlaces[kind].map(({ place }, index) => [place, index]))
  const of = ({ place }: J): number => (place === null ? Infinity : (rank.get(place) ?? Infinity))
  return [...joints].sort((a, b) => (of(a) === of(b) ? a.number - b.number : of(a) - of(b)))
}

import type { FrameKind } from './model'

/** A spot of the front elevation that a joint's leader or a measuring point's triangle can stand at. */
export interface Spot {
  place: string
  label: string
}

const LEFT_RIGHT = (place: string, label: string): Spot[] => [
  { place: `${place}-left`, label: `${label}, left` },
  { place: `${place}-right`, label: `${label}, right` },
]

const spots = {
  head: LEFT_RIGHT('head', 'head at upright'),
  headStiffener: LEFT_RIGHT('head-stiffener', 'head stiffener'),
  ramSeat: [
    { place: 'ram-seat', label: 'ram seat' },
    { place: 'ram', label: 'ram in its seat' },
  ],
  adaptor: [{ place: 'adaptor', label: 'adaptor on the rod' }],
  bedPin: LEFT_RIGHT('bed-pin', 'bed pin'),
  bed: LEFT_RIGHT('bed', 'bed at upright'),
  bedStiffener: LEFT_RIGHT('bed-stiffener', 'bed stiffener'),
  foot: LEFT_RIGHT('foot', 'foot'),
} satisfies Record<string, Spot[]>

/** The spots that a drawing of each kind of frame has, from the head down. */
export const JOINT_PLACES: Record<FrameKind, readonly Spot[]> = {
  'h-frame': [
    ...spots.head,
    ...spots.headStiffener,
    ...spots.ramSeat,
    ...spots.adaptor,
    ...spots.bedPin,
    ...spots.bed,
    ...spots.bedStiffener,
    ...spots.foot,
  ],
  'four-post': [...spots.head, ...spots.headStiffener, ...spots.ramSeat, ...spots.adaptor, ...spots.bed, ...spots.bedStiffener, ...spots.foot],
  'c-frame': [
    { place: 'head-back', label: 'head at column' },
    ...spots.ramSeat,
    ...spots.adaptor,
    { place: 'bed-back', label: 'bed at column' },
    { place: 'throat-stiffener', label: 'throat stiffener' },
    { place: 'bed-stiffener', label: 'bed stiffener' },
    ...spots.foot,
  ],
  bench: [...spots.head, ...spots.ramSeat, ...spots.adaptor, ...spots.bed, ...spots.foot],
}

/** Where measuring points of a proof test stand, by the letter the drawing shows. */
export const POINT_PLACES: Record<FrameKind, readonly (Spot & { letter: string })[]> = {
  'h-frame': [
    { place: 'bed-middle', letter: 'M', label: 'bed middle' },
    { place: 'bed-pin-left', letter: 'L', label: 'left pin' },
    { place: 'bed-pin-right', letter: 'R', label: 'right pin' },
  ],
  'four-post': [
    { place: 'bed-middle', letter: 'M', label: 'bed middle' },
    { place: 'bed-left', letter: 'L', label: 'bed at left post' },
    { place: 'bed-right', letter: 'R', label: 'bed at right post' },
  ],
  'c-frame': [
    { place: 'throat', letter: 'T', label: 'opening at the ram' },
    { place: 'bed-back', letter: 'B', label: 'bed at column' },
  ],
  bench: [
    { place: 'bed-middle', letter: 'M', label: 'bed middle' },
    { place: 'bed-left', letter: 'L', label: 'bed at left upright' },
    { place: 'bed-right', letter: 'R', label: 'bed at right upright' },
  ],
}

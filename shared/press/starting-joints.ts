import type { FrameKind, Joint, Member } from './model'

export interface StartingFrame {
  members: Member[]
  joints: Joint[]
}

type Part = readonly [key: string, kind: Member['kind'], name: string]
type Hold = readonly [name: string, kind: Joint['kind'], from: string, to: string, place: string | null]

const RAM_PARTS: readonly Part[] = [
  ['seat', 'ram-seat', 'Ram seat'],
  ['ram', 'other', 'Ram'],
  ['adaptor', 'tooling-adaptor', 'Adaptor'],
]
const RAM_JOINTS: readonly Hold[] = [
  ['Ram in its seat', 'bolt', 'ram', 'seat', 'ram-seat'],
  ['Adaptor on ram rod', 'thread', 'adaptor', 'ram', 'ram-adaptor'],
]
const BED_STIFFENER_PARTS: readonly Part[] = [
  ['bed-stiffener-left', 'stiffener', 'Left bed stiffener'],
  ['bed-stiffener-right', 'stiffener', 'Right bed stiffener'],
]
const BED_STIFFENER_JOINTS: readonly Hold[] = [
  ['Left bed stiffener', 'weld', 'bed-stiffener-left', 'bed', 'bed-stiffener-left'],
  ['Right bed stiffener', 'weld', 'bed-stiffener-right', 'bed', 'bed-stiffener-right'],
]
const FEET_PARTS: readonly Part[] = [
  ['foot-left', 'base', 'Left foot'],
  ['foot-right', 'base', 'Right foot'],
]

const two = (side: 'left' | 'right', word: string) => ({ key: `${word}-${side}`, Side: side === 'left' ? 'Left' : 'Right' })
const uprights = (word: string): readonly Part[] =>
  (['left', 'right'] as const).map((side): Part => ['upright-' + side, 'upright', `${two(side, word).Side} ${word}`])
const atUprights = (name: string, kind: Joint['kind'], member: string, place: string, word: string): readonly Hold[] =>
  (['left', 'right'] as const).map((side): Hold => [`${name} ${side} ${word}`, kind, member, `upright-${side}`, `${place}-${side}`])
const feet = (word: string): readonly Hold[] =>
  (['left', 'right'] as const).map((side): Hold => [
    `${two(side, word).Side} ${word} to its foot`,
    'weld',
    `upright-${side}`,
    `foot-${side}`,
    `foot-${side}`,
  ])

const FRAMES: Record<FrameKind, { parts: readonly Part[]; holds: readonly Hold[] }> = {
  'h-frame': {
    parts: [
      ['head', 'head-beam', 'Head beam'],
      ...uprights('upright'),
      ...RAM_PARTS,
      ['bed', 'bed-beam', 'Bed beam'],
      ...BED_STIFFENER_PARTS,
      ...FEET_PARTS,
    ],
    holds: [
      ...atUprights('Head beam to', 'weld', 'head', 'head', 'upright'),
      ['Ram seat to head beam', 'weld', 'seat', 'head', 'ram-seat'],
      ...RAM_JOINTS,
      ['Left bed pin', 'pin', 'bed', 'upright-left', 'bed-pin-left'],
      ['Right bed pin', 'pin', 'bed', 'upright-right', 'bed-pin-right'],
      ...BED_STIFFENER_JOINTS,
      ...feet('upright'),
    ],
  },
  'four-post': {
    parts: [
      ['head', 'head-beam', 'Head plate'],
      ['upright-left', 'upright', 'Front left post'],
      ['upright-right', 'upright', 'Front right post'],
      ['upright-back-left', 'upright', 'Back left post'],
      ['upright-back-right', 'upright', 'Back right post'],
      ...RAM_PARTS,
      ['bed', 'bed-beam', 'Bed plate'],
    ],
    holds: [
      ...atUprights('Head plate to front', 'bolt', 'head', 'head', 'post'),
      ['Head plate to back left post', 'bolt', 'head', 'upright-back-left', 'column-back-left'],
      ['Head plate to back right post', 'bolt', 'head', 'upright-back-right', 'column-back-right'],
      ['Ram seat to head plate', 'weld', 'seat', 'head', 'ram-seat'],
      ...RAM_JOINTS,
      ...atUprights('Bed plate to front', 'bolt', 'bed', 'bed', 'post'),
      ['Bed plate to back left post', 'bolt', 'bed', 'upright-back-left', 'bed-left'],
      ['Bed plate to back right post', 'bolt', 'bed', 'upright-back-right', 'bed-right'],
    ],
  },
  'c-frame': {
    parts: [
      ['column', 'upright', 'Column'],
      ['head', 'head-beam', 'Head arm'],
      ...RAM_PARTS,
      ['bed', 'bed-beam', 'Bed arm'],
      ['throat-stiffener', 'stiffener', 'Throat stiffener'],
      ['bed-stiffener', 'stiffener', 'Bed stiffener'],
      ['foot', 'base', 'Foot'],
    ],
    holds: [
      ['Head arm to column', 'weld', 'head', 'column', 'throat-top'],
      ['Ram seat to head arm', 'weld', 'seat', 'head', 'ram-seat'],
      ...RAM_JOINTS,
      ['Bed arm to column', 'weld', 'bed', 'column', 'throat-bottom'],
      ['Throat stiffener', 'weld', 'throat-stiffener', 'column', 'column-back'],
      ['Bed stiffener', 'weld', 'bed-stiffener', 'bed', 'bed-stiffener-left'],
      ['Column to its foot', 'weld', 'column', 'foot', 'foot-left'],
    ],
  },
  bench: {
    parts: [['head', 'head-beam', 'Head beam'], ...uprights('rod'), ...RAM_PARTS, ['bed', 'bed-beam', 'Bed plate']],
    holds: [
      ...atUprights('Head beam to', 'bolt', 'head', 'head', 'rod'),
      ['Ram seat to head beam', 'weld', 'seat', 'head', 'ram-seat'],
      ...RAM_JOINTS,
      ...atUprights('Bed plate to', 'bolt', 'bed', 'bed', 'rod'),
    ],
  },
}

/**
 * The members and joints that a frame of this kind has at the least, as a list to start from: the seat, the
 * adaptor, the pins, the stiffeners and the feet are what gets forgotten. Every joint is open, because nobody
 * has said otherwise. `nextId` gives a new id each time. Common practice, no source.
 */
export function startingFrame(kind: FrameKind, nextId: () => string): StartingFrame {
  const { parts, holds } = FRAMES[kind]
  const ids = new Map(parts.map(([key]) => [key, nextId()]))
  const idOf = (key: string): string => {
    const id = ids.get(key)
    if (id === undefined) throw new Error(`No member is called ${key}.`)
    return id
  }
  return {
    members: parts.map(([key, memberKind, name]) => ({ id: idOf(key), kind: memberKind, name })),
    joints: holds.map(([name, jointKind, from, to, place], index) => ({
      id: nextId(),
      number: index + 1,
      name,
      kind: jointKind,
      detail: '',
      between: [idOf(from), idOf(to)],
      makeUp: 'open',
      madeBy: '',
      filler: '',
      madeOn: null,
      place,
    })),
  }
}

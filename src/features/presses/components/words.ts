import { CHANGE_KINDS } from '#shared/press/entries'
import {
  EXAMINATION_METHODS,
  FRAME_KINDS,
  JOINT_KINDS,
  MAKE_UPS,
  MEMBER_KINDS,
  TRAIN_PART_KINDS,
  type FrameKind,
  type Joint,
  type MakeUp,
  type Member,
  type TrainPart,
} from '#shared/press/model'
import { capital } from '../../../lib/words'

export const frameWords: Record<FrameKind, string> = {
  'h-frame': 'H-frame',
  'c-frame': 'C-frame',
  'four-post': 'four posts',
  bench: 'bench frame',
}

export const memberWords: Record<Member['kind'], string> = {
  'head-beam': 'Head beam',
  'bed-beam': 'Bed beam',
  upright: 'Upright',
  'ram-seat': 'Ram seat',
  pin: 'Pin',
  'tooling-adaptor': 'Tooling adaptor',
  stiffener: 'Stiffener',
  base: 'Foot or base',
  other: 'Other',
}

export const jointWords: Record<Joint['kind'], string> = {
  weld: 'Weld',
  pin: 'Pin',
  bolt: 'Bolt',
  thread: 'Thread',
  bearing: 'Bearing face',
}

export const makeUpWords: Record<MakeUp, { label: string; note: string }> = {
  open: { label: 'Open', note: 'no metal across' },
  tacked: { label: 'Tacked', note: 'counts as no weld' },
  finished: { label: 'Finished', note: 'still to be examined' },
}

export const trainWords: Record<TrainPart['kind'], string> = {
  hose: 'Hose',
  coupler: 'Coupler',
  pump: 'Pump',
  valve: 'Valve',
  relief: 'Relief valve',
  frame: 'Frame',
  tooling: 'Tooling',
  stack: 'Stack or dummy',
  other: 'Other',
}

export const changeWords: Record<(typeof CHANGE_KINDS)[number], { label: string; note?: string }> = {
  repair: { label: 'Repair' },
  modification: { label: 'Modification' },
  overload: { label: 'Overload', note: 'it was loaded past what it is cleared for' },
  knock: { label: 'Knock', note: 'it was hit, dropped or tipped' },
  moved: { label: 'Moved', note: 'to another place' },
  'long stop': { label: 'Long stop', note: 'it stood unused' },
  painted: { label: 'Painted', note: 'joints may be hidden under it' },
  'ram or gauge changed': { label: 'Ram or gauge changed' },
}

const choicesOf = <Value extends string>(values: readonly Value[], label: (value: Value) => string) =>
  values.map((value) => ({ value, label: label(value) }))

export const frameChoices = choicesOf(FRAME_KINDS, (kind) => capital(frameWords[kind]))
export const memberChoices = choicesOf(MEMBER_KINDS, (kind) => memberWords[kind])
export const jointChoices = choicesOf(JOINT_KINDS, (kind) => jointWords[kind])
export const makeUpChoices = choicesOf(MAKE_UPS, (makeUp) => makeUpWords[makeUp].label)
export const trainChoices = choicesOf(TRAIN_PART_KINDS, (kind) => trainWords[kind])
export const methodChoices = choicesOf(EXAMINATION_METHODS, capital)
export const changeChoices = choicesOf(CHANGE_KINDS, (kind) => changeWords[kind].label).map((choice) => ({
  ...choice,
  note: changeWords[choice.value].note,
}))

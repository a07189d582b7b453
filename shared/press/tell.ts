import { unitLabel } from '../units'
import type { PressKind, PressPayload } from './entries'
import { nameJoints } from './joints'
import type { PressEvent, PressState } from './state'

const PLAIN = { mark: 'plain', proofTestId: null } as const
type Told = Pick<PressEvent, 'text' | 'mark' | 'proofTestId'>
/** One line of a press's history for each kind of entry; `state` is the state after it. */
type Tellers = { [K in PressKind]: (payload: PressPayload<K>, state: PressState) => Told }

const numbersOf = (state: PressState, ids: readonly string[]): string =>
  nameJoints(state.joints.filter((joint) => ids.includes(joint.id)).map((joint) => joint.number))

export const tell: Tellers = {
  registered: (payload) => ({ ...PLAIN, text: `Entered with ${payload.joints.length} joints` }),
  described: () => ({ ...PLAIN, text: 'Description changed' }),
  'joint-added': (payload) => ({ ...PLAIN, text: `Joint ${payload.joint.number} added` }),
  'joint-described': (payload) => ({ ...PLAIN, text: `Joint ${payload.joint.number} described anew` }),
  'joint-retired': (payload, state) => ({ ...PLAIN, text: `Retired ${numbersOf(state, [payload.jointId])}` }),
  'joint-worked': (payload, state) => ({ ...PLAIN, text: `Now ${payload.makeUp}: ${numbersOf(state, [payload.jointId])}` }),
  'joint-examined': (payload, state) => ({
    text: `${payload.result === 'accepted' ? 'Accepted' : 'Rejected'} ${numbersOf(state, [payload.jointId])}, ${payload.method}`,
    mark: payload.result === 'accepted' ? 'plain' : 'stop',
    proofTestId: payload.test?.proofTestId ?? null,
  }),
  'joint-split': (payload, state) => ({
    ...PLAIN,
    text: `Split ${numbersOf(state, [payload.jointId])} into ${nameJoints(payload.into.map((joint) => joint.number))}`,
  }),
  'joint-placed': (payload, state) => ({ ...PLAIN, text: `Placed ${numbersOf(state, [payload.jointId])} on the drawing` }),
  'strength-described': () => ({ ...PLAIN, text: 'Sizes and materials written down' }),
  'repair-opened': (payload) => ({ text: `Repair wanted: ${payload.why}`, mark: 'stop', proofTestId: null }),
  'repair-noted': (payload) => ({ ...PLAIN, text: `Repair: ${payload.note} (${payload.doneBy})` }),
  'repair-closed': (payload) => ({ ...PLAIN, text: `Repaired: ${payload.done} (${payload.doneBy})` }),
  changed: (payload) => ({ ...PLAIN, text: `${payload.change[0]?.toUpperCase()}${payload.change.slice(1)}: ${payload.why}` }),
  'test-opened': (payload) => ({ text: `${payload.number} opened`, mark: 'under-way', proofTestId: payload.proofTestId }),
  'test-stopped': (payload) => ({ text: `${payload.number} stopped. ${payload.why}`, mark: 'stop', proofTestId: payload.proofTestId }),
  'test-concluded': (payload) => ({
    text: `${payload.number} concluded: ${payload.conclusion}`,
    mark: payload.conclusion === 'accepted' ? 'within' : 'stop',
    proofTestId: payload.proofTestId,
  }),
  'test-late-fact': (payload) => ({ text: `${payload.number}: ${payload.why}`, mark: 'stop', proofTestId: payload.proofTestId }),
  'test-ended': (payload) => ({ text: `${payload.number}: ${payload.why}`, mark: 'stop', proofTestId: payload.proofTestId }),
  'instrument-recalled': (payload) => ({
    text: `${payload.code} was found out of tolerance on ${payload.calibratedOn}`,
    mark: 'stop',
    proofTestId: null,
  }),
  'clearance-given': (payload) => ({
    text: `Cleared up to ${payload.load.text} ${unitLabel(payload.load.unit, { plural: true })}`,
    mark: 'within',
    proofTestId: payload.proofTestId,
  }),
  'tag-taken-off': () => ({ ...PLAIN, text: 'Tag taken off the press' }),
  withdrawn: (payload) => ({ text: `Withdrawn by hand. ${payload.why}`, mark: 'stop', proofTestId: null }),
}

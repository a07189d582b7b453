import { foldPress } from '#shared/press/apply'
import type { Clearance, PressDraft } from '#shared/press/entries'
import type { PressState } from '#shared/press/state'
import { ids, openedPayload } from './test-press'

const { press: description, joints } = openedPayload()

export const ENTERED: PressDraft = { kind: 'registered', payload: { description, joints, lastWorkedOn: null } }
export const TEST = { proofTestId: ids.test, number: 'PT-0043' }

/** A clearance after `TEST`, invented, in force until the day given. */
export const clearanceUntil = (until: string): Clearance => ({
  load: { text: '11.7', unit: 'short-ton' },
  loadNewton: 104_088,
  gaugePressure: { text: '7650', unit: 'psi' },
  gaugeCode: 'G-02',
  instrumentIds: [ids.gauge],
  bedHoles: ['4'],
  ramPositions: ['central'],
  tooling: ['T-01 Flat nose, 80 mm round'],
  until,
  clearedOn: '2026-09-15',
  clearedBy: 'Marit Sandoval',
  ...TEST,
  staticLoads: 1,
  notMeasured: ['Head beam'],
  conditions: ['With the ram it was proven with, read on gauge G-02.', 'Pressed slowly, with the load in line with the ram.'],
  protocol: 'First load by quarters, version 1',
  toolingLimitNewton: 177_929,
})

export const CLEARED: PressDraft = { kind: 'clearance-given', payload: clearanceUntil('2999-01-01') }

/** Every joint of the press accepted outside a test. */
export const ACCEPTED: readonly PressDraft[] = joints.map(({ id: jointId }) => ({
  kind: 'joint-examined',
  payload: { jointId, method: 'visual', result: 'accepted', remark: '', test: null },
}))

/** Id of the entry at a place in the ledger, counted from 1: a repair is named by the entry that opened it. */
export const entryId = (seq: number): string => `01990000-0000-7000-8000-${String(seq - 1).padStart(12, '0')}`

/** The press of the test factory, entered and then what the drafts say, a minute apart. */
export function pressAfter(...drafts: PressDraft[]): PressState {
  return foldPress(
    ids.press,
    [ENTERED, ...drafts].map((draft, index) => {
      const at = new Date(Date.UTC(2026, 8, 15, 10, index)).toISOString()
      return {
        id: entryId(index + 1),
        ledgerId: ids.press,
        v: 1,
        ...draft,
        authorId: ids.lead,
        deviceId: ids.test,
        deviceSeq: index + 1,
        basedOnSeq: index,
        observedAt: at,
        bootId: ids.test,
        monotonicMs: index,
        attachments: [],
        overrides: [],
        seq: index + 1,
        receivedAt: at,
        irregular: [],
        prevHash: '0'.repeat(64),
        hash: '1'.repeat(64),
      }
    }),
  )
}

import type { UnderWay } from '#shared/api/today'
import { foldProofTest } from '#shared/proof-test/apply'
import { summariseClimb } from '#shared/proof-test/climb-summary'
import type { EntryDraft } from '#shared/ledger/envelope'
import type { KeptLedger } from '../../lib/ledger-cache'
import { foldWaiting } from '../../lib/provisional'

/** Where a test stands by what this device has of it: undefined for one that is over, or in which this person has no part. */
export function underWayHere(kept: KeptLedger, waiting: readonly EntryDraft[], userId: string): UnderWay | undefined {
  const { state } = foldWaiting(foldProofTest(kept.testId, kept.entries), kept.entries, waiting)
  const { opened, conclusion } = state
  if (!opened || (conclusion && state.signed)) return undefined
  const { lead, witness, pumpHand } = opened.people
  if (![lead.id, witness.id, pumpHand.id].includes(userId)) return undefined
  const rungs = summariseClimb(state)
  return {
    test: {
      id: kept.testId,
      number: opened.number,
      pressId: opened.pressId,
      pressName: opened.press.name,
      protocolName: opened.protocol.name,
      status: state.stopped ? 'stopped' : conclusion ? 'concluded' : 'under way',
      result: conclusion?.conclusion ?? null,
      ratedLoad: opened.press.ratedLoad,
      reachedPercent: Math.max(0, ...rungs.rungs.filter(({ state: rung }) => rung === 'went-on').map(({ percent }) => percent)),
      stoppedAtPercent: state.stopped?.atPercent ?? null,
      leadId: lead.id ?? '',
      leadName: lead.name,
      witnessId: witness.id ?? '',
      witnessName: witness.name,
      openedAt: kept.entries[0]?.observedAt ?? kept.heardAt,
      concludedAt: null,
      sealedAt: null,
    },
    whatFor: opened.press.whatFor,
    pumpHandId: pumpHand.id,
    climb: rungs,
  }
}

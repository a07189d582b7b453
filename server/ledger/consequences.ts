import { QueryTypes } from 'sequelize'
import type { EntryDraft } from '#shared/ledger/envelope'
import type { PressDraft } from '#shared/press/entries'
import { PROOF_TEST_ACTS, type ProofTestDraft } from '#shared/proof-test/entries'
import { conditionsOf } from '#shared/press/clearance-words'
import { membersConcerned } from '#shared/proof-test/concerned'
import { evaluateTest } from '#shared/proof-test/evaluate'
import { instrumentOf, leadInstrument } from '#shared/proof-test/force'
import { monthsAfter } from '#shared/proof-test/record'
import type { ProofTestState } from '#shared/proof-test/state'
import { toSI } from '#shared/units'
import { appendConsequence } from './press'
import type { Writing } from './write'

function clearanceOf(state: ProofTestState, clearedOn: string): PressDraft[] {
  const { opened } = state
  if (!opened) return []
  const test = { proofTestId: state.id, number: opened.number }
  const figures = evaluateTest(state).clearance
  if (!figures) {
    const why =
      opened.instrumentOverride !== null
        ? 'an instrument was out of calibration, so it gives no clearance.'
        : 'nothing is left to clear after the uncertainty.'
    return [{ kind: 'test-ended', payload: { ...test, why } }]
  }
  const gauge = leadInstrument(opened)
  const climbs = state.legs.flatMap((leg) => leg.climbs)
  const tooling = opened.press.train.filter((part) => part.kind === 'tooling')
  const ratings = tooling.flatMap((part) => (part.ratedForce ? [toSI(part.ratedForce)] : []))
  const proven = {
    gaugeCode: gauge ? (instrumentOf(opened, gauge.id)?.details.code ?? '') : '',
    bedHoles: [...new Set(opened.legs.map((leg) => leg.bedHole))],
    ramPositions: [...new Set(opened.legs.map((leg) => leg.ramPosition))],
    tooling: tooling.map((part) => part.name),
  }
  return [
    {
      kind: 'clearance-given',
      payload: {
        load: { text: figures.text, unit: figures.unit },
        loadNewton: figures.load,
        gaugePressure: figures.gaugePressure,
        ...proven,
        instrumentIds: opened.instruments.map((instrument) => instrument.id),
        until: monthsAfter(clearedOn, opened.protocol.content.examinationMonths),
        clearedOn,
        clearedBy: opened.people.lead.name,
        ...test,
        staticLoads: climbs.filter((climb) => climb.released).length || 1,
        notMeasured: opened.notMeasured,
        conditions: conditionsOf(proven),
        protocol: `${opened.protocol.name}, version ${opened.protocol.version}`,
        toolingLimitNewton: ratings.length > 0 ? Math.min(...ratings) : null,
      },
    },
  ]
}

/** What one entry of a test does to its press: the consequences, in order. */
function consequencesOf(before: ProofTestState, after: ProofTestState, draft: ProofTestDraft): PressDraft[] {
  const { opened } = after
  if (!opened) return []
  const test = { proofTestId: after.id, number: opened.number }
  const jointIds = after.joints.map((joint) => joint.joint.id)
  if (after.stopped && !before.stopped && !after.conclusion) {
    return [{ kind: 'test-stopped', payload: { ...test, why: after.stopped.why, jointIds, memberIds: membersConcerned(after) } }]
  }
  if (before.countersigned && !PROOF_TEST_ACTS.has(draft.kind)) {
    return [
      { kind: 'test-late-fact', payload: { ...test, why: 'a fact arrived after the seal. Look at it, then test again or withdraw.' } },
    ]
  }
  switch (draft.kind) {
    case 'opened':
      return [{ kind: 'test-opened', payload: { ...test, repeatsId: opened.repeats?.id ?? null } }]
    case 'joint-worked':
      return [{ kind: 'joint-worked', payload: { ...draft.payload, test } }]
    case 'joint-examined': {
      const { jointId, method, result, remark } = draft.payload
      return [{ kind: 'joint-examined', payload: { jointId, method, result, remark, test } }]
    }
    case 'concluded':
      return [
        {
          kind: 'test-concluded',
          payload: { ...test, conclusion: draft.payload.conclusion, jointIds, memberIds: membersConcerned(after) },
        },
      ]
    case 'countersigned':
      return after.conclusion?.conclusion === 'accepted' ? clearanceOf(after, draft.payload.signedAt.slice(0, 10)) : []
    default:
      return []
  }
}

/** Whether the press is no longer taken up by this test. */
function setsFree(after: ProofTestState, draft: ProofTestDraft): boolean {
  if (draft.kind === 'concluded') return draft.payload.conclusion !== 'accepted'
  return draft.kind === 'countersigned' && after.conclusion !== null
}

/** Appends an entry's consequences to the press's ledger and frees the press when the test is over. */
export async function carryOut(writing: Writing, before: ProofTestState, after: ProofTestState, cause: EntryDraft): Promise<void> {
  const pressId = after.opened?.pressId
  if (!pressId) return
  const draft = { kind: cause.kind, payload: cause.payload } as ProofTestDraft
  for (const consequence of consequencesOf(before, after, draft)) await appendConsequence(writing, pressId, cause, consequence)
  if (!setsFree(after, draft)) return
  await writing.database.query('DELETE FROM active_tests WHERE press_id = ? AND proof_test_id = ?', {
    replacements: [pressId, after.id],
    type: QueryTypes.DELETE,
    transaction: writing.transaction,
  })
}

import type { Sequelize, Transaction } from 'sequelize'
import { QueryTypes } from 'sequelize'
import { awaitsSignature } from '#shared/press/may-it-be-used'
import type { PressState } from '#shared/press/state'
import type { ProofTestState } from '#shared/proof-test/state'
import { toSI } from '#shared/units'

type Column = string | number | Date | null
type Columns = Record<string, Column>

function testStatus(state: ProofTestState): string {
  if (state.countersigned) return 'signed'
  if (state.signed) return 'to countersign'
  if (state.conclusion) return (state.declined.at(-1)?.seq ?? 0) > state.conclusion.seq ? 'declined' : 'concluded'
  return state.stopped ? 'stopped' : 'under way'
}

/** The highest stage that was read, in percent of the rated load. */
function reachedPercent(state: ProofTestState): number {
  const stages = state.legs.flatMap((leg) => leg.climbs.flatMap((climb) => climb.stages))
  const read = stages.filter((stage) => stage.attempts.some((attempt) => attempt.rows.length > 0))
  return Math.max(0, ...read.map((stage) => stage.percent))
}

const moment = (iso: string | undefined): Date | null => (iso ? new Date(iso) : null)

/** What the register of proof tests shows of one, as a function of its ledger; null before it is opened. */
export function proofTestColumns(state: ProofTestState): Columns | null {
  const { opened, openedAt } = state
  if (!opened || !openedAt) return null
  return {
    number: opened.number,
    number_index: Number(opened.number.slice(3)),
    press_id: opened.pressId,
    press_name: opened.press.whatFor ? `${opened.press.name}, ${opened.press.whatFor}` : opened.press.name,
    protocol_name: opened.protocol.name,
    status: testStatus(state),
    result: state.conclusion?.conclusion ?? null,
    rated_load_newton: toSI(opened.press.ratedLoad),
    rated_load_text: opened.press.ratedLoad.text,
    rated_load_unit: opened.press.ratedLoad.unit,
    reached_percent: reachedPercent(state),
    stopped_at_percent: state.stopped ? (state.stopped.atPercent ?? 0) : null,
    lead_id: opened.people.lead.id,
    lead_name: opened.people.lead.name,
    witness_id: opened.people.witness.id,
    witness_name: opened.people.witness.name,
    opened_at: new Date(openedAt),
    concluded_at: moment(state.conclusion?.at),
    sealed_at: moment(state.countersigned?.signedAt),
    head_seq: state.headSeq,
  }
}

function pressStatus(state: PressState): string {
  // Concluded and waiting for a signature: nothing is under way any more, and nothing is cleared yet.
  if (state.underTest && !state.underTest.stopped && !awaitsSignature(state)) return 'under test'
  if (state.clearance.is !== 'none') return state.clearance.is
  const joints = state.joints.filter((joint) => !joint.retired)
  return joints.length > 0 && joints.every((joint) => joint.makeUp === 'finished') ? 'ready' : 'building'
}

/** What the register of presses shows of one, as a function of its ledger; null before it is entered. */
export function pressColumns(state: PressState): Columns | null {
  const { description, clearance } = state
  if (!description) return null
  const joints = state.joints.filter((joint) => !joint.retired)
  const cleared = clearance.is === 'cleared' ? clearance.clearance : null
  return {
    name: description.name,
    what_for: description.whatFor,
    kind: description.kind,
    status: pressStatus(state),
    rated_load_newton: toSI(description.ratedLoad),
    rated_load_text: description.ratedLoad.text,
    rated_load_unit: description.ratedLoad.unit,
    cleared_to_newton: cleared?.loadNewton ?? null,
    cleared_to_text: cleared?.load.text ?? null,
    cleared_to_unit: cleared?.load.unit ?? null,
    cleared_until: cleared?.until ?? null,
    joint_count: joints.length,
    joints_accepted: joints.filter((joint) => joint.examination?.result === 'accepted').length,
    last_changed_at: new Date(state.history.at(-1)?.at ?? 0),
    head_seq: state.headSeq,
  }
}

/** Writes a projection row, new or over the old one. Column names are the program's own. */
async function put(
  database: Sequelize,
  transaction: Transaction,
  table: string,
  id: string,
  shopId: string,
  columns: Columns,
): Promise<void> {
  const names = Object.keys(columns)
  const updates = names.map((name) => `${name} = VALUES(${name})`).join(', ')
  await database.query(
    `INSERT INTO ${table} (id, shop_id, ${names.join(', ')}) VALUES (?, ?, ${names.map(() => '?').join(', ')}) ON DUPLICATE KEY UPDATE ${updates}`,
    { replacements: [id, shopId, ...Object.values(columns)], type: QueryTypes.INSERT, transaction },
  )
}

export async function projectProofTest(
  database: Sequelize,
  transaction: Transaction,
  shopId: string,
  state: ProofTestState,
): Promise<void> {
  const columns = proofTestColumns(state)
  if (columns) await put(database, transaction, 'proof_tests', state.id, shopId, columns)
}

export async function projectPress(database: Sequelize, transaction: Transaction, shopId: string, state: PressState): Promise<void> {
  const columns = pressColumns(state)
  if (columns) await put(database, transaction, 'presses', state.id, shopId, columns)
}

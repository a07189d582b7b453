import type { Sequelize, Transaction } from 'sequelize'
import type { LedgerEntry } from '#shared/ledger/envelope'
import { foldPress } from '#shared/press/apply'
import type { PressState } from '#shared/press/state'
import { foldProofTest } from '#shared/proof-test/apply'
import type { ProofTestState } from '#shared/proof-test/state'
import { readEntries, type LedgerHead } from './read'

const KEPT = 200

/**
 * Folded ledgers by (ledger, hash of the head): a state is a function of the hash, so that an entry of this
 * cache can be missing but never wrong, whichever server wrote the ledger last.
 */
class Folds {
  private readonly states = new Map<string, ProofTestState | PressState>()

  get(key: string): ProofTestState | PressState | undefined {
    const state = this.states.get(key)
    if (state) {
      this.states.delete(key)
      this.states.set(key, state)
    }
    return state
  }

  set(key: string, state: ProofTestState | PressState): void {
    this.states.set(key, state)
    const [oldest] = this.states.keys()
    if (this.states.size > KEPT && oldest !== undefined) this.states.delete(oldest)
  }
}

const foldsOf = new WeakMap<Sequelize, Folds>()

function folds(database: Sequelize): Folds {
  const known = foldsOf.get(database)
  if (known) return known
  const made = new Folds()
  foldsOf.set(database, made)
  return made
}

/** The state of a ledger at its head: remembered, or folded from its entries. */
async function stateAt<State extends ProofTestState | PressState>(
  database: Sequelize,
  transaction: Transaction,
  head: LedgerHead,
  fold: (id: string, entries: readonly LedgerEntry[]) => State,
): Promise<State> {
  const known = folds(database).get(`${head.id} ${head.headHash}`)
  if (known) return known as State
  const state = fold(head.id, await readEntries(database, transaction, head.id))
  rememberFold(database, state)
  return state
}

export function proofTestState(database: Sequelize, transaction: Transaction, head: LedgerHead): Promise<ProofTestState> {
  return stateAt(database, transaction, head, foldProofTest)
}

export function pressState(database: Sequelize, transaction: Transaction, head: LedgerHead): Promise<PressState> {
  return stateAt(database, transaction, head, foldPress)
}

/** Remembers a state under the head it was folded to. */
export function rememberFold(database: Sequelize, state: ProofTestState | PressState): void {
  folds(database).set(`${state.id} ${state.headHash}`, state)
}

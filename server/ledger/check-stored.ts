import { createHash } from 'node:crypto'
import type { Sequelize } from 'sequelize'
import type { StoredEntry } from '#shared/ledger/chain'
import { checkLedger, type LedgerCheck } from '#shared/ledger/check-ledger'
import type { Seal } from '#shared/ledger/seal'
import type { AppContext } from '../context'
import { conflict, type Problem } from '../problem'
import { publicSealKeys } from './seal-keys'

const KEPT = 500
const checks = new WeakMap<Sequelize, Map<string, LedgerCheck>>()

/** Answers by the very bytes that were read: an entry here can be missing but never out of date. */
function remembered(database: Sequelize, key: string, check: () => LedgerCheck): LedgerCheck {
  const known = checks.get(database) ?? new Map<string, LedgerCheck>()
  checks.set(database, known)
  const answer = known.get(key) ?? check()
  known.delete(key)
  known.set(key, answer)
  const [oldest] = known.keys()
  if (known.size > KEPT && oldest !== undefined) known.delete(oldest)
  return answer
}

type Broken = Exclude<LedgerCheck, { verdict: 'whole' }>

/**
 * Checks a ledger as it was just read, chain and seals, with the keys in use and the retired ones; null when it is
 * whole. What is found is logged: somebody has to look at the database.
 */
export function findBroken(
  { config, database, logger }: Pick<AppContext, 'config' | 'database' | 'logger'>,
  ledgerId: string,
  stored: readonly StoredEntry[],
  seals: readonly Seal[],
): Broken | null {
  const keys = publicSealKeys(config)
  const key = createHash('sha256')
    .update(JSON.stringify([ledgerId, stored, seals, keys]))
    .digest('hex')
  const check = remembered(database, key, () => checkLedger(ledgerId, stored, seals, keys))
  if (check.verdict === 'whole') return null
  logger.error({ ledgerId, check }, 'a ledger is not whole as it stands in the database')
  return check
}

/** What is told about it: at which entry, and why. */
export function sayBroken(broken: Broken): { at: number | null; why: string } {
  return { at: broken.verdict === 'altered' ? broken.at : null, why: broken.why }
}

/** The refusal to go on with a ledger that is not whole. */
export function alteredProblem(broken: Broken): Problem {
  const { at, why } = sayBroken(broken)
  const where = at === null ? 'This record is not as it was sealed.' : `This record was altered at entry ${at}.`
  return conflict('altered', `${where} ${why} Keep a copy of its ledger file, and compare it with an earlier one.`)
}

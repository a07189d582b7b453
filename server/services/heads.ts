import { QueryTypes } from 'sequelize'
import type { Sequelize } from 'sequelize'
import type { Logger } from 'pino'
import type { AppContext } from '../context'

/** How often the database is asked, by a whole server. */
export const POLL_MILLISECONDS = 400

export type Heads = Record<string, number>

interface Watch {
  ids: ReadonlySet<string>
  tell(heads: Heads): void
}

function delay(milliseconds: number): Promise<void> {
  return new Promise((resolve) => {
    setTimeout(resolve, milliseconds)
  })
}

async function readHeads(database: Sequelize, ids: readonly string[]): Promise<Heads> {
  const rows = await database.query<{ id: string; headSeq: number }>('SELECT id, head_seq AS headSeq FROM ledgers WHERE id IN (?)', {
    replacements: [ids],
    type: QueryTypes.SELECT,
  })
  return Object.fromEntries(rows.map((row) => [row.id, row.headSeq]))
}

/**
 * Tells who watches a ledger that it has grown, whichever server wrote it. One query for all watched ledgers together,
 * again and again, and none while nobody watches.
 */
export class HeadWatch {
  private readonly watches = new Set<Watch>()
  private known: Heads = {}
  private running = false

  constructor(
    private readonly database: Sequelize,
    private readonly logger: Logger,
  ) {}

  /**
   * `tell` hears of every head that moves from now on. Whoever wants to know where they stand reads them after this,
   * so that nothing falls between. Returns how to stop.
   */
  watch(ids: readonly string[], tell: (heads: Heads) => void): () => void {
    const watch = { ids: new Set(ids), tell }
    this.watches.add(watch)
    if (!this.running) void this.run()
    return () => this.watches.delete(watch)
  }

  private async run(): Promise<void> {
    this.running = true
    for (;;) {
      await delay(POLL_MILLISECONDS)
      if (this.watches.size === 0) break
      try {
        this.tellWhatMoved(await readHeads(this.database, [...new Set([...this.watches].flatMap((watch) => [...watch.ids]))]))
      } catch (error) {
        // Nobody is told anything while the database is away; what moved meanwhile is seen when it is back.
        this.logger.warn({ err: error }, 'The heads of the watched ledgers could not be read')
      }
    }
    this.known = {}
    this.running = false
  }

  private tellWhatMoved(heads: Heads): void {
    const moved = Object.entries(heads).filter(([id, seq]) => this.known[id] !== seq)
    this.known = heads
    for (const { ids, tell } of this.watches) {
      const own = moved.filter(([id]) => ids.has(id))
      if (own.length > 0) tell(Object.fromEntries(own))
    }
  }
}

const watchOf = new WeakMap<Sequelize, HeadWatch>()

/** The one watch of a server. */
export function headWatch({ database, logger }: Pick<AppContext, 'database' | 'logger'>): HeadWatch {
  const known = watchOf.get(database)
  if (known !== undefined) return known
  const made = new HeadWatch(database, logger)
  watchOf.set(database, made)
  return made
}

/** Where those of these ledgers stand that the person may read, by the rule of reading a whole one; others are left out. */
export async function readableHeads({ database }: Pick<AppContext, 'database'>, userId: string, ids: readonly string[]): Promise<Heads> {
  const rows = await database.query<{ id: string; headSeq: number }>(
    `SELECT l.id AS id, l.head_seq AS headSeq
       FROM ledgers l JOIN memberships m ON m.shop_id = l.shop_id AND m.user_id = ? AND m.ended_at IS NULL
      WHERE l.id IN (?)
      UNION
     SELECT l.id AS id, l.head_seq AS headSeq
       FROM ledgers l JOIN test_guests g ON g.shop_id = l.shop_id AND g.proof_test_id = l.id AND g.user_id = ? AND g.ended_at IS NULL
      WHERE l.id IN (?)`,
    { replacements: [userId, ids, userId, ids], type: QueryTypes.SELECT },
  )
  return Object.fromEntries(rows.map((row) => [row.id, row.headSeq]))
}

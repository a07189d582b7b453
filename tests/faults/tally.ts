import { mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { z } from 'zod'

export const PROCESSES = ['server', 'database', 'browser'] as const
export type ProcessName = (typeof PROCESSES)[number]

/** What a run under faults comes to. */
export interface Totals {
  kills: Record<ProcessName, number>
  acknowledged: number
  found: number
  lost: number
  duplicated: number
}

const totalsSchema = z.object({
  kills: z.object({ server: z.int(), database: z.int(), browser: z.int() }),
  acknowledged: z.int(),
  found: z.int(),
  lost: z.int(),
  duplicated: z.int(),
})

const none = (): Totals => ({ kills: { server: 0, database: 0, browser: 0 }, acknowledged: 0, found: 0, lost: 0, duplicated: 0 })

export const killsOf = ({ kills }: Totals): number => PROCESSES.reduce((sum, name) => sum + kills[name], 0)

export function lineOf(totals: Totals): string {
  const { acknowledged, found, lost, duplicated } = totals
  return `kills ${killsOf(totals)} · acknowledged ${acknowledged} · found ${found} · lost ${lost} · duplicated ${duplicated}`
}

export const killsByProcess = ({ kills }: Totals): string => PROCESSES.map((name) => `${name} ${kills[name]}`).join(', ')

export function sumOf(all: readonly Totals[]): Totals {
  return all.reduce(
    (sum, one) => ({
      kills: {
        server: sum.kills.server + one.kills.server,
        database: sum.kills.database + one.kills.database,
        browser: sum.kills.browser + one.kills.browser,
      },
      acknowledged: sum.acknowledged + one.acknowledged,
      found: sum.found + one.found,
      lost: sum.lost + one.lost,
      duplicated: sum.duplicated + one.duplicated,
    }),
    none(),
  )
}

/**
 * Counts what was promised and what is there. An entry is acknowledged when its client was told that the server has
 * it; what a ledger holds at the end is given to `saw`, every entry as often as it stands there.
 */
export class Tally {
  private readonly kills: Record<ProcessName, number> = { server: 0, database: 0, browser: 0 }
  private readonly promised = new Set<string>()
  private readonly seen = new Map<string, number>()

  killed(name: ProcessName): void {
    this.kills[name] += 1
  }

  acknowledged(entryId: string): void {
    this.promised.add(entryId)
  }

  /** Ids of what stands in a ledger, once all is over; each ledger is given once. */
  saw(entryIds: readonly string[]): void {
    for (const id of entryIds) this.seen.set(id, (this.seen.get(id) ?? 0) + 1)
  }

  /** Which of the acknowledged entries are nowhere. */
  lost(): string[] {
    return [...this.promised].filter((id) => !this.seen.has(id))
  }

  /** Which entries stand in the ledgers more than once, acknowledged or not. */
  duplicated(): string[] {
    return [...this.seen].filter(([, times]) => times > 1).map(([id]) => id)
  }

  totals(): Totals {
    const lost = this.lost().length
    const duplicated = [...this.seen.values()].reduce((sum, times) => sum + times - 1, 0)
    return { kills: { ...this.kills }, acknowledged: this.promised.size, found: this.promised.size - lost, lost, duplicated }
  }

  /** `kills N · acknowledged N · found N · lost N · duplicated N` */
  line(): string {
    return lineOf(this.totals())
  }
}

/** Where parts that run as tests leave their totals, for the line at the end. */
export const TALLIES = '.artefacts/faults'

export function leaveTotals(part: string, totals: Totals): void {
  mkdirSync(TALLIES, { recursive: true })
  writeFileSync(path.join(TALLIES, `${part}.json`), JSON.stringify(totals))
}

/** What the parts of this run left, by part. */
export function readTotals(directory = TALLIES): Map<string, Totals> {
  const files = readdirSync(directory).filter((file) => file.endsWith('.json'))
  return new Map(
    files
      .sort()
      .map((file) => [file.replace(/\.json$/, ''), totalsSchema.parse(JSON.parse(readFileSync(path.join(directory, file), 'utf8')))]),
  )
}

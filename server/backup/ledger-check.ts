import { FIRST_PREV_HASH } from '#shared/ledger/chain'
import type { StoredEntry } from '#shared/ledger/chain'
import { checkLedger } from '#shared/ledger/check-ledger'
import type { PublicSealKey } from '#shared/ledger/check-ledger'
import type { Seal } from '#shared/ledger/seal'
import type { Row } from './rows'

export interface Head {
  id: string
  subject: string
  headSeq: number
  headHash: string
}

/** A row by the names of its columns. */
export type Named = (column: string) => string

export function namesOf(columns: readonly { name: string }[]): (row: Row) => Named {
  const places = new Map(columns.map(({ name }, index) => [name, index]))
  return (row) => (column) => row[places.get(column) ?? -1] ?? ''
}

export function headOf(row: Named): Head {
  return { id: row('id'), subject: row('subject'), headSeq: Number(row('head_seq')), headHash: row('head_hash') }
}

export function sealOf(row: Named): Seal {
  return {
    kid: row('kid'),
    ledgerId: row('ledger_id'),
    seq: Number(row('seq')),
    headHash: row('head_hash'),
    // A DATETIME(3) of UTC as MariaDB writes it: 2026-09-15 10:00:00.000.
    sealedAt: `${row('sealed_at').replace(' ', 'T')}Z`,
    signature: row('signature'),
  }
}

const besideTheText: [column: string, member: string][] = [
  ['id', 'id'],
  ['kind', 'kind'],
  ['author_id', 'authorId'],
  ['prev_hash', 'prevHash'],
]

/** The columns beside the hashed text must say what it says. */
function strayColumn(row: Named): string | undefined {
  try {
    const text = JSON.parse(row('canonical')) as Record<string, unknown>
    return besideTheText.find(([column, member]) => row(column) !== text[member])?.[0]
  } catch {
    // What cannot be read is found by the chain, with its number.
    return undefined
  }
}

/**
 * Checks ledgers while their entries stream by in order of (ledger, seq): each chain from its first entry to the
 * head that the ledger names, and each seal with the key it was made with.
 */
export class LedgerStreamCheck {
  private readonly heads: Map<string, Head>
  private readonly seals = new Map<string, Seal[]>()
  private readonly problems: string[] = []
  private ledgerId: string | undefined
  private entries: StoredEntry[] = []
  private stray: string | undefined
  private seen = 0

  constructor(
    heads: readonly Head[],
    seals: readonly Seal[],
    private readonly keys: readonly PublicSealKey[],
  ) {
    this.heads = new Map(heads.map((head) => [head.id, head]))
    for (const seal of seals) this.seals.set(seal.ledgerId, [...(this.seals.get(seal.ledgerId) ?? []), seal])
    for (const each of this.seals.values()) each.sort((a, b) => a.seq - b.seq)
  }

  take(row: Named): void {
    if (row('ledger_id') !== this.ledgerId) {
      this.closeLedger()
      this.ledgerId = row('ledger_id')
    }
    this.entries.push({ seq: Number(row('seq')), canonical: row('canonical'), hash: row('hash') })
    const column = this.stray === undefined ? strayColumn(row) : undefined
    if (column !== undefined) this.stray = `Entry ${row('seq')} is altered: its column ${column} says something else than its text.`
  }

  private closeLedger(): void {
    const { ledgerId, entries, stray } = this
    this.entries = []
    this.stray = undefined
    if (ledgerId === undefined) return
    const head = this.heads.get(ledgerId)
    this.heads.delete(ledgerId)
    if (head === undefined) {
      this.problems.push(`There are entries of a ledger ${ledgerId} that is not there itself.`)
      return
    }
    this.seen += 1
    const problem = this.ledgerProblem(head, entries) ?? stray
    if (problem !== undefined) this.problems.push(`Ledger ${ledgerId} (${head.subject}) is altered. ${problem}`)
  }

  private ledgerProblem(head: Head, entries: readonly StoredEntry[]): string | undefined {
    const check = checkLedger(head.id, entries, this.seals.get(head.id) ?? [], this.keys)
    this.seals.delete(head.id)
    if (check.verdict !== 'whole') return check.why
    if (check.entries !== head.headSeq) return `Entry ${check.entries + 1} is missing: it should end at entry ${head.headSeq}.`
    return check.headHash === head.headHash ? undefined : `Entry ${head.headSeq} is not the one that the ledger names as its head.`
  }

  /** After the last entry: what is wrong, a sentence each, and how many ledgers were looked at. */
  finish(): { problems: string[]; ledgers: number } {
    this.closeLedger()
    this.ledgerId = undefined
    for (const { id, subject, headSeq, headHash } of this.heads.values()) {
      if (headSeq === 0 && headHash === FIRST_PREV_HASH) this.seen += 1
      else this.problems.push(`Ledger ${id} (${subject}) is altered. Entry 1 is missing: it should end at entry ${headSeq}.`)
    }
    for (const ledgerId of this.seals.keys()) this.problems.push(`There is a seal of a ledger ${ledgerId} that has no entries.`)
    return { problems: this.problems, ledgers: this.seen }
  }
}

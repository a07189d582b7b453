import { entryText, sha256Hex } from '#shared/ledger/chain'
import type { EntryDraft, LedgerEntry, Override } from '#shared/ledger/envelope'
import { applyProofTest, emptyProofTest } from '#shared/proof-test/apply'
import { PROOF_TEST_VERSION, type Mark, type ProofTestDraft } from '#shared/proof-test/entries'
import type { ProofTestState } from '#shared/proof-test/state'

/** An id with the shape of UUID version 7, the same in every run: `group` tells kinds of things apart. */
export function testId(group: number, index: number): string {
  const tail = index.toString(16).padStart(12, '0')
  return `01994a00-${group.toString(16).padStart(4, '0')}-7000-8000-${tail}`
}

interface Author {
  by: string
  /** An ISO moment. */
  at: string
  overrides?: Override[]
  irregular?: string[]
}

/** Writes a proof test's ledger the way the server would: numbered, chained and folded entry by entry. */
export class LedgerBuilder {
  readonly entries: LedgerEntry[] = []
  state: ProofTestState
  private readonly deviceSeq = new Map<string, number>()
  private readonly bootedAt: number

  constructor(
    readonly ledgerId: string,
    bootedAt: string,
    /** Each person has a device of their own: its id is derived from theirs. */
    private readonly deviceOf: (personId: string) => { deviceId: string; bootId: string },
  ) {
    this.state = emptyProofTest(ledgerId)
    this.bootedAt = Date.parse(bootedAt)
  }

  /** The moment as the device of a person stamps it. */
  mark(by: string, at: string): Mark {
    return { at: new Date(at).toISOString(), bootId: this.deviceOf(by).bootId, monotonicMs: Date.parse(at) - this.bootedAt }
  }

  append(draft: ProofTestDraft, { by, at, overrides = [], irregular = [] }: Author): LedgerEntry {
    const { deviceId, bootId } = this.deviceOf(by)
    const deviceSeq = (this.deviceSeq.get(deviceId) ?? 0) + 1
    this.deviceSeq.set(deviceId, deviceSeq)
    const moment = new Date(at).toISOString()
    const made: EntryDraft = {
      id: testId(0xe, this.entries.length + 1),
      ledgerId: this.ledgerId,
      kind: draft.kind,
      v: PROOF_TEST_VERSION,
      payload: draft.payload,
      authorId: by,
      deviceId,
      deviceSeq,
      basedOnSeq: this.state.headSeq,
      observedAt: moment,
      bootId,
      monotonicMs: Date.parse(at) - this.bootedAt,
      attachments: [],
      overrides,
    }
    const chained = {
      seq: this.state.headSeq + 1,
      receivedAt: new Date(Date.parse(at) + 400).toISOString(),
      irregular,
      prevHash: this.state.headHash,
    }
    const entry: LedgerEntry = { ...made, ...chained, hash: sha256Hex(entryText(made, chained)) }
    this.entries.push(entry)
    this.state = applyProofTest(this.state, entry)
    return entry
  }
}

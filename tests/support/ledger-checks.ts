import { expect } from 'vitest'
import { checkChain, entryText } from '#shared/ledger/chain'
import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'

/** Each entry hashes to its hash, names the one before it and its own number; the last is the head that was told. */
export function expectWhole(entries: readonly LedgerEntry[], headHash: string): void {
  const stored = entries.map(({ hash, seq, receivedAt, irregular, prevHash, ...draft }) => ({
    seq,
    hash,
    canonical: entryText(draft, { seq, receivedAt, irregular, prevHash }),
  }))
  expect(checkChain(stored)).toEqual({ whole: true, entries: entries.length, headHash })
}

/** What each device made stands in the order it was made, from its first on, with nothing missing between. */
export function expectInOrder(entries: readonly LedgerEntry[], devices: readonly string[]): void {
  for (const deviceId of devices) {
    const numbers = entries.filter((entry) => entry.deviceId === deviceId).map((entry) => entry.deviceSeq)
    expect(numbers, `the order of device ${deviceId}`).toEqual(numbers.map((_number, index) => index + 1))
  }
}

/** Each of these stands there once, as its device made it. */
export function expectOnce(entries: readonly LedgerEntry[], made: readonly EntryDraft[]): void {
  const byId = new Map<string, LedgerEntry[]>()
  for (const entry of entries) byId.set(entry.id, [...(byId.get(entry.id) ?? []), entry])
  for (const draft of made) {
    const there = byId.get(draft.id) ?? []
    expect(there.length, `how often ${draft.kind} ${draft.id} stands there`).toBe(1)
    expect(there[0]).toMatchObject(draft)
  }
}

import { readdirSync, readFileSync } from 'node:fs'
import path from 'node:path'
import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { checkChain } from '#shared/ledger/chain'
import { ledgerEntrySchema } from '#shared/ledger/envelope'
import { foldProofTest } from '#shared/proof-test/apply'
import { upcast } from '#shared/proof-test/upcast'
import { PROOF_TEST_PAYLOADS, type ProofTestKind } from '#shared/proof-test/entries'
import { evaluateTest, freezeEvaluation } from '#shared/proof-test/evaluate'

/*
 * Ledgers as they were written, one of every version of the entries. They are never written anew: a change of
 * the program that no longer reads them is a change that loses records.
 */
const folder = 'fixtures/ledgers'
const fileSchema = z.object({
  ledgerId: z.string(),
  version: z.number(),
  entries: z.array(z.object({ seq: z.number(), canonical: z.string(), hash: z.string() })),
})

describe.each(readdirSync(folder))('the recorded ledger %s', (name) => {
  const { ledgerId, entries: stored } = fileSchema.parse(JSON.parse(readFileSync(path.join(folder, name), 'utf8')))
  const entries = stored.map(({ canonical, hash }) => ledgerEntrySchema.parse({ ...(JSON.parse(canonical) as object), hash }))
  const state = foldProofTest(ledgerId, entries)

  it('is whole as stored', () => {
    expect(checkChain(stored)).toMatchObject({ whole: true, entries: stored.length })
  })

  it('has entries that today’s schemas take once they are brought up to today’s version', () => {
    for (const entry of entries.map(upcast)) {
      expect(PROOF_TEST_PAYLOADS[entry.kind as ProofTestKind].safeParse(entry.payload).error, `entry ${entry.seq}`).toBeUndefined()
    }
  })

  it('folds to the end, with no kind unknown', () => {
    expect(state).toMatchObject({ unknownKinds: 0, entryCount: stored.length, headHash: stored.at(-1)?.hash })
    expect(state.countersigned).not.toBeNull()
  })

  it('still comes to the clearance and the verdicts that were frozen into it', () => {
    const frozen = state.conclusion?.evaluation ?? {}
    const today = freezeEvaluation(evaluateTest(state))
    expect(today['clearance']).toEqual(frozen['clearance'])
    const verdicts = (evaluation: Record<string, unknown>) =>
      (evaluation['criteria'] as { id: string; verdict: string }[]).map(({ id, verdict }) => [id, verdict])
    expect(verdicts(today)).toEqual(verdicts(frozen))
  })
})

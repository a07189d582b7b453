import { testRowSchema } from '#shared/api/proof-tests'
import type { TestList, TestRow } from '#shared/api/proof-tests'
import type { KeysetPage } from '../services/keyset'
import type { TestRecord } from '../services/proof-test-register'

/** Columns are plain text; parsing gives them back their types and lets nothing else out. */
export function presentProofTest(test: TestRecord): TestRow {
  const { ratedLoadText, ratedLoadUnit, openedAt, concludedAt, sealedAt, ...rest } = test
  return testRowSchema.parse({
    ...rest,
    ratedLoad: { text: ratedLoadText, unit: ratedLoadUnit },
    openedAt: openedAt.toISOString(),
    concludedAt: concludedAt?.toISOString() ?? null,
    sealedAt: sealedAt?.toISOString() ?? null,
  })
}

export function presentProofTestList({ rows, older, newer }: KeysetPage<TestRecord>): TestList {
  return { proofTests: rows.map(presentProofTest), older, newer }
}

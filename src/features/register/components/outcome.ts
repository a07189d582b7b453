import type { TestListQuery, TestRow } from '#shared/api/proof-tests'
import type { MarkName } from '../../../components/marks'
import { paths } from '../../../paths'

export interface Outcome {
  mark: MarkName
  word: string
  /** Said in red, with its word. */
  stopped?: boolean
}

const results: Record<NonNullable<TestRow['result']>, Outcome> = {
  accepted: { mark: 'within', word: 'Accepted' },
  rejected: { mark: 'stop', word: 'Rejected', stopped: true },
  abandoned: { mark: 'abandoned', word: 'Abandoned' },
}

const unfinished: Record<Exclude<TestRow['status'], 'signed'>, Outcome> = {
  'under way': { mark: 'under-way', word: 'Under way' },
  stopped: { mark: 'stop', word: 'Stopped', stopped: true },
  concluded: { mark: 'to-countersign', word: 'To sign' },
  'to countersign': { mark: 'to-countersign', word: 'To countersign' },
  declined: { mark: 'undecided', word: 'Declined' },
}

/** What came of a test, or what it waits for: a shape and a word. */
export function outcomeOf(test: TestRow): Outcome {
  if (test.status !== 'signed') return unfinished[test.status]
  return test.result === null ? { mark: 'to-come', word: 'Signed' } : results[test.result]
}

/** Whose signatures are on it. */
export function sealWord(test: TestRow): string {
  if (test.status === 'signed') return test.sealedAt === null ? 'signed' : 'sealed'
  return test.status === 'to countersign' || test.status === 'declined' ? 'lead only' : '—'
}

/** A test that goes on is opened where this person has a part in it; every other one at its record. */
export function whereOf(test: TestRow, userId: string): string {
  const goesOn = test.status === 'under way' || test.status === 'stopped'
  if (goesOn && test.leadId === userId) return paths.runProofTest.href(test.id)
  if (goesOn && test.witnessId === userId) return paths.attendProofTest.href(test.id)
  return paths.proofTest.href(test.id)
}

/** What the list can be narrowed to, under the one heading "Result": a result or what a test waits for. */
export const outcomeChoices = [
  { value: 'accepted', label: 'Accepted' },
  { value: 'rejected', label: 'Rejected' },
  { value: 'abandoned', label: 'Abandoned' },
  { value: 'under way', label: 'Under way' },
  { value: 'stopped', label: 'Stopped' },
  { value: 'to countersign', label: 'To countersign' },
] as const

export function outcomeAsked(value: string): Pick<TestListQuery, 'result' | 'status'> {
  const chosen = outcomeChoices.find((choice) => choice.value === value)?.value
  switch (chosen) {
    case undefined:
      return {}
    case 'accepted':
    case 'rejected':
    case 'abandoned':
      return { result: chosen }
    default:
      return { status: chosen }
  }
}

import { expect, it } from 'vitest'
import type { EntryDraft } from '#shared/ledger/envelope'
import { recordedTest } from '../../../tests/factories/recorded-test'
import { outboxWords } from './outbox-words'

const row = recordedTest().entries.find(({ kind }) => kind === 'row-read') as EntryDraft
const stop: EntryDraft = { ...row, kind: 'stopped', payload: { cause: 'called', why: 'Called' } }

const says = (pending: readonly EntryDraft[], device: 'tablet' | 'phone' = 'tablet', fault: string | null = null) =>
  outboxWords(
    {
      box: { loaded: true, pending, attention: [], sender: { is: 'waiting' }, fault, backSince: null },
      counts: { tablet: pending.length, server: 9, sealed: false },
    },
    device,
  )

it('what waits is counted, and said to be sent by itself', () => {
  expect(says([])).toBe('What is entered now waits on this tablet and is sent when there is a link.')
  expect(says([row])).toBe('One entry waits on this tablet, sent when there is a link.')
  expect(says([row, row], 'phone')).toBe('2 entries wait on this phone, sent when there is a link.')
})

it('a stop that reached nobody else is to be said aloud', () => {
  expect(says([row, stop])).toBe(
    'The stop has reached no other device: say it aloud. 2 entries wait on this tablet, sent when there is a link.',
  )
  expect(says([{ ...row, kind: 'decided', payload: { decision: 'stop' } }])).toMatch(/^The stop has reached no other device/)
})

it('a stop that no storage holds stands on the page alone', () => {
  expect(says([stop], 'phone', 'The storage fails.')).toMatch(/It stands on this page only: leave it open\. Say it aloud\.$/)
})

// @vitest-environment jsdom
import { afterEach, describe, expect, it } from 'vitest'
import type { AppendRequest, AppendResponse } from '#shared/api/ledger'
import type { EntryDraft } from '#shared/ledger/envelope'
import { makeEntry, type EntryParts } from './entry'
import { Disconnected, ProblemError } from './problem'
import { sendOnce } from './send-once'

const parts = (note: string, ledger = 1): EntryParts => ({
  ledgerId: `01990000-0000-7000-8000-${String(ledger).padStart(12, '0')}`,
  kind: 'withdrawn',
  payload: { why: note },
  authorId: '01990000-0000-7000-8000-00000000000a',
  basedOnSeq: 3,
})

function keeping(entries: readonly EntryDraft[], refused = false): AppendResponse {
  const results = entries.map((entry): AppendResponse['results'][number] =>
    refused
      ? { outcome: 'refused', id: entry.id, problem: { type: 'about:blank', title: '', status: 409, code: 'refused', detail: 'Not now.' } }
      : {
          outcome: 'kept',
          id: entry.id,
          entry: { ...entry, seq: 4, receivedAt: entry.observedAt, irregular: [], prevHash: '0'.repeat(64), hash: '1'.repeat(64) },
        },
  )
  return { results, headSeq: 4, headHash: '1'.repeat(64), resendFrom: null }
}

/** A server that loses its first answers. */
function server(lost: number, refused = false) {
  const got: EntryDraft[][] = []
  const post = (request: AppendRequest): Promise<AppendResponse> => {
    got.push(request.entries)
    return got.length <= lost ? Promise.reject(new Disconnected()) : Promise.resolve(keeping(request.entries, refused))
  }
  return { got, post }
}

describe('what a form sends', () => {
  afterEach(() => localStorage.clear())

  it('is the same entry when it is sent again because no answer came', async () => {
    const { got, post } = server(1)
    await expect(sendOnce('withdraw', [parts('Hose changed')], post)).rejects.toBeInstanceOf(Disconnected)
    await sendOnce('withdraw', [parts('Hose changed')], post)
    expect(got[1]).toEqual(got[0])
  })

  it('is another entry when something else is said', async () => {
    const { got, post } = server(1)
    await expect(sendOnce('withdraw', [parts('Hose changed')], post)).rejects.toBeInstanceOf(Disconnected)
    await sendOnce('withdraw', [parts('Pin bent')], post)
    expect(got[1]?.[0]?.id).not.toBe(got[0]?.[0]?.id)
  })

  it('is sent once however often it is tapped before the answer is there', async () => {
    const { got, post } = server(0)
    await Promise.all([sendOnce('withdraw', [parts('Hose changed')], post), sendOnce('withdraw', [parts('Hose changed')], post)])
    expect(got).toHaveLength(1)
  })

  it('is another entry once the first was answered', async () => {
    const { got, post } = server(0)
    await sendOnce('withdraw', [parts('Hose changed')], post)
    await sendOnce('withdraw', [parts('Hose changed')], post)
    expect(got[1]?.[0]?.id).not.toBe(got[0]?.[0]?.id)
  })

  it('throws the refusal, and the refused number goes to the next entry', async () => {
    const { got, post } = server(0, true)
    await expect(sendOnce('withdraw', [parts('Hose changed', 2)], post)).rejects.toBeInstanceOf(ProblemError)
    expect(makeEntry(parts('Pin bent', 2)).deviceSeq).toBe(got[0]?.[0]?.deviceSeq)
  })
})

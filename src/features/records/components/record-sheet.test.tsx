import { QueryClientProvider } from '@tanstack/react-query'
import { render, screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { MemoryRouter } from 'react-router-dom'
import { afterEach, describe, expect, test, vi } from 'vitest'
import type { EntriesResponse } from '#shared/api/ledger'
import { kidOf } from '#shared/ledger/check-ledger'
import { can } from '#shared/policy'
import { countersignedLater, recordedTest, stoppedTest, twoLegTest, type RecordedTest } from '../../../../tests/factories/recorded-test'
import { PUBLIC_KEY, sealsOf } from '../../../../tests/factories/ledger-file'
import { ids } from '../../../../tests/factories/test-press'
import { createQueryClient } from '../../../lib/query-client'
import { useRecord } from '../api/get-ledger'
import { readRecord } from '../record-view'
import { isShutToWitness, partOf, signTurn } from '../sign-turn'
import { RecordSheet } from './record-sheet'
import { ShutRecord } from './shut-record'

function answerOf(recorded: RecordedTest): EntriesResponse {
  const last = recorded.entries.at(-1)
  return {
    ledgerId: recorded.id,
    entries: recorded.entries,
    headSeq: last?.seq ?? 0,
    headHash: last?.hash ?? '',
    people: recorded.people,
    sealed: [],
  }
}

/** The same ledger with its first joint examined twelve minutes before the server received it. */
function receivedLater(recorded: RecordedTest): RecordedTest {
  const entries = recorded.entries.map((entry) =>
    entry.kind === 'joint-examined' && entry === recorded.entries.find(({ kind }) => kind === 'joint-examined')
      ? { ...entry, receivedAt: new Date(Date.parse(entry.observedAt) + 12 * 60_000).toISOString() }
      : entry,
  )
  return { ...recorded, entries }
}

type Reader = { userId: string; role: 'lead' | 'witness' | 'crew' }
const lead: Reader = { userId: ids.lead, role: 'lead' }
const witness: Reader = { userId: ids.witness, role: 'witness' }
const crew: Reader = { userId: ids.pumpHand, role: 'crew' }

function Shown({ id, reader }: { id: string; reader: Reader }) {
  const { record } = useRecord(id)
  if (!record) return null
  const turn = signTurn(record, (action, subject) => can({ ...reader, shopId: ids.shop }, action, subject))
  if (isShutToWitness(record, reader.userId)) return <ShutRecord record={record} />
  const part = partOf(record, reader.userId)
  return <RecordSheet record={record} turn={turn} mayExport={reader.role !== 'crew'} part={part} today={new Date('2026-09-21T08:00:00Z')} />
}

/** A server that has one ledger until something is posted, then another; posts are kept and answered by `onPost`. */
function serve(
  before: EntriesResponse,
  after: EntriesResponse = before,
  onPost: () => Response = () => new Response('{}', { status: 500 }),
  keys?: { kid: string; publicKey: string; since: string; retiredOn: string | null }[],
) {
  const posted: Record<string, unknown>[] = []
  vi.stubGlobal('fetch', async (url: string, init: RequestInit) => {
    if (url.includes('/verification/')) return keys === undefined ? new Response('{}', { status: 503 }) : Response.json({ keys })
    if (init.method === 'POST') {
      posted.push(JSON.parse(String(init.body)) as Record<string, unknown>)
      return onPost()
    }
    const answer = posted.length === 0 ? before : after
    return new Response(JSON.stringify(answer), { status: 200, headers: { 'content-type': 'application/json' } })
  })
  return posted
}

const SERVED = { kid: kidOf(PUBLIC_KEY), publicKey: PUBLIC_KEY, since: '2026-09-01T00:00:00.000Z', retiredOn: null }

async function show(recorded: RecordedTest, reader: Reader = lead, more: Partial<EntriesResponse> = {}) {
  serve({ ...answerOf(recorded), ...more }, undefined, undefined, more.sealed && [SERVED])
  const client = createQueryClient(() => undefined)
  render(
    <QueryClientProvider client={client}>
      <MemoryRouter>
        <Shown id={recorded.id} reader={reader} />
      </MemoryRouter>
    </QueryClientProvider>,
  )
  return screen.findByRole('heading', { level: 1 })
}

const problem = (status: number, code: string, detail: string, fields?: object) => () =>
  new Response(JSON.stringify({ type: 'about:blank', title: 'Refused', status, code, detail, ...(fields ? { fields } : {}) }), { status })

afterEach(() => vi.unstubAllGlobals())

describe('the record of a countersigned test', () => {
  test('says what was cleared, until when, by whom, and after what', async () => {
    expect(await show(recordedTest())).toHaveTextContent('PT-0043 Press 2, straightening press')
    const result = screen.getByRole('region', { name: 'Result' })
    expect(result).toHaveTextContent('Accepted. Cleared up to 11.7 short tons')
    expect(result).toHaveTextContent(
      '104.0 kN, rated 12 short tons. Gauge G-02 not past 7 650 psi. Bed hole 4, ram central. Until 15 March 2027.',
    )
    expect(result).toHaveTextContent('Cleared by Marit Sandoval on 15 September 2026 after two static loads. No other bed hole was tested.')
  })

  test('never says that a press is safe or approved', async () => {
    await show(recordedTest())
    expect(document.body).not.toHaveTextContent(/\bsafe\b|\byes\b|\bapproved\b/i)
    expect(document.body).toHaveTextContent('These figures are an aid, not a design approval.')
    expect(document.body).toHaveTextContent('Head beam, left upright and right upright not measured')
  })

  test('strikes a corrected reading through and keeps it, with its letter', async () => {
    await show(recordedTest())
    const row = screen.getAllByRole('row').find((candidate) => within(candidate).queryByRole('rowheader', { name: /^50/ }))
    expect(row?.querySelector('del')).toHaveTextContent('0.91')
    expect(row).toHaveTextContent('0.91 0.19correction a')
    expect(screen.getByRole('heading', { name: 'Two corrections, both kept' })).toBeInTheDocument()
    expect(document.body).toHaveTextContent('G-02, hold end, 75 %: 5 580 5 850 psi')
    expect(document.body).toHaveTextContent('Digits swapped when typed. Witness saw 5850.')
  })

  test('shows every force with its uncertainty, and number, limit and verdict of each criterion', async () => {
    await show(recordedTest())
    expect(document.body).toHaveTextContent('106.3 ± 0.7')
    expect(screen.getByRole('heading', { name: 'Within every limit checked' })).toBeInTheDocument()
    const set = screen.getByRole('row', { name: /Permanent set/ })
    expect(within(set).getByRole('img', { name: 'within' })).toBeInTheDocument()
    expect(set).toHaveTextContent('0.02 mm')
    expect(set).toHaveTextContent('≤ 0.09 mm')
  })

  test('prints each signature with name, time, meaning and how it was given', async () => {
    await show(recordedTest())
    const signatures = screen.getByRole('region', { name: 'Signatures' })
    expect(signatures).toHaveTextContent(/Marit Sandoval.*signed with password.*I ran this test and these are its readings\./)
    expect(signatures).toHaveTextContent(/Tomas Achterberg.*signed with password.*I was present and read the gauge myself\./)
    expect(signatures).toHaveTextContent(/Chain whole over \d+ entries, checked 21 Sep 2026/)
  })

  test('prints how the witness stands to the shop, and how late a countersignature came', async () => {
    await show(recordedTest())
    expect(screen.getByRole('region', { name: 'Signatures' })).toHaveTextContent('works next door, no part in the build')
    expect(screen.getByRole('region', { name: 'Signatures' })).not.toHaveTextContent('hours after the lead')
    document.body.replaceChildren()
    await show(countersignedLater(recordedTest(), 26))
    expect(screen.getByRole('region', { name: 'Signatures' })).toHaveTextContent('26 hours after the lead')
  })

  test('lists every entry by both clocks, and says how far apart they are where it is more than five minutes', async () => {
    const recorded = receivedLater(recordedTest())
    await show(recorded)
    await userEvent.click(screen.getByText(`Every entry, ${recorded.entries.length} in all, by both clocks`))
    const rows = within(screen.getByRole('table', { name: 'Every entry by both clocks' }))
      .getAllByRole('row')
      .slice(1)
    expect(rows).toHaveLength(recorded.entries.length)
    expect(rows.filter((row) => row.textContent.includes('12 min later'))).toHaveLength(1)
    expect(rows.filter((row) => /later/.test(row.textContent))).toHaveLength(1)
  })

  test('gives the spreadsheet to those who may export it only', async () => {
    await show(recordedTest())
    expect(screen.getByRole('link', { name: 'Download spreadsheet' })).toHaveAttribute('href', `/api/proof-tests/${ids.test}/record.xlsx`)
    expect(screen.getByRole('link', { name: 'Download PDF, A4' })).toHaveAttribute(
      'href',
      `/api/proof-tests/${ids.test}/record.pdf?paper=a4`,
    )
    expect(screen.getByRole('link', { name: 'Download PDF, Letter' })).toHaveAttribute(
      'href',
      `/api/proof-tests/${ids.test}/record.pdf?paper=letter`,
    )
    document.body.replaceChildren()
    await show(recordedTest(), crew)
    expect(screen.queryByRole('link', { name: 'Download spreadsheet' })).toBeNull()
  })
})

describe('a record that needs a second look', () => {
  test('of a stopped test says where it stopped and why, and clears nothing', async () => {
    await show(stoppedTest())
    const result = screen.getByRole('region', { name: 'Result' })
    expect(result).toHaveTextContent('Rejected. Stopped at 75 %')
    expect(result).toHaveTextContent('This test clears the press to no load.')
    expect(screen.getByRole('heading', { name: 'Beyond two limits' })).toBeInTheDocument()
    expect(screen.getByRole('heading', { name: 'Against “accepted”' })).toBeInTheDocument()
  })

  test('says when today’s arithmetic differs from the frozen evaluation', async () => {
    const recorded = recordedTest()
    const entries = recorded.entries.map((entry) => {
      if (entry.kind !== 'concluded') return entry
      const evaluation = structuredClone(entry.payload['evaluation']) as { criteria: { id: string; reading: string }[] }
      for (const criterion of evaluation.criteria) if (criterion.id === 'set') criterion.reading = '0.04 mm'
      return { ...entry, payload: { ...entry.payload, evaluation } }
    })
    await show({ ...recorded, entries })
    expect(screen.getByRole('heading', { name: 'Today’s arithmetic differs from what was frozen at the conclusion' })).toBeInTheDocument()
    expect(document.body).toHaveTextContent('Permanent set: frozen 0.04 mm, within; today 0.02 mm, within.')
    // The altered text no longer has the hash that was stored.
    expect(screen.getByRole('heading', { name: /This record was altered at entry \d+/ })).toBeInTheDocument()
  })

  test('checks the seals with the server’s keys, and says who sealed it', async () => {
    const recorded = recordedTest()
    await show(recorded, lead, { sealed: sealsOf(recorded) })
    const signatures = screen.getByRole('region', { name: 'Signatures' })
    await waitFor(() => expect(signatures).toHaveTextContent(/Whole: \d+ entries, sealed by Marit Sandoval and .+; checked 21 Sep 2026/))
    expect(screen.queryByRole('alert')).toBeNull()
    expect(screen.getByRole('link', { name: 'Download ledger file' })).toHaveAttribute('href', `/api/proof-tests/${ids.test}/ledger.json`)
  })

  test('that another key sealed, or whose seal is gone, is not as it was sealed', async () => {
    const recorded = recordedTest()
    await show(recorded, lead, { sealed: sealsOf(recorded, 'a7'.repeat(32)) })
    expect(await screen.findByRole('heading', { name: 'This record is not as it was sealed' })).toBeInTheDocument()
    document.body.replaceChildren()
    await show(recorded, lead, { sealed: sealsOf(recorded).slice(1) })
    const signed = recorded.entries.find(({ kind }) => kind === 'signed')?.seq
    expect(await screen.findByRole('heading', { name: `This record was altered at entry ${signed}` })).toBeInTheDocument()
  })

  test('says on red what the server found, prints no spreadsheet, and hands out the evidence', async () => {
    await show(recordedTest(), lead, { broken: { at: 12, why: 'Entry 12 does not match its hash.' } })
    expect(screen.getByRole('alert')).toHaveTextContent('This record was altered at entry 12')
    const result = screen.getByRole('region', { name: 'Result' })
    expect(within(result).getByText(/^Accepted/).tagName).toBe('DEL')
    expect(result).toHaveTextContent('don’t load the press by it')
    expect(result).not.toHaveTextContent('Cleared by')
    expect(document.body).not.toHaveTextContent('Within every limit checked')
    expect(screen.queryByRole('link', { name: 'Download spreadsheet' })).toBeNull()
    expect(screen.getByRole('link', { name: 'Download ledger file' })).toBeInTheDocument()
  })

  test('says nothing of arithmetic when nothing differs', () => {
    expect(readRecord(answerOf(recordedTest())).differences).toEqual([])
    expect(readRecord(answerOf(twoLegTest())).differences).toEqual([])
  })

  test('lists what was observed and what is irregular', async () => {
    const recorded = recordedTest({ observed: 'A click at the left pin.' })
    const entries = recorded.entries.map((entry) => (entry.kind === 'observed' ? { ...entry, irregular: ['R12'] } : entry))
    await show({ ...recorded, entries })
    expect(document.body).toHaveTextContent('A click at the left pin.')
    expect(document.body).toHaveTextContent('observed: against R12. It happened, so it stands.')
  })
})

describe('the record of a test under way', () => {
  test('is shut to its witness, who reads the gauge without the lead’s figures', async () => {
    await show(recordedTest({ until: 'decided' }), witness)
    expect(screen.getByRole('link', { name: 'Attend the test' })).toHaveAttribute('href', `/proof-tests/${ids.test}/attend`)
    expect(document.body).not.toHaveTextContent(/\d psi|short ton|kN/)
    expect(screen.queryByRole('link', { name: 'Download spreadsheet' })).toBeNull()
  })

  test('is open to the lead, with the way back to the run', async () => {
    await show(recordedTest({ until: 'decided' }))
    expect(screen.getByRole('region', { name: 'Result' })).toHaveTextContent('Under way. Nothing is concluded')
    expect(screen.getByRole('link', { name: 'Open the run' })).toHaveAttribute('href', `/proof-tests/${ids.test}/run`)
  })
})

describe('signing', () => {
  async function open(recorded: RecordedTest, reader: Reader, onPost: () => Response, later: RecordedTest = recorded) {
    const posted = serve(answerOf(recorded), answerOf(later), onPost)
    render(
      <QueryClientProvider client={createQueryClient(() => undefined)}>
        <MemoryRouter>
          <Shown id={recorded.id} reader={reader} />
        </MemoryRouter>
      </QueryClientProvider>,
    )
    await screen.findByRole('heading', { level: 1 })
    return posted
  }
  const kept = (recorded: RecordedTest) => () => new Response(JSON.stringify({ entry: recorded.entries.at(-1) }), { status: 201 })

  test('the lead signs what is shown, with the password again; then the witness is waited for', async () => {
    const concluded = recordedTest({ until: 'concluded' })
    const posted = await open(concluded, lead, kept(recordedTest({ until: 'signed' })), recordedTest({ until: 'signed' }))
    const form = screen.getByRole('form', { name: 'Sign' })
    await userEvent.click(within(form).getByRole('button', { name: 'Sign as lead' }))
    expect(await within(form).findByText('Enter your password.')).toBeInTheDocument()
    expect(posted).toEqual([])
    await userEvent.type(within(form).getByLabelText('Your password'), 'three short tons')
    await userEvent.click(within(form).getByRole('button', { name: 'Sign as lead' }))
    expect(await screen.findByText(/^Waits for Tomas Achterberg, who was there, to countersign\.$/)).toBeInTheDocument()
    expect(posted).toMatchObject([
      {
        as: 'lead',
        password: 'three short tons',
        headHash: concluded.state.headHash,
        meaning: 'I ran this test and these are its readings.',
      },
    ])
  })

  test('a record that has grown meanwhile is shown anew, and says so', async () => {
    const signed = recordedTest({ until: 'concluded', observed: 'Late note of the lead.' })
    await open(
      recordedTest({ until: 'concluded' }),
      lead,
      problem(409, 'stale-head', 'Something was added to this record since you read it.'),
      signed,
    )
    await userEvent.type(screen.getByLabelText('Your password'), 'three short tons')
    await userEvent.click(screen.getByRole('button', { name: 'Sign as lead' }))
    expect(await screen.findByRole('alert')).toHaveTextContent(
      'Something was entered since you read this record. It is shown above now: read it again, then sign.',
    )
    await waitFor(() => expect(document.body).toHaveTextContent('Late note of the lead.'))
    expect(screen.getByLabelText('Your password')).toHaveValue('three short tons')
  })

  test('a wrong password is said at its field', async () => {
    const refuse = problem(422, 'invalid', 'Some fields need another look.', { password: 'That is not your password. Nothing was signed.' })
    await open(recordedTest({ until: 'concluded' }), lead, refuse)
    await userEvent.type(screen.getByLabelText('Your password'), 'wrong')
    await userEvent.click(screen.getByRole('button', { name: 'Sign as lead' }))
    expect(await screen.findByText('That is not your password. Nothing was signed.')).toBeInTheDocument()
  })

  test('the witness countersigns', async () => {
    const signed = recordedTest({ until: 'signed' })
    const posted = await open(signed, witness, kept(recordedTest()), recordedTest())
    const form = screen.getByRole('form', { name: 'Countersign' })
    await userEvent.type(within(form).getByLabelText('Your password'), 'next door')
    await userEvent.click(within(form).getByRole('button', { name: 'Countersign' }))
    await waitFor(() => expect(screen.getByRole('region', { name: 'Result' })).toHaveTextContent('Accepted.'))
    expect(posted).toMatchObject([{ as: 'witness', headHash: signed.state.headHash, meaning: 'I was present and read the gauge myself.' }])
    expect(screen.queryByRole('form')).toBeNull()
  })

  test('or declines, with a reason', async () => {
    const signed = recordedTest({ until: 'signed' })
    const posted = await open(signed, witness, kept(signed))
    const form = screen.getByRole('form', { name: 'Decline' })
    await userEvent.type(within(form).getByLabelText('Your password'), 'next door')
    await userEvent.click(within(form).getByRole('button', { name: 'Decline with this reason' }))
    expect(await within(form).findByText('Say why in a few words.')).toBeInTheDocument()
    await userEvent.type(within(form).getByLabelText('Why you decline'), 'I was not at the gauge at 75 %.')
    await userEvent.click(within(form).getByRole('button', { name: 'Decline with this reason' }))
    await waitFor(() => expect(posted).toMatchObject([{ as: 'decline', why: 'I was not at the gauge at 75 %.' }]))
  })

  test('nobody else is offered anything: the page says who is waited for', async () => {
    await open(recordedTest({ until: 'signed' }), lead, problem(500, 'x', 'x'))
    expect(screen.queryByRole('form')).toBeNull()
    expect(screen.getByRole('status')).toHaveTextContent('Waits for Tomas Achterberg, who was there, to countersign.')
    document.body.replaceChildren()
    await open(recordedTest({ until: 'concluded' }), witness, problem(500, 'x', 'x'))
    expect(screen.getByRole('status')).toHaveTextContent('Waits for Marit Sandoval, who ran the test, to sign.')
  })
})

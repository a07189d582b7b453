import 'fake-indexeddb/auto'
import { render, screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { MemoryRouter } from 'react-router-dom'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import { HereContext, type Here } from '../../lib/here'
import { outbox } from '../../lib/outbox'
import { strandedFile } from '../../lib/stranded-file'
import { DevicePage } from './device-page'

const test = '01990000-0000-7000-8000-000000000001'
const me = { id: '01990000-0000-7000-8000-000000000003', name: 'Rosa Lindqvist', email: 'rosa@example.test' }
const other = '01990000-0000-7000-8000-000000000004'
const shop = { id: '01990000-0000-7000-8000-000000000005', name: 'A shop', role: 'lead' as const }
const here = { user: me, shops: [shop], shop, adopt: () => undefined } as unknown as Here

const leave = vi.fn()
const open = (leaving = false) =>
  render(
    <HereContext value={here}>
      <MemoryRouter>
        <DevicePage leaving={leaving} onSignOut={leave} signOutFailed={false} />
      </MemoryRouter>
    </HereContext>,
  )
const note = (text: string, authorId = me.id) => ({
  ledgerId: test,
  kind: 'observed',
  payload: { at: null, what: 'noise', note: text },
  authorId,
  basedOnSeq: 1,
})

describe('the screen of what this device holds', () => {
  beforeEach(() => {
    leave.mockClear()
    vi.stubGlobal('fetch', () => Promise.reject(new TypeError('no network')))
  })

  it('lists what waits with shape and word, apart for each person, and offers the file', async () => {
    await outbox.enqueue(test, note('A click at the left pin.'))
    await outbox.enqueue(test, note('Seen by the witness.', other))
    open()
    const mine = (await screen.findByRole('heading', { name: 'Yours, not sent yet' })).closest('section')
    if (!mine) throw new Error('It stands in a section.')
    expect(within(mine).getByText('A click at the left pin.')).toBeVisible()
    expect(within(mine).getByText('on this tablet')).toBeVisible()
    expect(within(mine).queryByText('Seen by the witness.')).toBeNull()
    expect(screen.getByText('2 entries are on this tablet only')).toBeVisible()
    expect(screen.getByRole('button', { name: 'Save the one entry to a file' })).toBeEnabled()
  })

  it('refuses another person’s file and says whose it is; takes its own in once', async () => {
    open()
    const chooser = await screen.findByLabelText('File of entries')
    const { waiting } = await outbox.contents()
    const theirs = waiting.filter(({ entry }) => entry.authorId === other)
    const file = (text: string) => new File([text], 'entries.json', { type: 'application/json' })
    await userEvent.upload(chooser, file(strandedFile({ author: { id: other, name: 'Gil Farrow' }, entries: theirs, savedAt: new Date() })))
    expect(await screen.findByText(/made by Gil Farrow, and you are signed in as Rosa Lindqvist/)).toBeVisible()
    const mine = waiting.filter(({ entry }) => entry.authorId === me.id)
    const text = strandedFile({ author: me, entries: mine, savedAt: new Date() })
    await userEvent.upload(chooser, file(text))
    expect(await screen.findByText(/had all of them already. Nothing is entered twice/)).toBeVisible()
    await userEvent.upload(chooser, file(text.replace('click', 'crack')))
    expect(await screen.findByText(/damaged or changed on the way/)).toBeVisible()
  })

  it('says on leaving how many stay, and leaves them', async () => {
    open(true)
    expect(await screen.findByRole('heading', { name: 'One of your entries is on this tablet only' })).toBeVisible()
    await userEvent.click(screen.getByRole('button', { name: 'Sign out, and keep it here' }))
    expect(leave).toHaveBeenCalledOnce()
    await waitFor(async () => expect((await outbox.contents()).waiting).toHaveLength(2))
  })
})

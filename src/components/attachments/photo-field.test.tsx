import 'fake-indexeddb/auto'
import { render, screen, waitFor } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { useState } from 'react'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import type { Attachment } from '#shared/ledger/envelope'
import { files } from '../../lib/attachments'
import { PhotoField } from './photo-field'

const owner = 'ledger:01990000-0000-7000-8000-0000000000aa'

function Field({ most }: { most?: number }) {
  const [chosen, setChosen] = useState<Attachment[]>([])
  return <PhotoField label="Photos" owner={owner} chosen={chosen} onChange={setChosen} most={most} />
}

const pdf = (name: string) => new File([`%PDF-1.7 ${name}`], name)
const choose = () => screen.getByLabelText<HTMLInputElement>('Photos: choose a file')
const chosen = () => screen.queryAllByRole('button', { name: /^Leave out/ }).map((button) => button.getAttribute('aria-label'))

beforeEach(() => {
  vi.stubGlobal('fetch', () => Promise.reject(new TypeError('no network here')))
})
afterEach(() => vi.unstubAllGlobals())

describe('the field of photos', () => {
  it('keeps what was chosen on this device, and lets it be left out again', async () => {
    render(<Field />)
    await userEvent.upload(choose(), [pdf('drawing.pdf'), pdf('sheet 2.pdf')], { applyAccept: false })
    await waitFor(() => expect(chosen()).toEqual(['Leave out Document drawing.pdf', 'Leave out Document sheet 2.pdf']), { timeout: 4_000 })
    expect(
      files
        .of(owner)
        .files.map(({ attachment }) => attachment.name)
        .sort(),
    ).toEqual(['drawing.pdf', 'sheet 2.pdf'])
    await userEvent.click(screen.getByRole('button', { name: 'Leave out Document drawing.pdf' }))
    expect(chosen()).toEqual(['Leave out Document sheet 2.pdf'])
    await waitFor(() => expect(files.of(owner).files.map(({ attachment }) => attachment.name)).toEqual(['sheet 2.pdf']))
  })

  it('says at the field what a file is not, whatever its name, and takes the others', async () => {
    render(<Field />)
    await userEvent.upload(choose(), [new File(['only words'], 'weld.jpg'), pdf('a.pdf')], { applyAccept: false })
    expect(await screen.findByText(/^weld\.jpg: This file is no photo and no PDF, whatever its name says\./)).toBeVisible()
    expect(chosen()).toEqual(['Leave out Document a.pdf'])
  })

  it('takes the same file once, and no more than go with one entry', async () => {
    render(<Field most={2} />)
    await userEvent.upload(choose(), [pdf('a.pdf'), pdf('a.pdf')], { applyAccept: false })
    await waitFor(() => expect(chosen()).toEqual(['Leave out Document a.pdf']))
    await userEvent.upload(choose(), [pdf('b.pdf'), pdf('c.pdf')], { applyAccept: false })
    expect(await screen.findByText('At most 2 go with one entry; one file left out.')).toBeVisible()
    expect(chosen()).toHaveLength(2)
    expect(screen.queryByLabelText('Photos: choose a file')).toBeNull()
  })

  it('takes nothing that can’t be kept, and says that the entry goes without it', async () => {
    vi.spyOn(files, 'keep').mockRejectedValueOnce(new Error('This device can’t keep the file: its storage is full. Enter it without.'))
    render(<Field />)
    await userEvent.upload(choose(), [pdf('a.pdf')], { applyAccept: false })
    expect(await screen.findByText(/its storage is full\. Enter it without/)).toBeVisible()
    expect(chosen()).toEqual([])
  })
})

import path from 'node:path'
import { expect } from 'vitest'
import type { Attachment } from '#shared/ledger/envelope'
import { testServer } from '../support/api-server'
import { post, type ApiRun, type Device } from './api-run'
import type { FileToSend } from './files'
import type { SignedInPerson } from './people'

export const observed = { kind: 'observed', payload: { at: null, what: 'other', note: 'See the photo.' } } as const

/** An observation of the test that names files, entered by one of its people. */
export async function nameFiles(run: ApiRun, files: readonly { attachment: Attachment }[], device: Device = run.lead): Promise<void> {
  const draft = { ...device.draft(observed), attachments: files.map(({ attachment }) => attachment) }
  const { results } = await post(device.person, run.path, [draft])
  expect(results[0]?.outcome).toBe('kept')
  await run.refresh()
}

export const fileAddress = (by: string, { attachment }: { attachment: Attachment }, more = '') =>
  `/api/attachments/${attachment.sha256}?${by}${more}`
export const ledger = (id: string) => `ledger=${id}`

export const putFile = (person: SignedInPerson, by: string, file: FileToSend, type: string = file.attachment.type) =>
  person.client.put(fileAddress(by, file)).set('Content-Type', type).send(file.bytes)

/** Where the test server's folder has a file of a shop. */
export const fileOnDisk = (shopId: string, { attachment }: FileToSend): string =>
  path.join(testServer().context.config.dataDirectory, 'attachments', shopId, attachment.sha256)

import { readFile } from 'node:fs/promises'
import type { Page } from 'playwright-core'
import { beforeAll, describe, expect, it } from 'vitest'
import { ledgerFileSchema } from '#shared/ledger/ledger-file'
import { ApiRun } from '../factories/api-run'
import { aimClientsAt } from '../factories/client'
import { ledgerFileBytes } from '../factories/ledger-file'
import { newPage, serverAddress } from '../support/browser'
import { signIn } from '../support/run-screen'

async function sealedRun(): Promise<ApiRun> {
  const run = await ApiRun.open()
  await run.driveTo('sign')
  await run.sign('lead').expect(201)
  await run.refresh()
  await run.sign('witness').expect(201)
  await run.refresh()
  return run
}

/** The file as the link on the record's page saves it. */
async function downloadedFrom(run: ApiRun): Promise<{ name: string; bytes: Buffer }> {
  const page = await newPage()
  await signIn(page, run.staff.owner)
  await page.goto(`/proof-tests/${run.id}`)
  const link = page.getByRole('link', { name: 'Download ledger file' }).first()
  const [download] = await Promise.all([page.waitForEvent('download'), link.click()])
  return { name: download.suggestedFilename(), bytes: await readFile(await download.path()) }
}

/** The file with one bit of one byte changed, in the middle of what entry `seq` says. */
function flippedIn(bytes: Buffer, seq: number): Buffer {
  const entry = ledgerFileSchema.parse(JSON.parse(bytes.toString('utf8'))).entries[seq - 1]
  if (!entry) throw new Error(`The file has no entry ${seq}.`)
  const end = bytes.indexOf(`","hash":"${entry.hash}"`)
  const at = bytes.lastIndexOf('payload', end)
  if (at < 0 || end < 0) throw new Error('Entries are not written so.')
  const flipped = Buffer.from(bytes)
  flipped.writeUInt8(flipped.readUInt8(at + 3) ^ 1, at + 3)
  return flipped
}

/** Nobody is signed in here: whoever was given a file may check it. */
async function checkPage(): Promise<Page> {
  const page = await newPage()
  await page.goto('/check')
  await page.getByText('Compared with the keys of this server').waitFor()
  return page
}

async function choose(page: Page, name: string, buffer: Buffer): Promise<void> {
  await page.locator('input[type=file]').setInputFiles({ name, mimeType: 'application/json', buffer })
}

const verdict = (page: Page, title: RegExp | string) => page.getByRole('heading', { level: 2, name: title }).waitFor()

describe('a ledger file in the hands of somebody without an account', () => {
  let run: ApiRun
  beforeAll(async () => {
    aimClientsAt(serverAddress())
    run = await sealedRun()
  })

  it('is whole as it was downloaded, and names who signed it; with one bit changed it says at which entry', async () => {
    const { name, bytes } = await downloadedFrom(run)
    expect(name).toBe(`${run.number} Press 2.ledger.json`)
    const page = await checkPage()
    await choose(page, name, bytes)
    await verdict(page, `Whole: ${run.state.headSeq} entries, nothing altered`)
    await page.getByText('Every entry is as it was sealed, and the keys are among those it was compared with.').waitFor()
    const signed = page.getByRole('listitem')
    expect(await signed.allInnerTexts()).toEqual([
      expect.stringMatching(/^Signed as lead: Lena Vogt/),
      expect.stringMatching(/^Countersigned as witness: Wim Faber/),
    ])

    const seq = run.state.headSeq - 10
    await choose(page, name, flippedIn(bytes, seq))
    await verdict(page, `Altered at entry ${seq}`)
    expect(await signed.count()).toBe(0)

    // The same name again, as it was: nothing of the last verdict stays.
    await choose(page, name, bytes)
    await verdict(page, /^Whole/)
  })

  it('has the wrong key when somebody else sealed it, however whole it is', async () => {
    const page = await checkPage()
    await choose(page, 'PT-0001.ledger.json', Buffer.from(ledgerFileBytes()))
    await verdict(page, 'Wrong key')
    await page.getByText('which is none of the keys it was compared with').waitFor()
  })

  it('is checked without a network too, once the page stands open, and sent nowhere', async () => {
    const { name, bytes } = await downloadedFrom(run)
    const page = await checkPage()
    const asked: string[] = []
    await page.context().setOffline(true)
    page.on('request', (request) => asked.push(`${request.method()} ${request.url()}`))
    await choose(page, name, bytes)
    await verdict(page, /^Whole/)
    await choose(page, name, flippedIn(bytes, 7))
    await verdict(page, 'Altered at entry 7')
    await choose(page, name, Buffer.from(ledgerFileBytes()))
    await verdict(page, 'Wrong key')
    expect(asked).toEqual([])
  })
})

import { randomBytes, createHash } from 'node:crypto'
import type { Page } from 'playwright-core'
import sharp from 'sharp'
import { describe, expect, it } from 'vitest'
import { shopWithOpenTest } from '../factories/e2e-shop'
import { newPage } from '../support/browser'
import { leadAtTheRun, signIn } from '../support/run-screen'

/** Two servers, a database and a browser share the machine: what comes by itself may take its time. */
const PATIENT = { timeout: 20_000 }

const hashOf = (content: Buffer): string => createHash('sha256').update(content).digest('hex')
const noise = (width: number, height: number) => sharp(randomBytes(width * height * 3), { raw: { width, height, channels: 3 } })

interface Held {
  sha256: string
  type: string
  size: number
  present: boolean
}

async function heldBy(page: Page, testId: string): Promise<Held[]> {
  const response = await page.request.get(`/api/proof-tests/${testId}/attachments`)
  return ((await response.json()) as { attachments: Held[] }).attachments
}

async function bytesOf(page: Page, testId: string, sha256: string): Promise<Buffer> {
  return (await page.request.get(`/api/attachments/${sha256}?ledger=${testId}`)).body()
}

/** True once the picture is drawn, not merely asked for. */
const isDrawn = (page: Page, selector: string) => () =>
  page
    .locator(selector)
    .first()
    .evaluate((image) => (image as HTMLImageElement).complete && (image as HTMLImageElement).naturalWidth > 0)
    .catch(() => false)

describe('a photo at a joint', () => {
  it('is taken without a network, outlives a reload, and arrives byte by byte where the witness opens it large', async () => {
    const shop = await shopWithOpenTest()
    const { page, run } = await leadAtTheRun(shop)
    const small = await noise(320, 240).jpeg({ quality: 60 }).toBuffer()
    const tellsWhere = await noise(2600, 1300)
      .withExif({ IFD3: { GPSLatitudeRef: 'N', GPSLatitude: '51/1 30/1 0/1' } })
      .jpeg({ quality: 40 })
      .toBuffer()

    await run.plate(/^Joint 1,/).click()
    await run.heading(/^Joint 1:/).waitFor()
    await page.context().setOffline(true)
    const chooser = page.getByLabel('Photos: choose a file')
    await chooser.setInputFiles({ name: 'weld 1.jpg', mimeType: 'image/jpeg', buffer: Buffer.from('only words') })
    await page.getByText('This file is no photo and no PDF, whatever its name says.').waitFor()
    await chooser.setInputFiles([
      { name: 'weld 1.jpg', mimeType: 'image/jpeg', buffer: small },
      { name: 'weld 1 wide.jpg', mimeType: 'image/jpeg', buffer: tellsWhere },
    ])
    const chosen = page.getByRole('list', { name: 'Chosen' }).getByRole('listitem')
    await expect.poll(() => chosen.count(), PATIENT).toBe(2)
    expect(await page.getByText('This file is no photo').count()).toBe(0)
    await run.accept(1, { weld: true, before: true })

    // Back on the network, but nothing gets through: entry and bytes are on this tablet only.
    await page.route('**/entries', (route) => (route.request().method() === 'POST' ? route.abort('connectionreset') : route.continue()))
    await page.route('**/api/attachments/*', (route) =>
      route.request().method() === 'PUT' ? route.abort('connectionreset') : route.continue(),
    )
    await page.context().setOffline(false)
    await page.reload()
    await run.plate(/^Joint 1,/).click()
    await run.heading(/^Joint 1:/).waitFor()
    await expect.poll(() => page.getByText('on this tablet', { exact: true }).count(), PATIENT).toBe(2)
    await expect.poll(isDrawn(page, 'img[src^="blob:"]'), PATIENT).toBe(true)
    expect(await heldBy(page, shop.testId)).toEqual([])

    await page.unroute('**/entries')
    await page.unroute('**/api/attachments/*')
    await expect.poll(async () => (await heldBy(page, shop.testId)).map((one) => one.present), PATIENT).toEqual([true, true])
    await expect.poll(() => page.getByText('on the server', { exact: true }).count(), PATIENT).toBe(2)

    const [first, second] = await heldBy(page, shop.testId)
    expect(first?.sha256).toBe(hashOf(small))
    expect((await bytesOf(page, shop.testId, hashOf(small))).equals(small)).toBe(true)
    const redrawn = await bytesOf(page, shop.testId, second?.sha256 ?? '')
    expect(hashOf(redrawn)).toBe(second?.sha256)
    const { width, height, exif } = await sharp(redrawn).metadata()
    expect({ width, height, exif }).toEqual({ width: 2000, height: 1000, exif: undefined })

    const witness = await newPage({ viewport: { width: 390, height: 844 } })
    await signIn(witness, shop.witness)
    await witness.goto(`/proof-tests/${shop.testId}/attend`)
    const thumbnail = witness.getByRole('button', { name: 'Photo weld 1.jpg, Joint 1, examined before load: open it large' })
    await thumbnail.waitFor()
    await expect.poll(isDrawn(witness, 'li img'), PATIENT).toBe(true)
    await thumbnail.click()
    const large = witness.getByRole('dialog', { name: 'Photo weld 1.jpg, large' })
    await large.getByText(hashOf(small).slice(0, 8)).waitFor()
    await expect.poll(isDrawn(witness, 'dialog img'), PATIENT).toBe(true)
    expect(await witness.getByRole('button', { name: /stop/i }).first().isVisible()).toBe(true)
    await witness.keyboard.press('ArrowRight')
    await witness.getByRole('dialog', { name: 'Photo weld 1 wide.jpg, large' }).waitFor()
    await witness.keyboard.press('Escape')
    await witness.getByRole('dialog').waitFor({ state: 'detached' })
    expect(await thumbnail.isVisible()).toBe(true)
  })

  it('keeps the record from being signed while its bytes are missing, until they come or somebody says they will not', async () => {
    const shop = await shopWithOpenTest()
    const { page, run } = await leadAtTheRun(shop)
    const [lost, late] = await Promise.all([noise(200, 150).jpeg().toBuffer(), noise(150, 200).jpeg().toBuffer()])
    await page.route('**/api/attachments/*', (route) =>
      route.request().method() === 'PUT' ? route.abort('connectionreset') : route.continue(),
    )
    await run.press(/^Note/)
    await page.getByRole('radio', { name: 'Leak' }).check({ force: true })
    await page.getByLabel('In a few words').fill('Drops at the ram seal.')
    await page.getByLabel('Photos: choose a file').setInputFiles([
      { name: 'seal.jpg', mimeType: 'image/jpeg', buffer: lost },
      { name: 'hose.jpg', mimeType: 'image/jpeg', buffer: late },
    ])
    await page.getByRole('list', { name: 'Chosen' }).getByRole('listitem').nth(1).waitFor()
    await run.press(/^Written down/)
    await run.toTheClimb()
    await run.press(/^All behind the shield: pumping to/)
    await run.press(/^Stop/)
    await run.release()
    await run.heading('What was found after the stop').waitFor()
    await page.getByRole('radio', { name: 'Rejected' }).check({ force: true })
    await page.getByLabel(/^Why/).fill('Oil under the ram.')
    await run.press('Concluded: rejected')
    await page.getByRole('link', { name: /Go to the record and sign/ }).click()
    await page.getByText('2 photos or documents are not on the server yet. The signature waits for them.').waitFor()
    await expect.poll(() => page.getByText('On this tablet: it is being sent. Leave this page open.').count(), PATIENT).toBe(2)
    expect(await page.getByRole('form', { name: 'Sign' }).count()).toBe(0)

    const elsewhere = await newPage()
    await signIn(elsewhere, shop.lead)
    await elsewhere.goto(`/proof-tests/${shop.testId}`)
    const missing = elsewhere.getByRole('list', { name: 'Not on the server yet' }).getByRole('listitem')
    await expect.poll(() => missing.count(), PATIENT).toBe(2)
    await missing.first().getByRole('button', { name: 'Declare it lost' }).click()
    await missing.first().getByRole('button', { name: 'It is lost' }).click()
    await missing.first().getByText('Say why in a few words.').waitFor()
    await missing.first().getByLabel('Why its bytes will not come').fill('The tablet went into the oil.')
    await missing.first().getByRole('button', { name: 'It is lost' }).click()
    await elsewhere.getByText(/seal\.jpg of entry \d+ was declared lost by Lena Vogt: The tablet went into the oil\./).waitFor()
    await expect.poll(() => missing.count(), PATIENT).toBe(1)
    expect(await elsewhere.getByRole('form', { name: 'Sign' }).count()).toBe(0)

    await page.unroute('**/api/attachments/*')
    const form = elsewhere.getByRole('form', { name: 'Sign' })
    await form.waitFor({ timeout: 45_000 })
    expect((await bytesOf(page, shop.testId, hashOf(late))).equals(late)).toBe(true)
    await form.getByLabel('Your password').fill(shop.lead.password)
    await form.getByRole('button', { name: 'Sign as lead' }).click()
    await elsewhere
      .getByText(/Waits for Wim Faber/)
      .first()
      .waitFor()
  })
})

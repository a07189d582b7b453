import jsQR from 'jsqr'
import type { BrowserContext, Page } from 'playwright-core'
import sharp from 'sharp'
import { beforeAll, describe, expect, it } from 'vitest'
import { tagResponseSchema } from '#shared/api/tags'
import { toolingResponseSchema } from '#shared/api/tooling'
import type { PressDraft } from '#shared/press/entries'
import type { ToolingDetails } from '#shared/tooling'
import { ApiRun, Device, post } from '../factories/api-run'
import { aimClientsAt } from '../factories/client'
import { openStaffedShop, type SignedInPerson } from '../factories/people'
import { newDevice, newPage, serverAddress } from '../support/browser'

const POINTS_PER_MM = 72 / 25.4

const nose: ToolingDetails = {
  code: 'T-01',
  name: 'Flat nose, 80 mm round',
  kind: 'nose',
  ratedLoad: { text: '20', unit: 'short-ton' },
  ratingFrom: 'Stamped on its side',
  fit: 'Thread M42 on the rod',
  height: null,
  remark: '',
}

let run: ApiRun
let address: string

async function say(person: SignedInPerson, draft: PressDraft): Promise<void> {
  const { results } = await post(person, `/api/presses/${run.pressId}/entries`, [new Device(person, run.pressId).draft(draft)])
  expect(results[0]?.outcome).toBe('kept')
}

/** A press that was tested with a piece of tooling and is cleared. */
async function clearPress(): Promise<void> {
  const staff = await openStaffedShop()
  const { lead } = staff
  const added = await lead.client.post(`/api/tooling?shop=${lead.shopId}`, nose).expect(201)
  const toolingIds = [toolingResponseSchema.parse(added.body).tooling.id]
  run = await ApiRun.open({ staff, change: (request) => ({ ...request, toolingIds }) })
  await run.driveTo('sign')
  await run.sign('lead').expect(201)
  await run.refresh()
  await run.sign('witness').expect(201)
  const made = await lead.client.post(`/api/presses/${run.pressId}/tag`).expect(200)
  address = tagResponseSchema.parse(made.body).address
}

async function signedIn({ email, password }: SignedInPerson): Promise<BrowserContext> {
  const device = await newDevice()
  const headers = { origin: serverAddress() }
  const answer = await device.request.post('/api/session', { headers, data: { email, password } })
  expect(answer.ok()).toBe(true)
  return device
}

/** How many pages a PDF has, and how large each is in mm, by its own page objects. */
function pagesOf(pdf: Buffer): { width: number; height: number }[] {
  const text = pdf.toString('latin1')
  expect(text.match(/\/Type\s*\/Page\b/g)).toHaveLength([...text.matchAll(/\/MediaBox/g)].length)
  return [...text.matchAll(/\/MediaBox\s*\[\s*0\s+0\s+([\d.]+)\s+([\d.]+)/g)].map(([, width, height]) => ({
    width: Number(width) / POINTS_PER_MM,
    height: Number(height) / POINTS_PER_MM,
  }))
}

/** Prints as the browser does it for the paper that the page asks for. */
async function printed(page: Page): Promise<{ width: number; height: number }[]> {
  return pagesOf(await page.pdf({ preferCSSPageSize: true }))
}

/** Nothing on the tag is cut off: neither the small print nor a line of the rest. */
async function cutOff(page: Page): Promise<string[]> {
  return page.locator('.tag-paper').evaluate((paper) => {
    const edge = paper.getBoundingClientRect()
    return [...paper.querySelectorAll<HTMLElement>('p, div, svg')].flatMap((part) => {
      const box = part.getBoundingClientRect()
      const outside = box.bottom > edge.bottom || box.right > edge.right + 0.5
      const clips = ['hidden', 'clip'].includes(getComputedStyle(part).overflowY)
      const clipped = clips && part.scrollHeight > part.clientHeight + 2
      return outside || clipped ? [part.textContent ?? part.tagName] : []
    })
  })
}

async function decoded(page: Page): Promise<string | undefined> {
  const svg = await page.locator('.tag-paper svg[role=img]').evaluate((drawn) => new XMLSerializer().serializeToString(drawn))
  const { data, info } = await sharp(Buffer.from(svg), { density: 72 })
    .resize(420, 420, { kernel: 'nearest' })
    .ensureAlpha()
    .raw()
    .toBuffer({ resolveWithObject: true })
  return jsQR(new Uint8ClampedArray(data), info.width, info.height)?.data
}

/** What a phone does when somebody takes it up again. */
const lookAgain = (page: Page) => page.evaluate(() => window.dispatchEvent(new Event('visibilitychange')))

const heading = (page: Page) => page.getByRole('heading', { level: 1 })

beforeAll(async () => {
  aimClientsAt(serverAddress())
  await clearPress()
})

describe('a press’s tag', () => {
  it('prints on one page of its own size, with a code that another reader reads as its address', async () => {
    const page = await (await signedIn(run.staff.lead)).newPage()
    await page.goto(`/presses/${run.pressId}/tag`)
    await page.getByText('Cleared up to').waitFor()
    // The server of this test is reached on this machine alone.
    expect(await page.getByText('Phones can’t open this code').isVisible()).toBe(true)
    await page.evaluate(() => document.fonts.ready)
    expect(await decoded(page)).toBe(address)
    const sizes = [
      { button: '100 mm × 70 mm', width: 100, height: 70 },
      { button: 'A6', width: 105, height: 148 },
    ]
    for (const { button, width, height } of sizes) {
      await page.getByRole('button', { name: button }).click()
      expect(await cutOff(page)).toEqual([])
      expect(await page.getByText('Not every word goes onto this size').count()).toBe(0)
      const pages = await printed(page)
      expect(pages).toHaveLength(1)
      expect(pages[0]?.width).toBeCloseTo(width, 0)
      expect(pages[0]?.height).toBeCloseTo(height, 0)
    }
    const words = await page.locator('.tag-paper').innerText()
    for (const said of [
      run.number,
      'T-01 Flat nose',
      'Bed hole 4',
      'No other bed hole was tested',
      'Void at once after',
      'No change reported since',
    ]) {
      expect(words).toContain(said)
    }
    expect(words).not.toMatch(/\bsafe\b|\bapproved\b/i)
  })

  it('leads whoever scans it, signed in or not, to what holds now: cleared, then not from the moment of a withdrawal', async () => {
    const reader = await newDevice({ viewport: { width: 390, height: 844 } })
    const phone = await reader.newPage()
    const answer = await phone.goto(new URL(address).pathname)
    expect(answer?.headers()['x-robots-tag']).toContain('noindex')
    await phone.getByText('Cleared up to').waitFor()
    expect(await phone.locator('meta[name=robots]').getAttribute('content')).toContain('noindex')
    expect(await heading(phone).innerText()).toMatch(/Cleared up to\s+[\d.]+\s+short\s+tons/)
    expect(await phone.content()).not.toContain(run.pressId)
    expect(await phone.evaluate(() => document.documentElement.scrollWidth)).toBe(390)

    await say(run.staff.lead, { kind: 'withdrawn', payload: { why: 'The bed looks bent.' } })
    await lookAgain(phone)
    await phone.getByRole('heading', { name: 'DO NOT USE' }).waitFor()
    expect(await phone.getByText('The bed looks bent.').isVisible()).toBe(true)
    expect(await phone.getByText('Cleared up to').count()).toBe(0)

    await reader.setOffline(true)
    await lookAgain(phone)
    await phone.getByRole('heading', { name: 'Can’t tell now: treat it as not cleared' }).waitFor()
    expect(await phone.getByText('The bed looks bent.').count()).toBe(0)
    await reader.setOffline(false)
    // Back in reach it asks by itself.
    await phone.getByRole('heading', { name: 'DO NOT USE' }).waitFor()

    const page = await (await signedIn(run.staff.crew)).newPage()
    await page.goto(`/presses/${run.pressId}/tag`)
    await page.getByText('DO NOT USE').waitFor()
    expect(await decoded(page)).toBe(address)
    expect(await cutOff(page)).toEqual([])
    expect(await printed(page)).toHaveLength(1)
  })

  it('says of a code that nobody gave out that no press has it', async () => {
    const page = await newPage()
    await page.goto('/tag/aaaaaaaaaaaaaaaa')
    await page.getByRole('heading', { name: 'No press has this code' }).waitFor()
    expect(await page.getByText('Treat the press as not cleared').isVisible()).toBe(true)
  })

  it('is never answered by the copy of the program on a device', async () => {
    const worker = await (await fetch(`${serverAddress()}/sw.js`)).text()
    expect(worker).toContain(String.raw`/^\/tag(\/|$)/`)
  })
})

describe('the calendar', () => {
  it('shows what falls due, and hands out an address that a program reads until it is ended', async () => {
    const page = await (await signedIn(run.staff.lead)).newPage()
    await page.goto('/')
    await page.getByRole('link', { name: 'The whole calendar' }).click()
    await page.getByRole('heading', { name: 'Calendar', exact: true }).waitFor()
    await page
      .getByText(/^Gauge G-.*, calibration$/)
      .first()
      .waitFor()
    await page.getByRole('button', { name: 'Make an address' }).click()
    const feed = await page.getByLabel('The address, shown this once').inputValue()
    const file = await fetch(feed)
    expect(file.headers.get('content-type')).toContain('text/calendar')
    expect(await file.text()).toContain('BEGIN:VEVENT')
    await page.getByRole('button', { name: 'End the address' }).click()
    await page.getByText('No address leads to this calendar any more.').waitFor()
    expect((await fetch(feed)).status).toBe(404)
  })
})

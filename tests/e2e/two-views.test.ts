import type { Page } from 'playwright-core'
import { describe, expect, it } from 'vitest'
import { shopWithOpenTest, type E2eShop } from '../factories/e2e-shop'
import { newPage } from '../support/browser'
import { leadAtTheRun, signIn } from '../support/run-screen'

/** Counts the tones that the page sounds: a browser without loudspeakers plays them all the same. */
const listenForTones = `
  window.tones = []
  const start = OscillatorNode.prototype.start
  OscillatorNode.prototype.start = function (...args) {
    window.tones.push(this.frequency.value)
    return start.apply(this, args)
  }
`
/** The tones of pauses and stops; the end of a hold or a wait (880 Hz) may sound among them. */
const tonesOf = async (page: Page) => (await page.evaluate<number[]>('window.tones')).filter((frequency) => frequency !== 880)

async function witnessAt(shop: E2eShop, path: string): Promise<Page> {
  const page = await newPage({ viewport: { width: 390, height: 844 } })
  await page.addInitScript(listenForTones)
  await signIn(page, shop.witness)
  await page.goto(path)
  return page
}

/** How long until it is seen (ms); fails after three seconds. */
async function seen(page: Page, text: string | RegExp): Promise<number> {
  const begun = performance.now()
  await page.getByText(text).first().waitFor({ timeout: 3_000 })
  return performance.now() - begun
}

async function streamStands(page: Page, open: () => Promise<unknown>): Promise<void> {
  const stream = page.waitForResponse((response) => response.url().includes('/api/stream') && response.ok(), { timeout: 10_000 })
  await open()
  await stream
  // The first event says where the ledgers stand; then the views stop asking by themselves.
  await page.waitForTimeout(1_500)
}

async function asked(page: Page, milliseconds: number): Promise<number> {
  let count = 0
  const listen = (request: { url(): string; method(): string }) => {
    if (request.method() === 'GET' && /\/entries|\/api\/today/.test(request.url())) count += 1
  }
  page.on('request', listen)
  await page.waitForTimeout(milliseconds)
  page.off('request', listen)
  return count
}

const say = (line: string) => process.stdout.write(`${line}\n`)

describe('every open view', () => {
  it('is current within a second: attend, record, press and today hear of what the lead enters, and ask for nothing meanwhile', async () => {
    const shop = await shopWithOpenTest()
    const { page, run } = await leadAtTheRun(shop)
    await run.toTheClimb()

    const attend = await witnessAt(shop, '/')
    await streamStands(attend, () => attend.goto(`/proof-tests/${shop.testId}/attend`))
    expect(await asked(attend, 5_000)).toBeLessThanOrEqual(1)
    // More tabs of the same browser: one stream tells them all.
    let streams = 0
    attend.context().on('request', (request) => {
      if (request.url().includes('/api/stream')) streams += 1
    })
    const record = await attend.context().newPage()
    await record.goto(`/proof-tests/${shop.testId}`)
    const press = await attend.context().newPage()
    await press.goto(`/presses/${shop.pressId}`)
    const today = await attend.context().newPage()
    await today.goto('/')
    await today.waitForTimeout(2_500)
    expect(streams).toBeGreaterThan(0)
    const before = streams
    await today.waitForTimeout(2_000)
    expect(streams, 'a stream that stands is not opened again').toBe(before)

    const fetched = [record, today].map((tab, index) =>
      tab.waitForResponse((response) => response.url().includes(index === 0 ? '/entries' : '/api/today'), { timeout: 3_000 }),
    )
    const begun = performance.now()
    await run.press(/^All behind the shield: pumping to/)
    await Promise.all(fetched)
    say(`views: record and today asked ${(performance.now() - begun).toFixed(0)} ms after the lead's tap`)

    const stopped = performance.now()
    await page.getByRole('button', { name: /^Stop/ }).click()
    const waits = await Promise.all([seen(attend, 'Stopped, still loaded'), seen(press, /was stopped. Called by Lena Vogt/)])
    say(
      `views: stop seen at attend and press after ${waits.map((wait) => wait.toFixed(0)).join(' and ')} ms (${(performance.now() - stopped).toFixed(0)} ms in all)`,
    )
    await expect.poll(() => tonesOf(attend)).toEqual([1320, 1320, 1320, 1320, 1320])
  })

  it('asks by itself again when the stream is gone, and stops asking when it is back', async () => {
    const shop = await shopWithOpenTest()
    const phone = await witnessAt(shop, '/')
    await streamStands(phone, () => phone.goto(`/proof-tests/${shop.testId}/attend`))
    await phone.context().setOffline(true)
    await phone
      .getByText(/shout stop/i)
      .first()
      .waitFor({ timeout: 5_000 })
    await phone.context().setOffline(false)
    await phone.getByRole('button', { name: /^Stop/ }).waitFor({ timeout: 10_000 })
    await phone.waitForTimeout(3_000)
    expect(await asked(phone, 5_000)).toBeLessThanOrEqual(1)
  })
})

describe('a pause', () => {
  it('by the witness shows at once on the lead’s tablet and sounds there; by the lead, at the witness’s', async () => {
    const shop = await shopWithOpenTest()
    const { page, run } = await leadAtTheRun(shop)
    await page.addInitScript(listenForTones)
    await run.open()
    await run.toTheClimb()
    await run.press(/^All behind the shield: pumping to/)
    await run.mark()
    await run.typeField(0, '1950')
    const phone = await witnessAt(shop, `/proof-tests/${shop.testId}/attend`)
    const before = (await tonesOf(page)).length
    await phone.getByRole('button', { name: /^Pause/ }).click()
    const waited = await seen(page, 'Paused. The press stays loaded.')
    await seen(page, 'Called by Wim Faber.')
    say(`pause: seen by the lead after ${waited.toFixed(0)} ms`)
    await expect.poll(async () => (await tonesOf(page)).slice(before)).toEqual([1100, 1100])
    await run.press(/^The test goes on/)
    await phone.getByRole('button', { name: /^Pause/ }).waitFor({ timeout: 3_000 })

    const response = await page.request.get(`/api/proof-tests/${shop.testId}/entries`)
    const { entries } = (await response.json()) as { entries: { kind: string; authorId: string }[] }
    expect(entries.filter(({ kind }) => kind === 'paused').map(({ authorId }) => authorId)).toEqual([shop.witness.id])

    await phone.getByRole('button', { name: /^Stop/ }).click()
    await seen(page, 'Open the release valve slowly, now.')
    await expect.poll(async () => (await tonesOf(page)).slice(before + 2)).toEqual([1320, 1320, 1320, 1320, 1320])
  })
})

describe('both people’s facts', () => {
  it('land when both write at the same moment, and what goes against a rule is marked', async () => {
    const shop = await shopWithOpenTest()
    const { page, run } = await leadAtTheRun(shop)
    await run.toTheClimb()
    await run.press(/^All behind the shield: pumping to/)
    await run.mark()
    await run.typeField(0, '1950')
    const phone = await witnessAt(shop, `/proof-tests/${shop.testId}/attend`)
    const stopAtPhone = phone.getByRole('button', { name: /^Stop/ })
    await stopAtPhone.waitFor()
    // The lead's tablet is cut off: it goes on by what it knows, while the witness stops.
    await page.context().setOffline(true)
    await stopAtPhone.click()
    await phone.waitForTimeout(1_000)
    for (const [index, text] of (['0.51', '0.10', '0.11'] as const).entries()) await run.typeField((index + 1) as 1 | 2 | 3, text)
    await page.waitForTimeout(500)
    await page.context().setOffline(false)
    await seen(page, 'Open the release valve slowly, now.').catch(() =>
      page.getByText('Open the release valve slowly, now.').first().waitFor(),
    )

    await page.waitForTimeout(3_000)
    const response = await phone.request.get(`/api/proof-tests/${shop.testId}/entries`)
    const { entries } = (await response.json()) as { entries: { kind: string; authorId: string; irregular: string[] }[] }
    const last = entries.slice(-2).map(({ kind, authorId, irregular }) => ({ kind, authorId, marked: irregular.length > 0 }))
    expect(last).toEqual([
      { kind: 'stopped', authorId: shop.witness.id, marked: false },
      { kind: 'row-read', authorId: shop.lead.id, marked: true },
    ])
  })
})

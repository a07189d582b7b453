import { afterEach, beforeEach, expect, it } from 'vitest'
import type { Page } from 'playwright-core'
import { entriesResponseSchema } from '#shared/api/ledger'
import { checkChain, entryText } from '#shared/ledger/chain'
import { shopWithOpenTest, type E2eShop } from '../factories/e2e-shop'
import { RunScreen, signIn, ZERO, type Row } from '../support/run-screen'
import { OwnBrowser } from '../support/own-browser'

/** Rows of a frame of 60 kN/mm with a 50 mm ram, a quarter of the net deflection at each pin: worked out as in first-load. */
const ROWS: readonly Row[] = [1950, 3900, 5900, 7850].map((psi) => {
  const net = (psi * 6894.757293168 * Math.PI * 0.025 ** 2) / 1000 / 60
  const pin = net / 4
  return [String(psi), (net + pin).toFixed(2), pin.toFixed(2), pin.toFixed(2)]
})

let tablet: OwnBrowser
beforeEach(() => {
  tablet = new OwnBrowser()
})
afterEach(() => tablet.throwAway())

/** Resolves when the service worker of the page has everything it keeps. */
const keptWhole = (page: Page) => page.evaluate(async () => Boolean(await navigator.serviceWorker.ready))

async function ledgerOf(page: Page, shop: E2eShop) {
  return entriesResponseSchema.parse(await (await page.request.get(`/api/proof-tests/${shop.testId}/entries`)).json())
}

async function stage(run: RunScreen, readings: Row, last: boolean): Promise<void> {
  await run.press(/^All behind the shield: pumping to/)
  await run.row(readings)
  await run.page.getByText('The hold is over').first().waitFor()
  await run.row(readings)
  if (!last) return run.press(/^Go on to/)
  await run.witnessReads('Wim Faber', readings[0])
  await run.press('Full load was held')
}

it('a test goes from walk-down to the eve of its conclusion without a network, through a reload and two deaths, and everything is on the server once, in order', async () => {
  const shop = await shopWithOpenTest()
  let page = await tablet.switchOn()
  await signIn(page, shop.lead)
  await new RunScreen(page, shop.testId).open()
  await keptWhole(page)
  const before = (await ledgerOf(page, shop)).entries.length

  await page.context().setOffline(true)
  await page.reload()
  let run = new RunScreen(page, shop.testId)
  await page.getByText(/Not connected\..*sent when there is a link/).waitFor()
  await run.press('Joint 7 is welded out')
  await run.walkDown(true)
  await run.press(/^Told to me by/)
  await run.reason('His phone is in the car.')
  await run.setUp()
  await run.press('The bed is pinned in hole 4')
  await run.row(['350'])
  await run.release()
  await run.row(ZERO)
  // What the screen shows as entered is on the disk; what it doesn't show yet may be lost with the battery.
  await page
    .getByText(/^(First row: 0|Mark, then read the same row again)/)
    .first()
    .waitFor()

  // The battery dies while the datum is watched. Today leads back to where it was.
  await tablet.die()
  page = await tablet.switchOn({ offline: true })
  await page.goto('/')
  await page.getByText('Not connected to the server').waitFor()
  await page.getByRole('link', { name: 'Go on with the test' }).click()
  run = new RunScreen(page, shop.testId)
  await run.row(ZERO)
  const [first, second, third, fourth] = ROWS as [Row, Row, Row, Row]
  await stage(run, first, false)
  await stage(run, second, false)
  await run.press(/^All behind the shield: pumping to/)
  await run.row(third)
  await page.getByRole('timer').or(page.getByText('The hold is over')).first().waitFor()

  // And again under load, in the middle of a hold.
  await tablet.die()
  page = await tablet.switchOn({ offline: true })
  run = new RunScreen(page, shop.testId)
  await run.open()
  await page.getByText('The hold is over').first().waitFor()
  await run.row(third)
  await run.press(/^Go on to/)
  await stage(run, fourth, true)
  await run.release()
  await run.row(ZERO)
  await run.walkDown(false)
  await run.heading('Conclusion').waitFor()
  await page.getByText('Concluded with a link').waitFor()

  await page.context().setOffline(false)
  // A browser that is killed may lose the session's cookie with its last seconds: the same person signs in again.
  const again = await page.context().newPage()
  await signIn(again, shop.lead)
  await again.close()
  await page.getByRole('radio', { name: 'Accepted' }).check({ force: true })
  await run.press('Concluded: accepted')
  await page.getByRole('link', { name: /Go to the record and sign/ }).waitFor()
  await expect.poll(async () => (await ledgerOf(page, shop)).entries.at(-1)?.kind, { timeout: 60_000 }).toBe('concluded')

  const { entries } = await ledgerOf(page, shop)
  const stored = entries.map(({ hash, ...entry }) => {
    const { seq, receivedAt, irregular, prevHash, ...draft } = entry
    return { seq, hash, canonical: entryText(draft, { seq, receivedAt, irregular, prevHash }) }
  })
  expect(checkChain(stored)).toMatchObject({ whole: true, entries: entries.length })
  expect(new Set(entries.map(({ id }) => id)).size).toBe(entries.length)
  const made = entries.slice(before)
  expect(made.flatMap(({ irregular }) => irregular)).toEqual([])
  expect(new Set(made.map(({ deviceId }) => deviceId)).size).toBe(1)
  expect(made.map(({ deviceSeq }) => deviceSeq)).toEqual(made.map((_, index) => index + 1))
  expect(new Set(made.map(({ bootId }) => bootId)).size).toBeGreaterThanOrEqual(3)
  expect(made.filter(({ kind }) => kind === 'row-read')).toHaveLength(8)
  expect(made.at(-1)?.kind).toBe('concluded')
})

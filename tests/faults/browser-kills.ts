import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { chromium, type BrowserContext, type Page } from 'playwright-core'
import { expect, vi } from 'vitest'
import { entriesResponseSchema } from '#shared/api/ledger'
import type { LedgerEntry } from '#shared/ledger/envelope'
import { FIRST_LOAD_BY_QUARTERS } from '#shared/proof-test/protocol'
import { ApiRun, type Staff } from '../factories/api-run'
import { expectWhole } from '../support/ledger-checks'
import { RunScreen, signIn } from '../support/run-screen'
import { pauseFor, type Seeded } from '../support/seeded'
import { pidsWith } from './rig'
import type { Tally } from './tally'

interface Site {
  address: string
  staff: Staff
  tally: Tally
}

const SHOWN = /First row: 0, ([\d.]+), 0\.00, 0\.00/

/** Each row has a middle reading of its own, more than an increment from the one before: the datum never stands still. */
const middleOf = (row: number): string => (0.02 * row).toFixed(2)

class Browser {
  private readonly profile = mkdtempSync(path.join(tmpdir(), 'quarterload-browser-'))
  private context: BrowserContext | undefined

  constructor(private readonly address: string) {}

  /** `cut`: whatever the page sends to the ledger goes nowhere. */
  async open(cut: boolean): Promise<Page> {
    this.context = await chromium.launchPersistentContext(this.profile, {
      executablePath: '/usr/bin/chromium',
      args: ['--no-sandbox', '--disable-background-networking'],
      baseURL: this.address,
      locale: 'en-GB',
      viewport: { width: 1180, height: 820 },
      serviceWorkers: 'block',
    })
    // A row half typed hides which one was entered last: it is left out, as nothing of it counts as read.
    await this.context.addInitScript(() => {
      for (const key of Object.keys(localStorage)) if (key.startsWith('quarterload.draft.')) localStorage.removeItem(key)
    })
    const page = this.context.pages()[0] ?? (await this.context.newPage())
    if (cut) {
      await page.route('**/api/proof-tests/*/entries*', (route) => (route.request().method() === 'POST' ? route.abort() : route.continue()))
    }
    return page
  }

  /** Every process of it, at once, as when the tablet's battery ends. */
  async kill(): Promise<void> {
    const pids = pidsWith(`--user-data-dir=${this.profile}`)
    if (pids.length === 0) throw new Error('There is no browser to kill.')
    for (const pid of pids) {
      try {
        process.kill(pid, 'SIGKILL')
      } catch {
        // It went with the first one.
      }
    }
    await vi.waitFor(() => expect(pidsWith(`--user-data-dir=${this.profile}`)).toEqual([]), { timeout: 10_000 })
    this.context = undefined
  }

  /** As a person closes it, with time to write down its cookies. */
  async close(): Promise<void> {
    await this.context?.close()
    this.context = undefined
  }

  remove(): void {
    rmSync(this.profile, { recursive: true, force: true, maxRetries: 5 })
  }
}

/** A test that waits for its datum, with a watch of one second. */
async function testAtItsDatum(staff: Staff): Promise<ApiRun> {
  const name = 'First load, short watch'
  const content = { ...FIRST_LOAD_BY_QUARTERS, datumWatchSeconds: 1 }
  await staff.lead.client.post(`/api/protocols?shop=${staff.lead.shopId}`, { name, content }).expect(201)
  const run = await ApiRun.open({ staff, protocol: name })
  await run.driveTo('datum')
  return run
}

/** The number of the last row that the screen shows as entered; 0 while it asks for the first. */
async function lastShown(page: Page): Promise<number> {
  const heading = page.getByText(/First row: 0,|Zero the indicators, then mark/).first()
  await heading.waitFor({ timeout: 60_000 })
  const found = SHOWN.exec(await page.locator('body').innerText())
  return found ? Math.round(Number(found[1]) / 0.02) : 0
}

async function typeMiddle(page: Page, text: string): Promise<void> {
  const field = page.getByLabel('Middle mm')
  await field.fill(text)
  await field.press('Enter')
  // A reading away from the one before is typed again, and both must agree.
  if ((await field.getAttribute('aria-invalid')) === 'true') {
    await field.fill(text)
    await field.press('Enter')
  }
}

/** Enters rows until the browser is gone; `shown` hears of each that the screen shows as kept. */
async function enterRows(page: Page, run: RunScreen, from: number, shown: (row: number) => void): Promise<void> {
  for (let row = from; ; row += 1) {
    if ((await page.locator('[data-marked]').count()) === 0) await run.mark()
    await run.typeField(0, '0')
    await typeMiddle(page, middleOf(row))
    await run.typeField(2, '0.00')
    await run.typeField(3, '0.00')
    await page
      .getByText(`First row: 0, ${middleOf(row)}, 0.00, 0.00`)
      .first()
      .waitFor({ timeout: 60_000 })
    shown(row)
  }
}

const middleIn = ({ payload }: LedgerEntry): unknown => (payload['readings'] as { text: string }[] | undefined)?.[1]?.text

async function datumRows(run: ApiRun): Promise<LedgerEntry[]> {
  const answer = entriesResponseSchema.parse((await run.staff.lead.client.get(run.path).expect(200)).body)
  expectWhole(answer.entries, answer.headHash)
  return answer.entries.filter((entry) => entry.kind === 'datum-read')
}

/**
 * Chromium is killed while a lead types rows of readings, half of the times with no way to the ledger. A row that the
 * screen showed must be shown again by the next start, and be on the server once, in order, when the way is open.
 */
export async function killBrowsers({ address, staff, tally }: Site, times: number, random: Seeded): Promise<void> {
  const run = await testAtItsDatum(staff)
  const browser = new Browser(address)
  let last = 0
  try {
    const page = await browser.open(false)
    await signIn(page, staff.lead)
    await browser.close()
    for (let kill = 0; kill < times; kill += 1) {
      const screenPage = await browser.open(kill % 2 === 1)
      const screen = new RunScreen(screenPage, run.id)
      await screen.open()
      const there = await lastShown(screenPage)
      // A row that was being written when the kill came may have made it.
      expect([last, last + 1], `the row shown after kill ${kill}`).toContain(there)
      last = there
      let gone = false
      const entering = enterRows(screenPage, screen, there + 1, (row) => {
        last = row
      }).catch((error: unknown) => {
        if (!gone) throw error
      })
      await Promise.race([entering, pauseFor(random.between(400, 4000))])
      gone = true
      await browser.kill()
      tally.killed('browser')
      await entering
    }
    const screenPage = await browser.open(false)
    const screen = new RunScreen(screenPage, run.id)
    await screen.open()
    const there = await lastShown(screenPage)
    expect([last, last + 1], 'the row shown at the end').toContain(there)
    const wanted = Array.from({ length: there }, (_nothing, index) => middleOf(index + 1))
    for (const text of wanted) tally.acknowledged(`${run.id} ${text}`)
    await vi.waitFor(async () => expect(await datumRows(run)).toHaveLength(there), { timeout: 60_000, interval: 250 })
    const found = (await datumRows(run)).map((entry) => String(middleIn(entry)))
    tally.saw(found.map((text) => `${run.id} ${text}`))
    expect(found).toEqual(wanted)
  } finally {
    await browser.close()
    browser.remove()
  }
}

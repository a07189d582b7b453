import { mkdirSync } from 'node:fs'
import path from 'node:path'
import { chromium } from 'playwright-core'
import type { Browser, BrowserContext, BrowserContextOptions, Page } from 'playwright-core'

interface E2e {
  address: string
  browser: Browser
}

const PICTURES = '.artefacts/e2e'

let open: E2e | undefined
const contexts: BrowserContext[] = []
const noise: string[] = []

/** The browser's own notice of an answer such as 401 or 409, which the screen handles; a driver's, that it lets no service worker in. */
const notice = /^Failed to load resource: |^Service Worker registration blocked by Playwright/

export async function openE2e(address: string): Promise<void> {
  const browser = await chromium.launch({
    executablePath: '/usr/bin/chromium',
    args: ['--no-sandbox', '--disable-background-networking'],
  })
  open = { address, browser }
}

export async function closeBrowser(): Promise<void> {
  await open?.browser.close()
  open = undefined
}

function e2e(): E2e {
  if (open === undefined) throw new Error('The browser is opened by tests/support/e2e-setup.ts, for tests under tests/e2e.')
  return open
}

/** Where the server of this worker is. */
export function serverAddress(): string {
  return e2e().address
}

function listenTo(page: Page): void {
  page.on('console', (message) => {
    if (['error', 'warning'].includes(message.type()) && !notice.test(message.text())) noise.push(message.text())
  })
  page.on('pageerror', (error) => noise.push(String(error)))
}

/** A browser of its own, as on another tablet: own cookies, own storage. */
export async function newDevice(options: BrowserContextOptions = {}): Promise<BrowserContext> {
  const context = await e2e().browser.newContext({
    baseURL: serverAddress(),
    locale: 'en-GB',
    timezoneId: 'UTC',
    viewport: { width: 1280, height: 800 },
    serviceWorkers: 'block',
    ...options,
  })
  context.on('page', listenTo)
  contexts.push(context)
  return context
}

export async function newPage(options: BrowserContextOptions = {}): Promise<Page> {
  return (await newDevice(options)).newPage()
}

/** A picture of every page that stands open, for whoever looks into a failure. */
export async function photograph(name: string): Promise<void> {
  mkdirSync(PICTURES, { recursive: true })
  const pages = contexts.flatMap((context) => context.pages())
  const file = name.replace(/[^a-z0-9]+/gi, '-').slice(0, 60)
  await Promise.all(pages.map((page, index) => page.screenshot({ path: path.join(PICTURES, `${file}-${index + 1}.png`) })))
}

/** Closes what a test opened; whatever a page said on the console fails the test. */
export async function closePages(): Promise<void> {
  await Promise.all(contexts.splice(0).map((context) => context.close()))
  const said = noise.splice(0)
  if (said.length > 0) throw new Error(`The browser's console was not quiet:\n${said.join('\n')}`)
}

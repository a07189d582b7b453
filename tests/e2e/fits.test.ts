import { mkdirSync, mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import type { Page } from 'playwright-core'
import { z } from 'zod'
import { readConfig } from '#server/config'
import { connect } from '#server/database/connection'
import { loadDemoShop } from '#server/database/seeders/demo'
import { initModels } from '#server/models/index'
import { openStorage } from '#server/storage/open-storage'
import { testListSchema } from '#shared/api/proof-tests'
import { sessionResponseSchema } from '#shared/api/session'
import { newPage } from '../support/browser'
import { signIn } from '../support/run-screen'
import { schemaFor } from '../support/schema'
import { startServer, type ServerProcess } from '../support/server-process'

const PICTURES = '.artefacts/e2e'
const SIZES = [
  { width: 1280, height: 800 },
  { width: 820, height: 1180 },
  { width: 390, height: 844 },
] as const
const rowsSchema = z.object({ id: z.string() }).array()

let server: ServerProcess
let directory: string
let people: Awaited<ReturnType<typeof loadDemoShop>>

/** What doesn't fit the page that stands open: sideways scrolling, and words that are cut off. */
function misfits(page: Page): Promise<string[]> {
  return page.evaluate(() => {
    const found: string[] = []
    const wider = document.documentElement.scrollWidth - window.innerWidth
    if (wider > 0) found.push(`scrolls ${wider} px sideways`)
    for (const element of document.querySelectorAll<HTMLElement>('body *')) {
      const style = getComputedStyle(element)
      const { width, height } = element.getBoundingClientRect()
      const forReadersOnly = style.clipPath.startsWith('inset(50%') || width <= 2 || height <= 2
      const clips = style.overflowX === 'hidden' || style.overflowX === 'clip'
      const words = element.textContent.trim()
      if (!forReadersOnly && clips && words !== '' && element.scrollWidth > element.clientWidth + 1)
        found.push(`cuts “${words.slice(0, 60)}”`)
    }
    return found
  })
}

/** Every kind of screen that a lead sees, with each press and each test of the shop. */
async function screensOf(page: Page): Promise<string[]> {
  const answerOf = async (address: string): Promise<unknown> => (await page.request.get(address)).json()
  const { shops } = sessionResponseSchema.parse(await answerOf('/api/session'))
  const shop = shops[0]?.id ?? ''
  const idsOf = async (what: 'presses' | 'instruments' | 'protocols' | 'tooling') =>
    rowsSchema.parse(z.object({ [what]: z.unknown() }).parse(await answerOf(`/api/${what}?shop=${shop}`))[what]).map(({ id }) => id)
  const { proofTests } = testListSchema.parse(await answerOf(`/api/proof-tests?shop=${shop}`))
  const [presses, instruments, protocols, tooling] = await Promise.all([
    idsOf('presses'),
    idsOf('instruments'),
    idsOf('protocols'),
    idsOf('tooling'),
  ])
  const underWay = proofTests.filter(({ status }) => status === 'under way')
  return [
    ...[
      '/',
      '/presses',
      '/instruments',
      '/protocols',
      '/people',
      '/proof-tests',
      '/more',
      '/account',
      '/settings',
      '/tooling',
      '/calendar',
    ],
    ...['/presses/new', '/instruments/new', '/tooling/new', '/protocols/new', '/proof-tests/new'],
    ...presses.flatMap((id) => [`/presses/${id}`, `/presses/${id}/tag`]),
    ...tooling.slice(0, 1).map((id) => `/tooling/${id}`),
    ...presses.slice(0, 1).map((id) => `/presses/${id}/edit`),
    ...instruments.slice(0, 1).map((id) => `/instruments/${id}`),
    ...protocols.map((id) => `/protocols/${id}`),
    ...proofTests.map(({ id }) => `/proof-tests/${id}`),
    ...underWay.flatMap(({ id }) => [`/proof-tests/${id}/run`, `/proof-tests/${id}/attend`]),
  ]
}

describe('every signed-in screen of the demo shop', () => {
  beforeAll(async () => {
    directory = mkdtempSync(path.join(tmpdir(), 'quarterload-fits-'))
    mkdirSync(PICTURES, { recursive: true })
    const environment = { DATABASE_URL: await schemaFor(inject('databaseUrl'), 'fits'), DATA_DIR: directory, BCRYPT_COST: '4' }
    server = await startServer(environment)
    // An outside database gets no demo shop by itself; it is loaded beside the running server.
    const database = connect(environment.DATABASE_URL, { poolSize: 2 })
    initModels(database)
    const config = readConfig(environment)
    people = await loadDemoShop({ config, database, storage: await openStorage(config, new Date()), now: () => new Date() })
    await database.close()
  })

  afterAll(async () => {
    await server.end()
    rmSync(directory, { recursive: true, force: true })
  })

  it('fits a desktop, a tablet held upright and a phone: nothing scrolls sideways, no word is cut', async () => {
    const lead = people.find(({ role }) => role.startsWith('lead'))
    if (!lead) throw new Error('The demo shop has a lead.')
    const page = await newPage({ baseURL: server.address })
    await signIn(page, lead)
    const screens = await screensOf(page)
    expect(screens.filter((screen) => screen.endsWith('/run'))).not.toEqual([])
    const found: Record<string, string[]> = {}
    for (const screen of screens) {
      await page.goto(screen, { waitUntil: 'networkidle' })
      for (const size of SIZES) {
        await page.setViewportSize(size)
        // Drawings are laid out anew in the frame after the one that tells them their size.
        await page.evaluate(() => new Promise((done) => requestAnimationFrame(() => requestAnimationFrame(done))))
        const here = await misfits(page)
        if (here.length > 0) found[`${size.width} px, ${screen} “${await page.title()}”`] = here
        await page.screenshot({ path: path.join(PICTURES, `fits-${size.width}${screen.replace(/[^a-z0-9]+/gi, '-')}.png`) })
      }
    }
    expect(found).toEqual({})
  })
})

import { createServer, request as forward, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import { afterEach, beforeEach, expect, it } from 'vitest'
import { shopWithOpenTest } from '../factories/e2e-shop'
import { newPage, serverAddress } from '../support/browser'
import { RunScreen, signIn } from '../support/run-screen'

let front: Server
let address: string
/** Set, the server is as after an update: its service worker is another one. */
let updated: boolean

beforeEach(async () => {
  updated = false
  front = createServer((asked, answer) => {
    const isWorker = asked.url === '/sw.js'
    // The worker is always sent whole, so that it can be another one.
    const headers = isWorker ? { host: asked.headers.host } : asked.headers
    const passed = forward(new URL(asked.url ?? '/', serverAddress()), { method: asked.method, headers }, (given) => {
      const { 'content-length': _length, etag: _etag, 'last-modified': _changed, ...whole } = given.headers
      answer.writeHead(given.statusCode ?? 502, isWorker ? whole : given.headers)
      given.pipe(answer, { end: !isWorker })
      if (isWorker) given.on('end', () => answer.end(updated ? '\n// The next version.' : ''))
    })
    passed.on('error', () => answer.destroy())
    asked.pipe(passed)
  })
  await new Promise<void>((resolve) => front.listen(0, '127.0.0.1', resolve))
  address = `http://127.0.0.1:${(front.address() as AddressInfo).port}`
})
afterEach(() => {
  front.closeAllConnections()
  front.close()
})

it('a new version is offered on an ordinary screen, not on a run, and is loaded when somebody says so', async () => {
  const shop = await shopWithOpenTest()
  const page = await newPage({ baseURL: address, serviceWorkers: 'allow' })
  await signIn(page, shop.lead)
  await page.evaluate(async () => Boolean(await navigator.serviceWorker.ready))
  // From here on the page is the kept one, which stays in use until somebody says so.
  await page.reload()
  updated = true
  await page.evaluate(async () => Boolean(await (await navigator.serviceWorker.getRegistration())?.update()))
  const plate = page.getByRole('complementary', { name: 'New version' })
  const waits = () => page.evaluate(async () => (await navigator.serviceWorker.getRegistration())?.waiting?.state ?? 'none')
  await expect.poll(waits, { timeout: 20_000 }).toBe('installed')
  await plate.waitFor({ timeout: 40_000 })

  const run = new RunScreen(page, shop.testId)
  await run.open()
  expect(await plate.count()).toBe(0)

  await page.goto('/')
  await plate.waitFor({ timeout: 40_000 })
  const loaded = page.waitForEvent('load')
  await plate.getByRole('button', { name: 'Load it now' }).click()
  await loaded
  await page.getByRole('heading', { name: 'Today' }).waitFor({ state: 'attached' })
  expect(await waits()).toBe('none')
  expect(await plate.count()).toBe(0)
})

import { randomUUID } from 'node:crypto'
import { mkdirSync } from 'node:fs'
import path from 'node:path'
import type { Page } from 'playwright-core'
import { beforeAll, describe, expect, it } from 'vitest'
import { v7 as newId } from 'uuid'
import { appendResponseSchema } from '#shared/api/ledger'
import { sessionResponseSchema } from '#shared/api/session'
import { FRAME_KINDS, type FrameKind, type Joint } from '#shared/press/model'
import { startingFrame } from '#shared/press/starting-joints'
import { shopWithOpenTest } from '../factories/e2e-shop'
import { openedPayload } from '../factories/test-press'
import { newDevice, serverAddress } from '../support/browser'
import { RunScreen, signIn } from '../support/run-screen'

const PICTURES = '.artefacts/e2e'
const SIZES = [
  { width: 1280, height: 800 },
  { width: 820, height: 1180 },
  { width: 390, height: 844 },
] as const
const password = 'long enough to be one'
const presses = new Map<FrameKind, string>()
const owner = { email: `${randomUUID()}@people.example`, password }

const mm = (text: string) => ({ text, unit: 'mm' as const })
const DIMENSIONS = {
  'h-frame': { height: mm('1600'), opening: mm('710'), throat: null, holePitch: mm('150'), holes: 7 },
  'four-post': { height: mm('2240'), opening: mm('540'), throat: null, holePitch: null, holes: 0 },
  'c-frame': { height: mm('1200'), opening: null, throat: mm('280'), holePitch: null, holes: 0 },
  bench: { height: mm('700'), opening: mm('420'), throat: null, holePitch: null, holes: 0 },
} as const

const extra = (frame: ReturnType<typeof startingFrame>, number: number, place: string | null): Joint => {
  const [a = '', b = ''] = frame.members.map(({ id }) => id)
  return {
    id: newId(),
    number,
    name: `Guard bracket ${number}`,
    kind: 'bolt',
    detail: 'M10',
    between: [a, b],
    makeUp: 'open',
    madeBy: '',
    filler: '',
    madeOn: null,
    place,
  }
}

/** A press of each kind of frame, with joints in every state a joint can be in. */
async function enterPresses(): Promise<void> {
  const { request } = await newDevice()
  const headers = { origin: serverAddress() }
  const opening = { shopName: 'Quay Street Frames', ownerName: 'Ida Marsh', ...owner }
  const session = sessionResponseSchema.parse(await (await request.post('/api/shops', { headers, data: opening })).json())
  const device = { deviceId: newId(), bootId: newId(), monotonicMs: 0, observedAt: new Date().toISOString() }
  const made = { ...device, v: 1, authorId: session.user.id, basedOnSeq: 0, attachments: [], overrides: [] }
  for (const kind of FRAME_KINDS) {
    const frame = startingFrame(kind, newId)
    const all = [...frame.joints, extra(frame, frame.joints.length + 1, null), extra(frame, frame.joints.length + 2, 'ram-seat')]
    const joints = all.map((joint, index): Joint => ({
      ...joint,
      makeUp: index % 5 === 3 ? 'tacked' : index % 5 === 4 ? 'open' : 'finished',
    }))
    const pressId = newId()
    const description = { ...openedPayload().press, name: `Drawn ${kind}`, kind, dimensions: DIMENSIONS[kind], members: frame.members }
    const registered = { kind: 'registered', payload: { description, joints, lastWorkedOn: null } }
    const examined = joints.flatMap(({ id, makeUp }, index) => {
      const result = index % 5 === 0 ? 'accepted' : index % 5 === 1 ? 'rejected' : null
      if (makeUp !== 'finished' || result === null) return []
      return [{ kind: 'joint-examined', payload: { jointId: id, method: 'visual', result, remark: '', test: null } }]
    })
    const entries = [registered, ...examined].map((draft, index) => ({
      ...made,
      ...draft,
      id: newId(),
      ledgerId: pressId,
      deviceSeq: index + 1,
    }))
    const send = async (address: string, part: typeof entries): Promise<void> => {
      const answer = await request.post(address, { headers, data: { sentAt: device.observedAt, entries: part } })
      const { results } = appendResponseSchema.parse(await answer.json())
      expect(results.filter(({ outcome }) => outcome !== 'kept')).toEqual([])
    }
    await send(`/api/presses?shop=${session.shops[0]?.id ?? ''}`, entries.slice(0, 1))
    await send(`/api/presses/${pressId}/entries`, entries.slice(1))
    presses.set(kind, pressId)
  }
}

/** What overlaps or is cut off on the drawing that stands open. */
function faults(page: Page): Promise<string[]> {
  return page.evaluate(() => {
    interface Area {
      name: string
      left: number
      top: number
      right: number
      bottom: number
    }
    const found: string[] = []
    const buttons = [...document.querySelectorAll<HTMLElement>('[data-joint]')]
    const around = (name: string, parts: Element[]): Area => {
      const boxes = parts.map((part) => part.getBoundingClientRect())
      return {
        name,
        left: Math.min(...boxes.map((box) => box.left)),
        top: Math.min(...boxes.map((box) => box.top)),
        right: Math.max(...boxes.map((box) => box.right)),
        bottom: Math.max(...boxes.map((box) => box.bottom)),
      }
    }
    const meet = (a: Area, b: Area): boolean =>
      a.left < b.right - 0.5 && b.left < a.right - 0.5 && a.top < b.bottom - 0.5 && b.top < a.bottom - 0.5
    const drawn = buttons.map((button) => around(`balloon ${button.dataset['joint']}`, [...button.querySelectorAll('path')]))
    const touched = buttons.map((button) => around(`target ${button.dataset['joint']}`, [button]))
    const sheet = buttons[0]?.parentElement
    if (!sheet) return ['no joint is drawn']
    const edge = around('sheet', [sheet])
    const figures = [...sheet.querySelectorAll(':scope > svg text')].map((text) => around(`figure ${text.textContent}`, [text]))
    for (const list of [drawn, touched]) {
      list.forEach((one, index) => {
        for (const other of list.slice(index + 1)) if (meet(one, other)) found.push(`${one.name} over ${other.name}`)
        if (one.left < edge.left || one.right > edge.right || one.top < edge.top || one.bottom > edge.bottom)
          found.push(`${one.name} is cut off`)
      })
    }
    for (const one of drawn) for (const figure of figures) if (meet(one, figure)) found.push(`${one.name} over ${figure.name}`)
    for (const one of touched) if (one.right - one.left < 56) found.push(`${one.name} is ${one.right - one.left} px`)
    return found
  })
}

const settle = (page: Page) => page.evaluate(() => new Promise((done) => requestAnimationFrame(() => requestAnimationFrame(done))))

/** Signed in, on the page of the press of this kind. */
async function pageOf(kind: FrameKind, options = {}): Promise<Page> {
  const page = await (await newDevice(options)).newPage()
  await signIn(page, owner)
  await page.goto(`/presses/${presses.get(kind) ?? ''}`)
  await page.locator('[data-joint]').first().waitFor()
  return page
}

describe('the drawing of a press', () => {
  beforeAll(async () => {
    mkdirSync(PICTURES, { recursive: true })
    await enterPresses()
  })

  it.each(FRAME_KINDS)('of a %s: nothing overlaps, nothing is cut off, at three sizes and in print', async (kind) => {
    const page = await pageOf(kind)
    const found: Record<string, string[]> = {}
    for (const size of SIZES) {
      await page.setViewportSize(size)
      await page.evaluate(() => document.fonts.ready)
      await settle(page)
      const here = await faults(page)
      if (here.length > 0) found[size.width] = here
      const plate = page.locator('[data-joint]').first().locator('xpath=ancestor::*[contains(@class,"desktop:sticky")][1]')
      await plate.screenshot({ path: path.join(PICTURES, `drawing-${kind}-${size.width}.png`) })
    }
    expect(found).toEqual({})
    await page.emulateMedia({ media: 'print' })
    const printed = page.locator('svg[role="img"]:visible').first()
    expect(await printed.locator('path').count()).toBeGreaterThan(30)
    expect(await page.locator('[data-joint]:visible').count()).toBe(0)
    const ground = await printed.evaluate((element) => {
      const colours: string[] = []
      for (let one = element.parentElement; one; one = one.parentElement) colours.push(getComputedStyle(one).backgroundColor)
      return colours.find((colour) => colour !== 'rgba(0, 0, 0, 0)')
    })
    expect(ground).toBe('rgb(255, 255, 255)')
    await printed.screenshot({ path: path.join(PICTURES, `drawing-${kind}-print.png`) })
  })

  it('is enlarged by key, wheel and button, and holds no finger that scrolls the page', async () => {
    const page = await pageOf('h-frame', { viewport: SIZES[2], hasTouch: true })
    const joint = page.locator('[data-joint="1"]')
    const wide = async (): Promise<number> => (await joint.boundingBox())?.width ?? 0
    await joint.scrollIntoViewIfNeeded()
    const held = joint.locator('xpath=ancestor::*[contains(@style,"touch-action")][1]')
    expect(await held.evaluate((element) => getComputedStyle(element).touchAction)).toBe('pan-x pan-y')
    const before = await page.evaluate(() => window.scrollY)
    await joint.hover()
    await page.mouse.wheel(0, 200)
    await expect.poll(() => page.evaluate(() => window.scrollY)).toBeGreaterThan(before)
    expect(await wide()).toBe(56)

    await page.getByRole('button', { name: 'Zoom in' }).click()
    expect(await wide()).toBe(84)
    expect(await held.evaluate((element) => getComputedStyle(element).touchAction)).toBe('none')
    await joint.focus()
    await page.keyboard.press('+')
    expect(await wide()).toBe(126)
    // What has the focus is never left outside the window.
    const sheet = await held.boundingBox()
    const at = await joint.boundingBox()
    expect(at && sheet && at.x >= sheet.x - 1 && at.y >= sheet.y - 1).toBe(true)
    await page.screenshot({ path: path.join(PICTURES, 'drawing-enlarged-390.png') })
    await page.keyboard.press('0')
    expect(await wide()).toBe(56)
  })

  it('takes a joint to another spot by a tap, adds one, splits one and retires one, each after saying what it does', async () => {
    const page = await pageOf('bench')
    await page.locator('[data-joint="8"]').click()
    await page.getByRole('button', { name: 'Place it on the drawing' }).click()
    await page.getByText('Only the drawing changes: no joint falls back.').waitFor()
    await page.getByRole('group', { name: 'Where it stands' }).waitFor()
    await page.screenshot({ path: path.join(PICTURES, 'drawing-placing-1280.png') })
    const spot = await page.getByRole('button', { name: 'Along the upright, left' }).boundingBox()
    if (!spot) throw new Error('The spot is drawn.')
    await page.mouse.click(spot.x + spot.width / 2 + 9, spot.y + spot.height / 2 - 7)
    await expect.poll(() => page.getByLabel('Where it stands', { exact: true }).last().inputValue()).toBe('upright-left')
    await page.getByRole('button', { name: 'Joint 8 stands there' }).click()
    await page.getByRole('button', { name: 'Place it on the drawing' }).waitFor()
    const placed = await page.locator('[data-joint="8"]').boundingBox()
    expect(placed && placed.x < 200).toBe(true)

    await page.getByRole('button', { name: 'Split it' }).click()
    await page.getByText('Joint 8 is retired. Each of the new ones is unexamined until somebody examines it.').waitFor()
    const names = page.getByLabel('Name', { exact: true })
    await names.nth(0).fill('Guard bracket, upper')
    await names.nth(1).fill('Guard bracket, lower')
    await page.getByLabel('Why it is split').fill('Two bolts, looked at one by one')
    await page.getByRole('button', { name: 'Joint 8 is 2 joints' }).click()
    await page.locator('[data-joint="11"]').waitFor()
    expect(await page.locator('[data-joint="8"]').count()).toBe(0)

    await page.locator('[data-joint="11"]').click()
    await page.getByRole('button', { name: 'Retire it' }).click()
    await page.getByText('The load path closes without it.').waitFor()
    await page.getByLabel('Why joint 11 is no longer there').fill('The lower bracket was taken off')
    await page.getByRole('button', { name: 'Joint 11 is retired' }).click()
    await expect.poll(() => page.locator('[data-joint="11"]').count()).toBe(0)

    // The load path opens where the one joint of a member goes: it is drawn dashed, with its word.
    await page.locator('[data-joint="5"]').click()
    await page.getByRole('button', { name: 'Retire it' }).click()
    await page.getByText(/^The load path is open without it\. Adaptor hangs on no joint/).waitFor()
    await page.getByLabel('Why joint 5 is no longer there').fill('Cut off to be made anew')
    await page.getByRole('button', { name: 'Joint 5 is retired' }).click()
    await expect.poll(() => page.locator('[data-joint="5"]').count()).toBe(0)
    await expect.poll(() => page.locator('svg text', { hasText: 'loose' }).first().isVisible()).toBe(true)
    await page.screenshot({ path: path.join(PICTURES, 'drawing-loose-1280.png') })
  })

  it('is walked down outside a test, and goes on after a reload where it was', async () => {
    const page = await pageOf('four-post')
    await page.getByRole('button', { name: 'Walk down the joints' }).click()
    await page.getByText('0 of 13 joints looked at.').waitFor()
    await page.getByRole('radio', { name: 'Accepted' }).check({ force: true })
    const first = await page.getByRole('heading', { name: /^Joint \d+:/ }).textContent()
    await page.getByRole('button', { name: /^Joint \d+ was examined$/ }).click()
    await page.getByText('1 of 13 joints looked at.').waitFor()
    await page.reload()
    await page.getByText('1 of 13 joints looked at.').waitFor()
    expect(await page.getByRole('heading', { name: /^Joint \d+:/ }).textContent()).not.toBe(first)
    expect(await page.getByText(/^1st of 13, \d\d:\d\d/).isVisible()).toBe(true)
    await page.screenshot({ path: path.join(PICTURES, 'drawing-walk-down-1280.png') })
  })

  it('stands in the walk-down of a test, which says after a reload what was walked last', async () => {
    const shop = await shopWithOpenTest()
    const page = await (await newDevice()).newPage()
    await signIn(page, shop.lead)
    const run = new RunScreen(page, shop.testId)
    await run.open()
    await run.accept(2, { weld: true, before: true })
    await page.getByText(/^Last: joint 2, 1st of 8, \d\d:\d\d$/).waitFor()
    await page.reload()
    await page.getByText(/^Last: joint 2, 1st of 8, \d\d:\d\d$/).waitFor()
    const found: Record<string, string[]> = {}
    for (const size of [...SIZES, { width: 1180, height: 820 }]) {
      await page.setViewportSize(size)
      await settle(page)
      const here = await faults(page)
      if (here.length > 0) found[size.width] = here
      await page.locator('[data-joint="1"]').scrollIntoViewIfNeeded()
      await page.screenshot({ path: path.join(PICTURES, `drawing-run-${size.width}.png`) })
    }
    expect(found).toEqual({})
    await page.locator('[data-joint="8"]').click()
    await run.heading(/^Joint 8:/).waitFor()
  })
})

import type { BrowserContextOptions, Page } from 'playwright-core'
import { expect } from 'vitest'
import { ApiRun, type Staff } from '../factories/api-run'
import type { SignedInPerson } from '../factories/people'
import { newDevice, serverAddress } from './browser'

export const TABLET: BrowserContextOptions = { viewport: { width: 1180, height: 820 } }
export const PHONE: BrowserContextOptions = { viewport: { width: 390, height: 844 } }

/** Server, database and browser share the machine: what comes by itself may take its time. */
export const PATIENT = { timeout: 20_000 }

/** A page of somebody on a device of their own. */
export async function pageOf({ email, password }: SignedInPerson, path: string, device = TABLET): Promise<Page> {
  const context = await newDevice(device)
  const answer = await context.request.post('/api/session', { headers: { origin: serverAddress() }, data: { email, password } })
  expect(answer.ok()).toBe(true)
  const page = await context.newPage()
  await page.goto(path)
  return page
}

/** Kinds of a press's entries, in their order, as the server has them. */
export async function kindsOf(person: SignedInPerson, pressId: string): Promise<string[]> {
  const response = await person.client.get(`/api/presses/${pressId}/entries`).expect(200)
  return (response.body as { entries: { kind: string }[] }).entries.map(({ kind }) => kind)
}

export const howMany = async (person: SignedInPerson, pressId: string, kind: string): Promise<number> =>
  (await kindsOf(person, pressId)).filter((one) => one === kind).length

/** A press's page as somebody uses it, by its words. */
export class PressScreen {
  constructor(
    readonly page: Page,
    readonly pressId: string,
  ) {}

  static async open(person: SignedInPerson, pressId: string, device = TABLET): Promise<PressScreen> {
    return new PressScreen(await pageOf(person, `/presses/${pressId}`, device), pressId)
  }

  button(name: string | RegExp) {
    return this.page.getByRole('button', { name }).first()
  }

  async sees(text: string | RegExp): Promise<void> {
    await this.page.getByText(text).first().waitFor()
  }

  /** What the page says to whoever stands at the press. */
  get answer() {
    return this.page.locator('#answer')
  }

  async tapJoint(name: string): Promise<void> {
    await this.page.locator('#joints').getByRole('button', { name }).click()
  }

  /** Looks at the joint that the page asks for, and answers its number when it is written down. */
  async examineNext(): Promise<number> {
    const heading = this.page.getByRole('heading', { name: /^Joint \d+: / })
    const said = await heading.innerText()
    const number = Number(/Joint (\d+)/.exec(said)?.[1])
    await this.page.getByRole('radio', { name: 'Accepted' }).check({ force: true })
    await this.button(`Joint ${number} was examined`).click()
    await expect.poll(async () => ((await heading.count()) === 0 ? '' : heading.innerText()), PATIENT).not.toBe(said)
    return number
  }

  /** The change form, up to what it does. */
  async beginChange(change: RegExp): Promise<void> {
    await this.button('Report a change').click()
    await this.page.getByRole('radio', { name: change }).check({ force: true })
  }

  get why() {
    return this.page.getByLabel('What was done, in a few words')
  }
}

/** Fills in a plan with the instruments of an earlier test, opens it, and goes on with it over HTTP. */
export async function planAgain(page: Page, staff: Staff, { state, pressId }: ApiRun): Promise<ApiRun> {
  const { opened } = state
  if (!opened) throw new Error('The earlier test is open.')
  await page.getByLabel('Protocol').selectOption({ label: 'First load by quarters, version 1' })
  await page.getByLabel('Bed hole').fill('4')
  await page.getByLabel('Gauge or load cell').selectOption(opened.forceInstrumentIds[0] ?? '')
  for (const [index, point] of opened.points.entries()) {
    await page.getByLabel('Indicator', { exact: true }).nth(index).selectOption(point.instrumentId)
  }
  await page.getByLabel('Pump hand').selectOption(staff.crew.userId)
  await page.getByLabel('Witness', { exact: true }).selectOption(staff.witness.userId)
  await page.getByLabel('How the witness stands to the shop').fill('works next door')
  await page.getByRole('button', { name: /^Open this test/ }).dblclick()
  await page.waitForURL(/\/proof-tests\/[^/]+\/run$/)
  const id = /proof-tests\/([^/]+)\/run/.exec(page.url())?.[1] ?? ''
  return ApiRun.follow(staff, id, pressId)
}

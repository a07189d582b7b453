import type { Page } from 'playwright-core'
import type { E2eShop, Person } from '../factories/e2e-shop'
import { newPage } from './browser'

/** Gauge (psi), middle, left pin, right pin (mm), as somebody types them. */
export type Row = readonly [gauge: string, middle: string, left: string, right: string]

const LABELS = ['Gauge psi', 'Middle mm', 'Left pin mm', 'Right pin mm'] as const

export async function signIn(page: Page, person: Pick<Person, 'email' | 'password'>): Promise<void> {
  await page.goto('/sign-in')
  await page.getByLabel('E-mail').fill(person.email)
  await page.getByLabel('Password', { exact: true }).fill(person.password)
  await page.getByRole('button', { name: 'Sign in' }).click()
  await page.waitForURL((url) => !url.pathname.startsWith('/sign-in'))
}

/** The run as a lead uses it: what is on the screen, by its words. */
export class RunScreen {
  constructor(
    readonly page: Page,
    readonly testId: string,
  ) {}

  async open(): Promise<void> {
    await this.page.goto(`/proof-tests/${this.testId}/run`)
    await this.page.getByRole('button', { name: /^Stop/ }).waitFor()
  }

  heading(name: string | RegExp) {
    return this.page.getByRole('heading', { name }).first()
  }

  plate(name: string | RegExp) {
    return this.page.getByRole('button', { name }).first()
  }

  async press(name: string | RegExp): Promise<void> {
    await this.plate(name).click()
  }

  /** Taps a joint in the list, says how it was examined, and accepts it. */
  async accept(number: number, options: { weld: boolean; before: boolean }): Promise<void> {
    await this.page
      .getByRole('list', { name: 'Joints of the load path' })
      .getByRole('button', { name: new RegExp(`^Joint ${number},`) })
      .click()
    await this.heading(new RegExp(`^Joint ${number}:`)).waitFor()
    await this.page.getByRole('radio', { name: 'Visual' }).check({ force: true })
    if (options.weld && options.before) await this.page.getByRole('checkbox', { name: /Cooled/ }).check({ force: true })
    await this.press(new RegExp(`^Joint ${number} is accepted`))
  }

  async reason(text: string): Promise<void> {
    await this.page.getByLabel('Your reason').fill(text)
    await this.press('Go on for this reason')
  }

  async setUp(): Promise<void> {
    await this.heading('Set-up').waitFor()
    for (const box of await this.page.getByRole('checkbox').all()) await box.check({ force: true })
    await this.page.getByLabel(/^Relief valve set to/).fill('8500')
    await this.page.getByLabel(/^Stroke under load/).fill('40')
    await this.press('The set-up stands as written')
  }

  /** Waits until marking is open, marks, and types into each field with the Enter key of a keyboard. */
  async mark(): Promise<void> {
    await this.page.locator('button[aria-disabled="false"]', { hasText: /^Mark/ }).click()
    await this.page.locator('[data-marked]').waitFor()
  }

  async typeField(index: 0 | 1 | 2 | 3, text: string): Promise<void> {
    const field = this.page.getByLabel(LABELS[index])
    await field.fill(text)
    await field.press('Enter')
  }

  async row(row: readonly string[]): Promise<void> {
    await this.mark()
    for (const [index, text] of row.entries()) await this.typeField(index as 0 | 1 | 2 | 3, text)
  }

  async release(): Promise<void> {
    await this.press('Gauge zero, ram clear of the stack')
  }

  /** The covered keypad, in the witness's hands. */
  async witnessReads(name: string, gauge: string): Promise<void> {
    await this.press(`${name} has the tablet`)
    await this.page.getByLabel(new RegExp(`^Gauge as ${name} reads it`)).fill(gauge)
    await this.press(/^Enter,? my reading/)
  }

  async walkDown(before: boolean): Promise<void> {
    for (let number = 1; number <= 8; number += 1) {
      await this.accept(number, { weld: number <= 3 || number === 7, before })
      if (number === 7 && before) await this.reason('Thin plate, preheated and cold.')
    }
  }

  /** From the first joint to the datum that stood still, the shortest way. */
  async toTheClimb(): Promise<void> {
    await this.press('Joint 7 is welded out')
    await this.walkDown(true)
    await this.press(/^Told to me by/)
    await this.reason('His phone is in the car.')
    await this.setUp()
    await this.press('The bed is pinned in hole 4')
    await this.row(['350'])
    await this.release()
    await this.row(ZERO)
    await this.row(ZERO)
  }
}

export const ZERO: Row = ['0', '0.00', '0.00', '0.00']

/** The lead, signed in on a tablet held sideways, at the run of the shop's test. */
export async function leadAtTheRun(shop: Pick<E2eShop, 'lead' | 'testId'>): Promise<{ page: Page; run: RunScreen }> {
  const page = await newPage({ viewport: { width: 1180, height: 820 } })
  await signIn(page, shop.lead)
  const run = new RunScreen(page, shop.testId)
  await run.open()
  return { page, run }
}

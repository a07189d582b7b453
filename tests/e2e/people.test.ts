import { randomUUID } from 'node:crypto'
import { describe, expect, it } from 'vitest'
import type { Page } from 'playwright-core'
import { newPage } from '../support/browser'

const email = () => `${randomUUID()}@people.example`
const password = 'long enough to be one'

async function openShop(page: Page, shopName: string, ownerEmail: string): Promise<void> {
  await page.goto('/open-shop')
  await page.getByLabel('Name of the shop').fill(shopName)
  await page.getByLabel('Your name, as it prints on records').fill('Ida Marsh')
  await page.getByLabel('E-mail').fill(ownerEmail)
  await page.getByLabel('Password', { exact: true }).fill(password)
  await page.getByRole('button', { name: 'Open the shop' }).click()
  await page.getByText(shopName).first().waitFor()
}

async function signIn(page: Page, given: { email: string; password: string }): Promise<void> {
  await page.getByLabel('E-mail').fill(given.email)
  await page.getByLabel('Password', { exact: true }).fill(given.password)
  await page.getByRole('button', { name: 'Sign in' }).click()
}

describe('in the browser, with the built client', () => {
  it('an owner opens a shop and adds a witness, who signs in on another device with the first password', async () => {
    const owner = await newPage()
    await openShop(owner, 'Kiln Lane Fabrication', email())

    const witness = { email: email(), password: 'handed over by hand' }
    await owner.goto('/people')
    await owner.getByRole('button', { name: /add/i }).first().click()
    await owner.getByLabel('Name, as it prints on records').fill('Wim Faber')
    await owner.getByLabel('E-mail').fill(witness.email)
    await owner.getByLabel('First password').fill(witness.password)
    await owner.getByRole('radio', { name: /witness/i }).check({ force: true })
    await owner.getByRole('button', { name: 'Add this person' }).click()
    await owner.getByText('Wim Faber').first().waitFor()

    const tablet = await newPage()
    await tablet.goto('/people')
    await signIn(tablet, witness)
    await tablet.getByText('Ida Marsh').first().waitFor()
    expect(new URL(tablet.url()).pathname).toBe('/people')
    expect(await tablet.getByRole('button', { name: /add/i }).count()).toBe(0)
  })

  it('a wrong password is refused in a sentence, and what was typed stays', async () => {
    const page = await newPage()
    await page.goto('/sign-in')
    await signIn(page, { email: 'nobody@people.example', password: 'not the one' })
    await page.getByText('The e-mail address and the password do not go together.').first().waitFor()
    expect(await page.getByLabel('E-mail').inputValue()).toBe('nobody@people.example')
  })
})

import { randomUUID } from 'node:crypto'
import type { Page } from 'playwright-core'
import { describe, expect, it } from 'vitest'
import { sessionResponseSchema } from '#shared/api/session'
import { shopToTest, type ShopToTest } from '../factories/e2e-shop'
import { newPage } from '../support/browser'
import { leadAtTheRun, signIn, ZERO, type Row } from '../support/run-screen'

const PHONE = { width: 390, height: 844 }
const own = { name: 'Wanda Frey', password: 'a password of her own' }

/** Target of each stage (psi) and a spring of 60 kN/mm behind it, as in the first load's own test. */
const ROWS: readonly Row[] = [
  ['1950', '0.55', '0.11', '0.11'],
  ['3900', '1.10', '0.22', '0.22'],
  ['5900', '1.66', '0.33', '0.33'],
  ['7850', '2.21', '0.44', '0.44'],
]

/** The lead invites from the plan; the owner reads the letter in the tray, where there is no mail server. */
async function invitedByMail(shop: ShopToTest, email: string): Promise<string> {
  const lead = await newPage()
  await signIn(lead, shop.lead)
  await lead.goto(`/proof-tests/new?press=${shop.pressId}`)
  await lead.getByLabel('Or invite a witness from outside').fill(email)
  await lead.getByRole('button', { name: 'Send the invitation' }).click()
  await lead.getByText(`${email} is invited and has not accepted yet`).first().waitFor()

  const owner = await newPage()
  await signIn(owner, shop.owner)
  await owner.goto('/mail')
  await owner.getByRole('link', { name: new RegExp(`Witness a proof test at ${shop.name}`) }).click()
  const letter = owner.frameLocator('iframe')
  await letter.getByText(/Lena Vogt of Kiln Lane Fabrication asks you to witness/).waitFor()
  const link = await letter.getByRole('link', { name: 'Look at the invitation' }).getAttribute('href')
  await owner.close()
  await lead.close()
  return link ?? ''
}

async function accepted(page: Page, link: string): Promise<string> {
  await page.goto(link)
  await page.getByRole('heading', { name: 'Lena Vogt invites you to Kiln Lane Fabrication' }).waitFor()
  await page
    .getByText(/see that test and nothing else of the shop/)
    .first()
    .waitFor()
  await page.getByLabel('Your name, as it prints on records').fill(own.name)
  await page.getByLabel('A password', { exact: true }).fill(own.password)
  await page.getByRole('button', { name: 'Accept' }).click()
  await page.getByRole('heading', { name: 'What you witness' }).waitFor()
  return sessionResponseSchema.parse(await (await page.request.get('/api/session')).json()).user.id
}

describe('an outside witness', () => {
  it('comes by mail, attends on a phone, and countersigns', async () => {
    const shop = await shopToTest()
    const email = `${randomUUID()}@people.example`
    const link = await invitedByMail(shop, email)

    const phone = await newPage({ viewport: PHONE })
    const id = await accepted(phone, link)
    await phone
      .getByText(/It is not open yet/)
      .first()
      .waitFor()

    const { testId, number } = await shop.openTest({ id, relation: 'insurer’s surveyor' })
    await phone.reload()
    await phone.getByRole('link', { name: 'Attend it' }).click()
    await phone.getByRole('button', { name: /^Stop/ }).waitFor()

    const { page, run } = await leadAtTheRun({ lead: shop.lead, testId })
    await run.press('Joint 7 is welded out')
    await run.walkDown(true)
    await phone.getByRole('button', { name: 'No joint is missing' }).click()
    await run.setUp()
    await run.press('The bed is pinned in hole 4')
    await run.row(['350'])
    await run.release()
    await run.row(ZERO)
    await run.row(ZERO)
    for (const row of ROWS) {
      await run.press(/^All behind the shield: pumping to/)
      await run.row(row)
      await page.getByText('The hold is over').first().waitFor()
      await run.row(row)
      if (row === ROWS.at(-1)) {
        await run.witnessReads(own.name, row[0])
        await run.press('Full load was held')
      } else await run.press(/^Go on to/)
    }
    await run.release()
    await run.row(ZERO)
    await run.walkDown(false)
    await page.getByRole('radio', { name: 'Accepted' }).check({ force: true })
    await run.press('Concluded: accepted')
    await page.getByRole('link', { name: /Go to the record and sign/ }).click()
    const leadForm = page.getByRole('form', { name: 'Sign' })
    await leadForm.getByLabel('Your password').fill(shop.lead.password)
    await leadForm.getByRole('button', { name: 'Sign as lead' }).click()
    await page
      .getByText(/Waits for Wanda Frey/)
      .first()
      .waitFor()

    await phone.goto('/')
    await phone.getByText(`${number}, `).first().waitFor()
    await phone.getByRole('link', { name: 'Read its record' }).click()
    const form = phone.getByRole('form', { name: 'Countersign' })
    await form.getByLabel('Your password').fill(own.password)
    await form.getByRole('button', { name: 'Countersign' }).click()
    await phone
      .getByText(/Cleared up to/)
      .first()
      .waitFor()
    expect(await phone.evaluate('document.documentElement.scrollWidth <= innerWidth')).toBe(true)

    // The seal went out of the house, to her as well.
    const owner = await newPage()
    await signIn(owner, shop.owner)
    await owner.goto('/mail')
    await owner.getByText(`Record and its seal, to ${email}`).first().waitFor()
    await owner.getByText(`Countersignature wanted, to ${email}`).first().waitFor()

    // Used once: whoever finds the letter later gets nowhere by it.
    const finder = await newPage({ viewport: PHONE })
    await finder.goto(link)
    await finder.getByText('This invitation was accepted already').first().waitFor()
  })

  it('is shown nothing else of the shop, whatever address is typed', async () => {
    const shop = await shopToTest()
    const phone = await newPage({ viewport: PHONE })
    await accepted(phone, await invitedByMail(shop, `${randomUUID()}@people.example`))
    for (const path of [
      '/',
      '/presses',
      `/presses/${shop.pressId}`,
      '/people',
      '/mail',
      '/proof-tests',
      '/proof-tests/new',
      '/instruments',
      '/settings',
    ]) {
      await phone.goto(path)
      await phone.getByRole('heading', { name: 'What you witness' }).waitFor()
      expect(await phone.getByText('Lena Vogt').count()).toBe(0)
    }
  })
})

describe('somebody who forgot the password', () => {
  it('gets a link, chooses a new one and signs in with it', async () => {
    const shop = await shopToTest()
    const page = await newPage({ viewport: PHONE })
    await page.goto('/sign-in')
    await page.getByRole('link', { name: 'Forgotten password' }).click()
    await page.getByLabel('E-mail').fill(shop.lead.email)
    await page.getByRole('button', { name: 'Send me a link' }).click()
    await page.getByText('Look into your mail').waitFor()

    const owner = await newPage()
    await signIn(owner, shop.owner)
    await owner.goto('/mail')
    await owner.getByRole('link', { name: /A new password for Quarterload/ }).click()
    const link = await owner.frameLocator('iframe').getByRole('link', { name: 'Choose a new password' }).getAttribute('href')
    await page.goto(link ?? '')
    await page.getByLabel('New password').fill('the password of now')
    await page.getByRole('button', { name: 'Set this password' }).click()
    await page.waitForURL((url) => url.pathname === '/sign-in')
    await signIn(page, { email: shop.lead.email, password: 'the password of now' })
    await page.goto(link ?? '')
    await page.getByText('This link was used already').waitFor()
  })
})

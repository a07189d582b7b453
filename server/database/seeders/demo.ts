import { pino } from 'pino'
import { literal } from 'sequelize'
import type { AppContext } from '../../context'
import { inRetriedTransaction } from '../../ledger/retry'
import { MailMessage, Shop } from '../../models'
import { hashPassword } from '../../services/passwords'
import { tagOf } from '../../services/tags'
import { keepDemoPhoto } from './demo-files'
import { daysBefore, workAt, type Desk } from './desk'
import { enterCalibrations, enterInstruments, shortenHolds, writeProtocols } from './demo-instruments'
import { enterTooling } from './demo-tooling'
import { DEMO_PASSWORD, foundDemoShops, standingSignIns, type DemoShops, type DemoSignIn } from './demo-people'
import {
  buildMule,
  buildSecondShopsPress,
  registerBadger,
  registerFerry,
  registerHeron,
  registerLongMeg,
  registerOx,
  registerWren,
} from './demo-presses'
import { testBadgerFirst, testBadgerNow, testFerry, testHeron, testLongMeg, testOx, testWrenAgain, testWrenFirst } from './demo-tests'
import type { PressBook } from './press-book'

export type { DemoSignIn }
export type DemoContext = Pick<AppContext, 'config' | 'database' | 'now' | 'storage'>

/** The joint that the stopped test pointed to, opened up and found cracked. */
async function rejectColumnWeld(desk: Desk, { main, people }: DemoShops, press: PressBook): Promise<void> {
  const jointId = press.joint('Head arm to column').id
  const remark = 'Crack of 40 mm at the toe, upper side. To be gouged out and welded again.'
  const payload = { jointId, method: 'dye penetrant' as const, result: 'rejected' as const, remark, test: null }
  const at = daysBefore(desk, 38, '14:20')
  const photo = await keepDemoPhoto(desk, main, at, 'cracked weld', 'Column weld, opened')
  await press.write({ kind: 'joint-examined', payload }, people.secondLead, at, { attachments: [photo] })
}

/** The leak that stopped the test: a new coupler, and the press examined again in the walk-down of the test that repeats it. */
async function changeCoupler(desk: Desk, { people }: DemoShops, press: PressBook): Promise<void> {
  const said = {
    note: 'Coupler taken off. Its seal was cut by a burr on the nipple.',
    done: 'New coupler and nipple fitted, both rated 700 bar, pumped to 200 bar and dry.',
    doneBy: 'Noor Hassett',
  }
  await press.closeRepair(said, people.lead, daysBefore(desk, 97, '16:30'))
}

/** The press that is cleared has its tag: the code that its paper carries. */
async function hangTag(desk: Desk, { main, people }: DemoShops, press: PressBook): Promise<void> {
  const work = await workAt(desk, main, people.lead, daysBefore(desk, 11, '08:10'))
  await tagOf(work, press.id, '')
}

/** The shop's story, the oldest first: what a test freezes is what the registers said on its day. */
async function tell(desk: Desk, passwordHash: string): Promise<void> {
  const shops = await foundDemoShops(desk, passwordHash)
  const instruments = await enterInstruments(desk, shops)
  await enterCalibrations(desk, shops, instruments, 420, 250)
  const ferry = await registerFerry(desk, shops)
  const protocols = await writeProtocols(desk, shops)
  const registers = { shops, instruments, protocols, tooling: null }
  await testFerry(desk, registers, ferry)
  await enterCalibrations(desk, shops, instruments, 250, 180)
  const badger = await registerBadger(desk, shops)
  await testBadgerFirst(desk, registers, badger)
  const wren = await registerWren(desk, shops)
  const abandoned = await testWrenFirst(desk, registers, wren)
  const heron = await registerHeron(desk, shops)
  await testHeron(desk, registers, heron)
  await rejectColumnWeld(desk, shops, heron)
  await enterCalibrations(desk, shops, instruments, 180, 0)
  await shortenHolds(desk, shops, protocols)
  await changeCoupler(desk, shops, wren)
  await testWrenAgain(desk, registers, wren, abandoned.id)
  await buildMule(desk, shops)
  const ox = await registerOx(desk, shops)
  const tooling = await enterTooling(desk, shops)
  await testOx(desk, { ...registers, tooling }, ox)
  await hangTag(desk, shops, ox)
  await buildSecondShopsPress(desk, shops)
  const longMeg = await registerLongMeg(desk, shops)
  await testLongMeg(desk, registers, longMeg)
  await testBadgerNow(desk, registers, badger)
}

async function isEmpty(): Promise<boolean> {
  return (await Shop.findOne({ attributes: ['id'], raw: true })) === null
}

function load({ config, database, now, storage }: DemoContext, passwordHash: string): Promise<void> {
  const logger = pino({ level: config.logLevel }, pino.destination({ dest: 2, sync: true }))
  const loadedAt = now()
  return inRetriedTransaction(database, async (transaction) => {
    await tell({ database, transaction, storage, now: loadedAt, sealing: { config, logger } }, passwordHash)
    // Nobody is written to about what is said to have happened long ago: those letters lie among the sent ones.
    await MailMessage.update({ state: 'sent', attempts: 1, sentAt: literal('created_at') }, { where: { state: 'queued' }, transaction })
  })
}

/**
 * Loads the demo shop when there is no shop yet, whole or not at all, and answers who can sign in to it.
 * Every entry goes through the writer and every figure comes out of the core; dates count back from now.
 */
export async function loadDemoShop(context: DemoContext): Promise<DemoSignIn[]> {
  if (await isEmpty()) await load(context, await hashPassword(DEMO_PASSWORD, context.config.bcryptCost))
  return standingSignIns(context)
}

/** The sign-ins as they are printed, with what to know about them; nothing when there are none. */
export function signInLines(signIns: readonly DemoSignIn[]): string {
  const [first] = signIns
  if (!first) return ''
  const width = Math.max(...signIns.map(({ email }) => email.length))
  const lines = signIns.map(({ email, name, role }) => `  ${email.padEnd(width)}  ${name}, ${role}`)
  return [
    `Demo shop, invented. Sign in with the password “${first.password}” as`,
    ...lines,
    'Whoever reaches the address can do that too: change these passwords before other machines may.',
    '',
  ].join('\n')
}

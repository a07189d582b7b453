import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { setTimeout as delay } from 'node:timers/promises'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import { connect } from '#server/database/connection'
import { aimClientsAt } from '../factories/client'
import { freshEmail, openShop, type SignedInPerson } from '../factories/people'
import { startMailServer, type MailServer } from '../support/mail-server'
import { schemaFor } from '../support/schema'
import { startServer, type ServerProcess } from '../support/server-process'

let directory: string
let mailServer: MailServer
let environment: Record<string, string>
let server: ServerProcess
let owner: SignedInPerson

beforeAll(async () => {
  directory = mkdtempSync(path.join(tmpdir(), 'quarterload-mail-'))
  mailServer = await startMailServer()
  const databaseUrl = await schemaFor(inject('databaseUrl'), 'mail_kills')
  const database = connect(databaseUrl, { poolSize: 1 })
  await database.query(`DROP DATABASE ${new URL(databaseUrl).pathname.slice(1)}`)
  await database.close()
  await schemaFor(inject('databaseUrl'), 'mail_kills')
  environment = {
    DATABASE_URL: databaseUrl,
    DATA_DIR: directory,
    SMTP_URL: mailServer.url,
    MAIL_FROM: 'press@shop.example',
    // Short, so that the next server need not be waited for.
    MAIL_LEASE_SECONDS: '2',
    TRUST_PROXY: '1',
  }
  server = await startServer(environment)
  aimClientsAt(server.address)
  owner = await openShop()
})

afterAll(async () => {
  await server.end()
  await mailServer.close()
  rmSync(directory, { recursive: true, force: true })
})

async function invite(): Promise<string> {
  const email = freshEmail()
  await owner.client.post(`/api/invitations?shop=${owner.shopId}`, { kind: 'member', email, role: 'crew' }).expect(201)
  return email
}

const arrived = (email: string) => mailServer.received.filter(({ to }) => to.includes(email))

/** Kills the server that sends, at once and without a word, and starts another on the same database and port. */
async function killAndRestart(): Promise<void> {
  const { port } = new URL(server.address)
  await server.end('SIGKILL')
  server = await startServer({ ...environment, PORT: port })
}

describe('a server that is killed while it sends', () => {
  it('after the mail server had the letter and before it said so: the letter comes once or twice under one Message-ID, never none', async () => {
    mailServer.mood = 'hold'
    const came = new Promise<void>((resolve) => {
      mailServer.onLetter = () => resolve()
    })
    const email = await invite()
    await came
    mailServer.mood = 'take'
    await killAndRestart()
    await expect.poll(() => arrived(email).length, { timeout: 60_000 }).toBe(2)
    expect(new Set(arrived(email).map(({ messageId }) => messageId)).size).toBe(1)
    // Taken and noted: it comes no third time.
    await delay(4_000)
    expect(arrived(email).length).toBe(2)
  })

  it('at any moment round a letter: each letter comes, and hardly one twice', async () => {
    const emails: string[] = []
    for (const wait of [0, 300, 700, 1_000, 1_300]) {
      emails.push(await invite(), await invite())
      await delay(wait)
      await killAndRestart()
    }
    await expect.poll(() => emails.every((email) => arrived(email).length > 0), { timeout: 90_000 }).toBe(true)
    await delay(4_000)
    for (const email of emails) {
      const letters = arrived(email)
      expect([1, 2]).toContain(letters.length)
      expect(new Set(letters.map(({ messageId }) => messageId)).size).toBe(1)
    }
  })

  it('that is asked to stop finishes the letter in hand first', async () => {
    mailServer.mood = 'hold'
    const came = new Promise<void>((resolve) => {
      mailServer.onLetter = () => resolve()
    })
    const email = await invite()
    await came
    const { port } = new URL(server.address)
    const ended = server.end('SIGTERM')
    await delay(500)
    expect(server.process.exitCode).toBe(null)
    mailServer.answerHeld()
    mailServer.mood = 'take'
    expect(await ended).toBe(0)
    server = await startServer({ ...environment, PORT: port })
    await delay(4_000)
    expect(arrived(email).length).toBe(1)
  })
})

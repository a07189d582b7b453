import { existsSync, mkdtempSync, readFileSync, rmSync, statSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { sessionResponseSchema } from '#shared/api/session'
import { startServer } from '../support/server-process'
import type { ServerProcess } from '../support/server-process'

let directory: string
const running: ServerProcess[] = []

async function start(): Promise<ServerProcess> {
  const server = await startServer({ DATA_DIR: directory })
  running.push(server)
  return server
}

function databasePid(): number {
  return Number(readFileSync(path.join(directory, 'mariadb.pid'), 'utf8'))
}

function lives(pid: number): boolean {
  const status = `/proc/${pid}/status`
  return existsSync(status) && !/^State:\s+Z/m.test(readFileSync(status, 'utf8'))
}

async function openShop(server: ServerProcess): Promise<string> {
  const response = await fetch(`${server.address}/api/shops`, {
    method: 'POST',
    headers: { 'content-type': 'application/json', origin: server.address },
    body: JSON.stringify({ shopName: 'Kept', ownerName: 'Ida Marsh', email: 'ida@kept.example', password: 'long enough to keep' }),
  })
  expect(response.status).toBe(201)
  return response.headers.get('set-cookie')?.split(';')[0] ?? ''
}

async function statusOfSession(server: ServerProcess, cookie: string): Promise<number> {
  return (await fetch(`${server.address}/api/session`, { headers: { cookie } })).status
}

beforeEach(() => {
  directory = mkdtempSync(path.join(tmpdir(), 'quarterload-start-'))
})

afterEach(async () => {
  await Promise.all(running.splice(0).map((server) => server.end('SIGTERM')))
  rmSync(directory, { recursive: true, force: true })
})

describe('the server with its own database', () => {
  it.each(['SIGTERM', 'SIGINT'] as const)('stops both cleanly on %s, and keeps what was entered', async (signal) => {
    const first = await start()
    const cookie = await openShop(first)
    const pid = databasePid()
    expect(await first.end(signal)).toBe(0)
    expect(lives(pid)).toBe(false)
    expect(readFileSync(path.join(directory, 'mariadb.log'), 'utf8')).toMatch(/Shutdown complete\s*$/)
    const second = await start()
    expect(await statusOfSession(second, cookie)).toBe(200)
  })

  it('loads the demo shop once, and prints sign-ins that work', async () => {
    const first = await start()
    const password = /password “(.+)”/.exec(first.output())?.[1] ?? ''
    const email = /\S+@\S+\.example/.exec(first.output())?.[0] ?? ''
    const signInAt = async (server: ServerProcess) => {
      const response = await fetch(`${server.address}/api/session`, {
        method: 'POST',
        headers: { 'content-type': 'application/json', origin: server.address },
        body: JSON.stringify({ email, password }),
      })
      return sessionResponseSchema.parse(await response.json()).shops.map((shop) => shop.id)
    }
    const shops = await signInAt(first)
    expect(shops.length).toBeGreaterThan(0)
    await first.end()
    const second = await start()
    expect(second.output()).toContain(email)
    expect(await signInAt(second)).toEqual(shops)
  })

  it('starts again without a hand after it was killed, and takes over the database left behind', async () => {
    const first = await start()
    const cookie = await openShop(first)
    const pid = databasePid()
    await first.end('SIGKILL')
    expect(lives(pid)).toBe(true)
    const second = await start()
    expect(await statusOfSession(second, cookie)).toBe(200)
    expect(databasePid()).toBe(pid)
    expect(await second.end()).toBe(0)
    expect(lives(pid)).toBe(false)
  })

  it('starts again after both were killed', async () => {
    const first = await start()
    const cookie = await openShop(first)
    process.kill(databasePid(), 'SIGKILL')
    await first.end('SIGKILL')
    const second = await start()
    expect(await statusOfSession(second, cookie)).toBe(200)
  })

  it('refuses to run twice on the same data, and says so', async () => {
    const first = await start()
    await expect(startServer({ DATA_DIR: directory })).rejects.toThrow(/Another Quarterload is running on .*DATA_DIR/)
    expect((await fetch(`${first.address}/api/health`)).status).toBe(200)
  })

  it('keeps its secrets from other accounts', async () => {
    await start()
    expect(statSync(path.join(directory, 'secrets')).mode & 0o777).toBe(0o700)
    for (const name of ['session-secret', 'database-password', 'database-root-password']) {
      expect(statSync(path.join(directory, 'secrets', name)).mode & 0o777).toBe(0o600)
    }
    expect(existsSync(path.join(directory, 'mariadb-init.sql'))).toBe(false)
  })
})

describe('an address that is taken', () => {
  it('is named, and the database does not stay behind', async () => {
    const first = await start()
    const elsewhere = mkdtempSync(path.join(tmpdir(), 'quarterload-start-'))
    await expect(startServer({ DATA_DIR: elsewhere, PORT: new URL(first.address).port })).rejects.toThrow(/Port \d+ is taken/)
    expect(existsSync(path.join(elsewhere, 'mariadb.pid'))).toBe(false)
    rmSync(elsewhere, { recursive: true, force: true })
  })
})

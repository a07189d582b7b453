import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import type { IncomingHttpHeaders } from 'node:http'
import { request } from 'node:https'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { generate } from 'selfsigned'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import { schemaFor } from '../support/schema'
import { startServer } from '../support/server-process'
import type { ServerProcess } from '../support/server-process'

const directory = mkdtempSync(path.join(tmpdir(), 'quarterload-tls-'))
const files = { TLS_CERT: path.join(directory, 'cert.pem'), TLS_KEY: path.join(directory, 'key.pem') }
let certificate = ''
let environment: Record<string, string>
let server: ServerProcess

/** Trusts the one certificate that was made for this test, and nothing else. */
function ask(place: string, method = 'GET', body?: object): Promise<{ status: number | undefined; headers: IncomingHttpHeaders }> {
  const headers = { origin: server.address, 'content-type': 'application/json' }
  return new Promise((resolve, reject) => {
    const asked = request(`${server.address}${place}`, { ca: certificate, method, headers }, (response) => {
      response.resume()
      response.on('end', () => resolve({ status: response.statusCode, headers: response.headers }))
    })
    asked.on('error', reject)
    asked.end(body === undefined ? undefined : JSON.stringify(body))
  })
}

beforeAll(async () => {
  const made = await generate([{ name: 'commonName', value: '127.0.0.1' }], {
    extensions: [{ name: 'subjectAltName', altNames: [{ type: 7, ip: '127.0.0.1' }] }],
  })
  certificate = made.cert
  writeFileSync(files.TLS_CERT, made.cert)
  writeFileSync(files.TLS_KEY, made.private)
  const url = await schemaFor(inject('databaseUrl'), 'tls')
  environment = { DATABASE_URL: url, DATA_DIR: path.join(directory, 'data'), NODE_ENV: 'test', RELAXED_DURABILITY: '1' }
  server = await startServer({ ...environment, ...files })
}, 90_000)

afterAll(async () => {
  await server.end()
  rmSync(directory, { recursive: true, force: true })
})

describe('a server with a certificate of its own', () => {
  it('prints an https address and answers at it to whoever trusts the certificate', async () => {
    expect(server.address).toMatch(/^https:/)
    expect(await ask('/api/health')).toMatchObject({
      status: 200,
      headers: { 'strict-transport-security': expect.stringMatching(/max-age/) },
    })
    // Who does not trust it is not answered; nor is http.
    await expect(fetch(`${server.address}/api/health`)).rejects.toThrow()
    await expect(fetch(`${server.address.replace('https:', 'http:')}/api/health`)).rejects.toThrow()
  })

  it('gives out its cookie for https only', async () => {
    const shop = { shopName: 'Kiln', ownerName: 'Ida Marsh', email: 'ida@kiln.example', password: 'long enough to keep' }
    const { status, headers } = await ask('/api/shops', 'POST', shop)
    expect(status).toBe(201)
    expect(headers['set-cookie']?.[0]).toMatch(/; HttpOnly; Secure/)
  })

  it('does not start with half a pair, a missing file or a key that is none, and says so', async () => {
    await expect(startServer({ ...environment, TLS_CERT: files.TLS_CERT })).rejects.toThrow('TLS_CERT and TLS_KEY go together')
    const missing = startServer({ ...environment, ...files, TLS_KEY: path.join(directory, 'nowhere.pem') })
    await expect(missing).rejects.toThrow(/TLS_KEY names .*nowhere\.pem, which can't be read/)
    const noKey = startServer({ ...environment, ...files, TLS_KEY: files.TLS_CERT })
    await expect(noKey).rejects.toThrow('TLS_CERT and TLS_KEY are not a certificate and its key, in PEM.')
  })
})

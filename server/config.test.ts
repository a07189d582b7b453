import path from 'node:path'
import { describe, expect, it } from 'vitest'
import { projectRoot, readConfig } from './config'

describe('the settings', () => {
  it('serve on loopback, port 4280, with data beside the program, when nothing is said', () => {
    expect(readConfig({})).toEqual({
      environment: 'production',
      port: 4280,
      host: '127.0.0.1',
      databaseUrl: undefined,
      dataDirectory: path.join(projectRoot, '.data'),
      secretsDirectory: path.join(projectRoot, '.data/secrets'),
      publicUrl: undefined,
      tls: undefined,
      isHttps: false,
      s3: undefined,
      mail: undefined,
      mailLeaseMilliseconds: 120_000,
      bcryptCost: 11,
      trustProxy: 0,
      relaxedDurability: false,
      logLevel: 'warn',
    })
  })

  it('know https by the address that people use, and without one by the certificate', () => {
    const pair = { TLS_CERT: '/etc/press/cert.pem', TLS_KEY: '/etc/press/key.pem' }
    expect(readConfig(pair)).toMatchObject({
      tls: { certificateFile: '/etc/press/cert.pem', keyFile: '/etc/press/key.pem' },
      isHttps: true,
    })
    expect(readConfig({ PUBLIC_URL: 'https://press.example/' }).isHttps).toBe(true)
    expect(readConfig({ PUBLIC_URL: 'http://press.example' }).isHttps).toBe(false)
    expect(() => readConfig({ TLS_KEY: '/etc/press/key.pem' })).toThrow('TLS_CERT and TLS_KEY go together: set both, or none.')
  })

  it('give durability up for tests only', () => {
    expect(readConfig({ RELAXED_DURABILITY: '1' }).relaxedDurability).toBe(false)
    expect(readConfig({ RELAXED_DURABILITY: '1', NODE_ENV: 'test' }).relaxedDurability).toBe(true)
  })

  it('name object storage by its bucket, the rest having defaults', () => {
    expect(readConfig({ S3_BUCKET: 'evidence' }).s3).toEqual({ bucket: 'evidence', endpoint: undefined, region: 'us-east-1', prefix: '' })
    const elsewhere = { S3_BUCKET: 'evidence', S3_ENDPOINT: 'http://127.0.0.1:9000', S3_REGION: 'north', S3_PREFIX: 'quarterload' }
    expect(readConfig(elsewhere).s3).toEqual({
      bucket: 'evidence',
      endpoint: 'http://127.0.0.1:9000',
      region: 'north',
      prefix: 'quarterload/',
    })
  })

  it('take an empty variable as unset', () => {
    expect(readConfig({ DATABASE_URL: '', PORT: '' })).toMatchObject({ databaseUrl: undefined, port: 4280 })
  })

  it('name each variable that makes no sense', () => {
    expect(() => readConfig({ PORT: 'http', DATABASE_URL: 'postgres://x', BCRYPT_COST: '14' })).toThrow(
      /PORT: .*\n.*DATABASE_URL: .*mariadb:\/\/.*\nBCRYPT_COST: .*between 4 and 12/,
    )
  })
})

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
      bcryptCost: 11,
      trustProxy: 0,
      logLevel: 'warn',
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

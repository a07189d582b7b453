import { spawn } from 'node:child_process'
import { existsSync, mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { projectRoot } from '#server/config'
import { startEmbeddedMariaDb } from '#server/database/embedded-mariadb'
import { createDataDirectory } from '#server/database/mariadb-process'
import { pidsWith } from './rig'

let directory: string

beforeEach(() => {
  directory = mkdtempSync(path.join(tmpdir(), 'quarterload-coming-up-'))
})
afterEach(() => {
  for (const pid of databases()) process.kill(pid, 'SIGKILL')
  rmSync(directory, { recursive: true, force: true })
})

const databases = () => pidsWith(`--datadir=${path.join(directory, 'mariadb')}`)
const options = () => ({ directory, secretsDirectory: path.join(directory, 'secrets') })

/** Another app that starts the database, killed as soon as there is a process of it: no pid file, no socket yet. */
async function killedWhileItComesUp(): Promise<void> {
  const program = `const { startEmbeddedMariaDb } = await import('./server/database/embedded-mariadb.ts')
    await startEmbeddedMariaDb(${JSON.stringify(options())})`
  const other = spawn(process.execPath, ['--import', 'tsx', '--input-type=module', '-e', program], { cwd: projectRoot, stdio: 'ignore' })
  const ended = new Promise((resolve) => other.once('exit', resolve))
  await vi.waitFor(() => expect(databases()).toHaveLength(1), { timeout: 60_000, interval: 2 })
  other.kill('SIGKILL')
  await ended
}

describe('a database whose app was killed while it was only coming up', () => {
  it('is taken over by the next start: no second one fights over its files', async () => {
    createDataDirectory(path.join(directory, 'mariadb'))
    await killedWhileItComesUp()
    const [left] = databases()
    expect(existsSync(path.join(directory, 'mariadb.pid')), 'it has not said its number yet').toBe(false)
    const database = await startEmbeddedMariaDb(options())
    expect(databases()).toEqual([left])
    expect(existsSync(path.join(directory, 'mariadb-init.sql')), 'passwords are left in no file').toBe(false)
    await database.stop()
    expect(databases()).toEqual([])
  })
})

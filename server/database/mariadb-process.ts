import { spawn, spawnSync } from 'node:child_process'
import type { ChildProcess } from 'node:child_process'
import { createHash } from 'node:crypto'
import { accessSync, constants, existsSync, mkdirSync, openSync, closeSync, readdirSync, readFileSync, renameSync, rmSync } from 'node:fs'
import { createServer } from 'node:net'
import { tmpdir } from 'node:os'
import path from 'node:path'

/** sockaddr_un holds 108 bytes with the closing zero; a longer path makes mariadbd abort. */
const longestSocketPath = 107

export function delay(milliseconds: number): Promise<void> {
  return new Promise((resolve) => {
    setTimeout(resolve, milliseconds)
  })
}

/** Beside the data where that fits, else in the temporary folder under a name that follows from the data's place. */
export function socketPathFor(directory: string): string {
  const beside = path.join(directory, 'mariadb.sock')
  if (Buffer.byteLength(beside) <= longestSocketPath) return beside
  const folder = path.join(tmpdir(), `quarterload-${createHash('sha256').update(directory).digest('hex').slice(0, 16)}`)
  mkdirSync(folder, { recursive: true, mode: 0o700 })
  return path.join(folder, 'mariadb.sock')
}

export function findProgram(name: string): string {
  const folders = [...(process.env['PATH'] ?? '').split(path.delimiter), '/usr/sbin', '/usr/local/sbin']
  for (const folder of folders) {
    const file = path.join(folder, name)
    try {
      accessSync(file, constants.X_OK)
      return file
    } catch {
      continue
    }
  }
  throw new Error(`${name} is not installed. On Debian: apt-get install --no-install-recommends mariadb-server-core mariadb-client-core`)
}

/** As root, mariadbd wants to be told that root is meant. */
export function userOptions(): string[] {
  return process.getuid?.() === 0 ? ['--user=root'] : []
}

export function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const probe = createServer()
    probe.once('error', reject)
    probe.listen(0, '127.0.0.1', () => {
      const address = probe.address()
      probe.close(() => {
        if (address === null || typeof address === 'string') reject(new Error('No free port was found.'))
        else resolve(address.port)
      })
    })
  })
}

/**
 * A temporary folder that no other mariadbd uses: one that starts deletes what it takes for its own leftovers, also from
 * under another that is at work.
 */
export function withOwnTemporaryFolder(directory: string): NodeJS.ProcessEnv {
  const folder = path.join(directory, 'tmp')
  mkdirSync(folder, { recursive: true, mode: 0o700 })
  return { ...process.env, TMPDIR: folder }
}

/** Makes the system tables beside the final place and renames them, so an interrupted start leaves nothing half-made. */
export function createDataDirectory(dataDirectory: string): void {
  if (existsSync(dataDirectory)) return
  const draft = `${dataDirectory}.new`
  rmSync(draft, { recursive: true, force: true })
  mkdirSync(draft, { recursive: true, mode: 0o700 })
  const result = spawnSync(
    findProgram('mariadb-install-db'),
    [
      '--no-defaults',
      ...userOptions(),
      `--datadir=${draft}`,
      '--auth-root-authentication-method=normal',
      '--skip-test-db',
      '--innodb-log-file-size=16M',
    ],
    { encoding: 'utf8', env: withOwnTemporaryFolder(path.dirname(dataDirectory)) },
  )
  if (result.status !== 0) throw new Error(`mariadb-install-db failed:\n${result.stdout}${result.stderr}`)
  renameSync(draft, dataDirectory)
}

export function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0)
  } catch {
    return false
  }
  // A process that has ended but was not waited for still takes signals.
  try {
    return !/^State:\s+Z/m.test(readFileSync(`/proc/${pid}/status`, 'utf8'))
  } catch {
    return true
  }
}

function isServerOf(pid: number, dataDirectory: string): boolean {
  if (!Number.isInteger(pid) || pid <= 1 || !isAlive(pid)) return false
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').split('\0').includes(`--datadir=${dataDirectory}`)
  } catch {
    return false
  }
}

function writtenPid(pidFile: string): number {
  try {
    return Number(readFileSync(pidFile, 'utf8').trim())
  } catch {
    return 0
  }
}

/**
 * The mariadbd of this data directory, if one is running; never another process that got the same number. One that is
 * only coming up has not written its number yet and is looked for among all processes.
 */
export function runningServerPid(pidFile: string, dataDirectory: string): number | undefined {
  const written = writtenPid(pidFile)
  if (isServerOf(written, dataDirectory)) return written
  return readdirSync('/proc')
    .map(Number)
    .find((pid) => isServerOf(pid, dataDirectory))
}

async function waitForEnd(pid: number, milliseconds: number): Promise<boolean> {
  const until = Date.now() + milliseconds
  while (Date.now() < until) {
    if (!isAlive(pid)) return true
    await delay(25)
  }
  return !isAlive(pid)
}

/** SIGTERM first; a mariadbd that hangs (it can, when asked during its own start) is killed. InnoDB recovers from that. */
export async function endServer(pid: number, patienceMilliseconds = 20_000): Promise<void> {
  if (!isAlive(pid)) return
  process.kill(pid, 'SIGTERM')
  if (await waitForEnd(pid, patienceMilliseconds)) return
  process.kill(pid, 'SIGKILL')
  await waitForEnd(pid, 5_000)
}

/** In a process group of its own, so that Ctrl-C reaches the app, which then stops the database in order. */
export function spawnServer(args: string[], logFile: string): ChildProcess {
  const log = openSync(logFile, 'a', 0o600)
  try {
    const child = spawn(findProgram('mariadbd'), args, {
      stdio: ['ignore', log, log],
      detached: true,
      env: withOwnTemporaryFolder(path.dirname(logFile)),
    })
    child.unref()
    return child
  } finally {
    closeSync(log)
  }
}

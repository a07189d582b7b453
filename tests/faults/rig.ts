import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import type { ChildProcess } from 'node:child_process'
import { freePort, isAlive, runningServerPid } from '#server/database/mariadb-process'
import { pauseFor, type Seeded } from '../support/seeded'
import { startServer, type ServerProcess } from '../support/server-process'
import type { Tally } from './tally'

const backWithin = 30_000

/** Every process whose command line has this word in it. */
export function pidsWith(word: string): number[] {
  return readdirSync('/proc')
    .filter((name) => /^\d+$/.test(name))
    .map(Number)
    .filter((pid) => {
      try {
        return readFileSync(`/proc/${pid}/cmdline`, 'utf8').split('\0').includes(word) && isAlive(pid)
      } catch {
        return false
      }
    })
}

async function until(condition: () => boolean | Promise<boolean>, what: string): Promise<void> {
  const end = Date.now() + backWithin
  while (!(await condition())) {
    if (Date.now() > end) throw new Error(`Not within ${backWithin / 1000} s: ${what}.`)
    await pauseFor(15)
  }
}

/**
 * The server as `npm start` runs it, with its own durable database, and whoever starts it again when it has ended:
 * nothing else is done for it, ever.
 */
export class Rig {
  private server: ServerProcess | undefined
  private child: ChildProcess | undefined
  private readonly said: string[] = []
  /** How often a start was ended by a kill. */
  cutShort = 0
  /** How often a start ended by itself, and another one had to do it. */
  failedStarts = 0

  private constructor(
    private readonly directory: string,
    private readonly port: number,
    private readonly tally: Tally,
  ) {}

  static async open(tally: Tally): Promise<Rig> {
    const rig = new Rig(mkdtempSync(path.join(tmpdir(), 'quarterload-faults-')), await freePort(), tally)
    await rig.start()
    return rig
  }

  get address(): string {
    return `http://127.0.0.1:${this.port}`
  }

  private get dataDirectory(): string {
    return path.join(this.directory, 'mariadb')
  }

  private async start(): Promise<void> {
    const environment = { DATA_DIR: this.directory, PORT: String(this.port), TRUST_PROXY: '1', RELAXED_DURABILITY: '' }
    this.server = await startServer(environment, (child) => {
      this.child = child
    })
  }

  /** The options that the running database was started with. */
  databaseOptions(): string[] {
    const pid = runningServerPid(path.join(this.directory, 'mariadb.pid'), this.dataDirectory)
    return pid === undefined ? [] : readFileSync(`/proc/${pid}/cmdline`, 'utf8').split('\0')
  }

  private async answers(): Promise<boolean> {
    try {
      return (await fetch(`${this.address}/api/health`, { signal: AbortSignal.timeout(10_000) })).status === 200
    } catch {
      return false
    }
  }

  private killServerNow(): void {
    const { server, child } = this
    if (server) this.said.push(server.output())
    this.server = undefined
    child?.kill('SIGKILL')
    this.tally.killed('server')
  }

  /** Also the one that is only just coming up, for which there is no pid file yet. */
  private async killDatabaseNow(): Promise<void> {
    let pids: number[] = []
    await until(() => (pids = pidsWith(`--datadir=${this.dataDirectory}`)).length > 0, 'a database to kill')
    for (const pid of pids) process.kill(pid, 'SIGKILL')
    this.tally.killed('database')
  }

  /** Kills the server, `again` times more while it comes up, and has it started each time. */
  async killServer(random: Seeded, again = 0): Promise<void> {
    this.killServerNow()
    await this.killWhileItStarts(random, again)
    await this.startAgain()
  }

  private async killWhileItStarts(random: Seeded, times: number): Promise<void> {
    for (let time = 0; time < times; time += 1) {
      const broken = this.start().catch(() => undefined)
      await pauseFor(random.between(200, 2200))
      this.cutShort += 1
      this.killServerNow()
      await broken
    }
  }

  private async startAgain(): Promise<void> {
    for (let tries = 1; ; tries += 1) {
      try {
        await this.start()
        break
      } catch (error) {
        this.failedStarts += 1
        this.said.push(String(error))
        if (tries === 3) throw error
      }
    }
    await until(() => this.answers(), 'the server answers')
  }

  /** Kills the database under the living server, `again` times more as soon as there is another. */
  async killDatabase(random: Seeded, again = 0): Promise<void> {
    for (let times = 0; times <= again; times += 1) {
      await this.killDatabaseNow()
      await pauseFor(random.between(0, 400))
    }
    await until(() => this.answers(), 'the server answers, with its database back')
    if (this.child?.exitCode !== null || this.child.signalCode !== null)
      throw new Error(`The server ended with its database:\n${this.server?.output() ?? ''}`)
  }

  /** As when the power goes. */
  async killBoth(random: Seeded, again = 0): Promise<void> {
    if (random.chance(0.5)) {
      this.killServerNow()
      await this.killDatabaseNow()
    } else {
      await this.killDatabaseNow()
      this.killServerNow()
    }
    await this.killWhileItStarts(random, again)
    await this.startAgain()
  }

  /** What the server called an error, over all its lives. */
  errors(): string[] {
    return [...this.said, this.server?.output() ?? ''].flatMap((text) =>
      text.split('\n').filter((line) => /"level":(50|60)|Unhandled|uncaught/i.test(line)),
    )
  }

  async close(): Promise<void> {
    await this.server?.end()
    for (const pid of pidsWith(`--datadir=${this.dataDirectory}`)) process.kill(pid, 'SIGKILL')
    rmSync(this.directory, { recursive: true, force: true })
  }
}

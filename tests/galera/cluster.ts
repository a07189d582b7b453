import { spawn, spawnSync } from 'node:child_process'
import type { ChildProcess } from 'node:child_process'
import { closeSync, existsSync, mkdirSync, openSync, readFileSync } from 'node:fs'
import path from 'node:path'
import { createConnection } from 'mariadb'
import type { Connection } from 'mariadb'
import { createDataDirectory, delay, findProgram, freePort, isAlive, withOwnTemporaryFolder } from '#server/database/mariadb-process'
import type { Installed } from './packages'

export const account = { user: 'quarterload', password: 'for-this-run-only', database: 'quarterload' }
const readyWithin = 90_000

/** As root the transfer between nodes would be received by a daemon that gives its rights up: the nodes run as nobody. */
const nobody = process.getuid?.() === 0 ? { uid: 65_534, gid: 65_534 } : {}

function giveTo(identity: { uid?: number; gid?: number }, directory: string): void {
  if (identity.uid === undefined) return
  const { status, stderr } = spawnSync('chown', ['-R', `${identity.uid}:${identity.gid ?? identity.uid}`, directory], { encoding: 'utf8' })
  if (status !== 0) throw new Error(`chown failed: ${stderr}`)
}

interface Ports {
  sql: number
  group: number
  incremental: number
  transfer: number
}

/** One mariadbd of the cluster, durable as a node of a shop would be. */
export class Node {
  private child: ChildProcess | undefined
  /** How much it had logged before it was started last. */
  private logBefore = 0

  constructor(
    readonly name: string,
    private readonly directory: string,
    readonly ports: Ports,
    private readonly installed: Installed,
    private readonly members: () => Node[],
  ) {}

  private get dataDirectory(): string {
    return path.join(this.directory, 'data')
  }

  private get logFile(): string {
    return path.join(this.directory, 'mariadbd.log')
  }

  /** What it was given by the others when it was started last: the transactions it lacked, or all of their data. */
  lastTransfer(): string {
    const found = /IST uuid:\S+ f: (\d+), l: (\d+)/.exec(readFileSync(this.logFile, 'utf8').slice(this.logBefore))
    const [from, to] = [Number(found?.[1] ?? 0), Number(found?.[2] ?? 0)]
    return from > 0 ? `the ${to - from + 1} transactions it lacked` : 'all the data'
  }

  log(): string {
    return existsSync(this.logFile) ? readFileSync(this.logFile, 'utf8').split('\n').slice(-40).join('\n') : ''
  }

  private options(): string[] {
    return [
      '--no-defaults',
      `--datadir=${this.dataDirectory}`,
      `--socket=${path.join(this.directory, 'sql.sock')}`,
      `--pid-file=${path.join(this.directory, 'mariadbd.pid')}`,
      '--bind-address=127.0.0.1',
      `--port=${this.ports.sql}`,
      '--skip-name-resolve',
      '--character-set-server=utf8mb4',
      '--collation-server=utf8mb4_unicode_ci',
      '--default-time-zone=+00:00',
      '--innodb-log-file-size=16M',
      '--innodb-buffer-pool-size=64M',
      '--innodb-flush-log-at-trx-commit=1',
      '--innodb-autoinc-lock-mode=2',
      '--binlog-format=ROW',
      '--wsrep-on=ON',
      `--wsrep-provider=${this.installed.provider}`,
      `--wsrep-provider-options=base_host=127.0.0.1;base_port=${this.ports.group};gmcast.listen_addr=tcp://127.0.0.1:${this.ports.group};ist.recv_addr=127.0.0.1:${this.ports.incremental};gcache.size=64M`,
      '--wsrep-cluster-name=quarterload-test',
      `--wsrep-node-name=${this.name}`,
      `--wsrep-node-address=127.0.0.1:${this.ports.group}`,
      '--wsrep-sst-method=rsync',
      `--wsrep-sst-receive-address=127.0.0.1:${this.ports.transfer}`,
    ]
  }

  private environment(): NodeJS.ProcessEnv {
    return { ...withOwnTemporaryFolder(this.directory), PATH: `${this.installed.scripts}:${process.env['PATH'] ?? ''}:/usr/sbin:/sbin` }
  }

  /** After a crash the node's place in the cluster's history is in its own log files: read as Debian's service reads it. */
  private recoveredPosition(): string[] {
    const found = spawnSync(findProgram('mariadbd'), [...this.options(), '--wsrep-recover', '--wsrep-cluster-address=gcomm://'], {
      encoding: 'utf8',
      env: this.environment(),
      ...nobody,
    })
    const position = /WSREP: Recovered position:?\s*([0-9a-f-]+:-?\d+)/.exec(`${found.stdout}${found.stderr}`)?.[1]
    return position === undefined ? [] : [`--wsrep-start-position=${position}`]
  }

  /** Starts it: the first of all founds the cluster, any other joins, and takes what it lacks from the others. */
  async start({ founds = false, returns = false } = {}): Promise<void> {
    mkdirSync(this.directory, { recursive: true, mode: 0o700 })
    if (!returns) createDataDirectory(this.dataDirectory)
    giveTo(nobody, this.directory)
    const others = this.members().map((node) => `127.0.0.1:${node.ports.group}`)
    const address = founds ? 'gcomm://' : `gcomm://${others.join(',')}`
    const position = returns ? this.recoveredPosition() : []
    this.logBefore = existsSync(this.logFile) ? readFileSync(this.logFile, 'utf8').length : 0
    const log = openSync(this.logFile, 'a', 0o600)
    try {
      this.child = spawn(findProgram('mariadbd'), [...this.options(), ...position, `--wsrep-cluster-address=${address}`], {
        stdio: ['ignore', log, log],
        env: this.environment(),
        ...nobody,
      })
    } finally {
      closeSync(log)
    }
    await this.synced(founds)
  }

  private async synced(founds: boolean): Promise<void> {
    const until = Date.now() + readyWithin
    while (Date.now() < until) {
      if (!this.isRunning()) break
      try {
        const connection = await this.connect(founds)
        try {
          const rows: { Value: string }[] = await connection.query("SHOW GLOBAL STATUS LIKE 'wsrep_local_state_comment'")
          if (rows[0]?.Value === 'Synced') return
        } finally {
          await connection.end()
        }
      } catch {
        // Not yet.
      }
      await delay(100)
    }
    throw new Error(`Node ${this.name} did not come up:\n${this.log()}`)
  }

  /** As root by the socket before there is an account, else as the app connects. */
  connect(asRoot = false): Promise<Connection> {
    return asRoot
      ? createConnection({ socketPath: path.join(this.directory, 'sql.sock'), user: 'root', connectTimeout: 2_000 })
      : createConnection({ host: '127.0.0.1', port: this.ports.sql, ...account, connectTimeout: 2_000 })
  }

  /** No goodbye: as when the power of its machine fails. */
  async kill(): Promise<void> {
    const pid = this.child?.pid
    if (pid === undefined) throw new Error(`Node ${this.name} is not running.`)
    process.kill(pid, 'SIGKILL')
    while (isAlive(pid)) await delay(10)
    this.child = undefined
  }

  isRunning(): boolean {
    return this.child?.pid !== undefined && isAlive(this.child.pid)
  }

  async stop(): Promise<void> {
    const pid = this.child?.pid
    if (pid === undefined || !isAlive(pid)) return
    process.kill(pid, 'SIGTERM')
    const until = Date.now() + 20_000
    while (isAlive(pid) && Date.now() < until) await delay(50)
    if (isAlive(pid)) process.kill(pid, 'SIGKILL')
  }
}

export class Cluster {
  readonly nodes: Node[] = []

  constructor(
    private readonly directory: string,
    private readonly installed: Installed,
  ) {}

  async start(): Promise<void> {
    giveTo(nobody, this.directory)
    for (const name of ['one', 'two', 'three']) {
      const ports = { sql: await freePort(), group: await freePort(), incremental: await freePort(), transfer: await freePort() }
      this.nodes.push(new Node(name, path.join(this.directory, name), ports, this.installed, () => this.nodes))
    }
    const [first, ...others] = this.nodes
    if (first === undefined) throw new Error('A cluster has nodes.')
    await first.start({ founds: true })
    const connection = await first.connect(true)
    try {
      await connection.query(`CREATE DATABASE ${account.database} CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci`)
      await connection.query(`CREATE USER '${account.user}'@'127.0.0.1' IDENTIFIED BY '${account.password}'`)
      await connection.query(`GRANT ALL PRIVILEGES ON ${account.database}.* TO '${account.user}'@'127.0.0.1'`)
    } finally {
      await connection.end()
    }
    for (const node of others) await node.start()
  }

  get url(): string {
    const hosts = this.nodes.map((node) => `127.0.0.1:${node.ports.sql}`).join(',')
    return `mariadb://${account.user}:${account.password}@${hosts}/${account.database}`
  }

  async stop(): Promise<void> {
    for (const node of [...this.nodes].reverse()) await node.stop()
  }
}

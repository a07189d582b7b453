import { spawn } from 'node:child_process'
import type { ChildProcess } from 'node:child_process'
import { projectRoot } from '#server/config'

const readyWithinMilliseconds = 90_000

export interface ServerProcess {
  address: string
  process: ChildProcess
  /** Everything it printed so far. */
  output(): string
  /** Sends the signal and waits for the end; returns the exit code, null after SIGKILL. */
  end(signal?: NodeJS.Signals): Promise<number | null>
}

function ended(child: ChildProcess): Promise<number | null> {
  if (child.exitCode !== null || child.signalCode !== null) return Promise.resolve(child.exitCode)
  return new Promise((resolve) => {
    child.once('exit', (code) => resolve(code))
  })
}

/** The server as `npm start` runs it, on a free port unless PORT is given. Resolves once it has printed its address. */
export async function startServer(environment: Record<string, string>, spawned?: (child: ChildProcess) => void): Promise<ServerProcess> {
  // The tests' shared database gives durability up for speed; a server says so at its start and is told that this is meant.
  const relaxed = (environment['DATABASE_URL'] ?? '') === '' ? {} : { NODE_ENV: 'test', RELAXED_DURABILITY: '1' }
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/index.ts'], {
    cwd: projectRoot,
    env: {
      ...process.env,
      NODE_ENV: 'production',
      BCRYPT_COST: '4',
      DATABASE_URL: '',
      PUBLIC_URL: '',
      HOST: '127.0.0.1',
      PORT: '0',
      ...relaxed,
      ...environment,
    },
    stdio: ['ignore', 'pipe', 'pipe'],
  })
  spawned?.(child)
  let printed = ''
  const address = await new Promise<string>((resolve, reject) => {
    const tooLate = setTimeout(() => {
      child.kill('SIGTERM')
      reject(new Error(`The server was not ready in time:\n${printed}`))
    }, readyWithinMilliseconds)
    const read = (chunk: Buffer) => {
      printed += chunk.toString('utf8')
      const found = /https?:\/\/\S+:\d+/.exec(printed)
      if (found === null) return
      clearTimeout(tooLate)
      resolve(found[0])
    }
    child.stdout.on('data', read)
    child.stderr.on('data', read)
    child.once('exit', (code) => {
      clearTimeout(tooLate)
      reject(new Error(`The server ended with ${String(code)}:\n${printed}`))
    })
  })
  return {
    address,
    process: child,
    output: () => printed,
    end: (signal = 'SIGTERM') => {
      const end = ended(child)
      child.kill(signal)
      return end
    },
  }
}

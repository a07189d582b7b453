import { Worker } from 'node:worker_threads'

type Job = { password: string } & ({ cost: number } | { hash: string })
interface Waiting {
  resolve(result: string | boolean): void
  reject(error: Error): void
}

/** One thread, started by the first password and let go when the program ends. */
class PasswordThread {
  private worker: Worker | undefined
  private readonly waiting = new Map<number, Waiting>()
  private lastId = 0

  run(job: Job): Promise<string | boolean> {
    const worker = (this.worker ??= this.start())
    const id = (this.lastId += 1)
    worker.ref()
    return new Promise((resolve, reject) => {
      this.waiting.set(id, { resolve, reject })
      worker.postMessage({ id, ...job })
    })
  }

  private start(): Worker {
    const worker = new Worker(new URL('./password-worker.mjs', import.meta.url), { execArgv: [] })
    worker.on('message', ({ id, result }: { id: number; result: string | boolean }) => {
      this.waiting.get(id)?.resolve(result)
      this.waiting.delete(id)
      if (this.waiting.size === 0) worker.unref()
    })
    worker.on('error', (error: Error) => {
      for (const one of this.waiting.values()) one.reject(error)
      this.waiting.clear()
      this.worker = undefined
    })
    return worker
  }
}

const thread = new PasswordThread()

export async function hashPassword(password: string, cost: number): Promise<string> {
  return String(await thread.run({ password, cost }))
}

/** Some hash at each cost, for comparing against when there is no account: an unknown address takes as long as a known one. */
const dummies = new Map<number, Promise<string>>()

export async function comparePassword(password: string, hash: string | undefined, cost: number): Promise<boolean> {
  if (hash !== undefined) return (await thread.run({ password, hash })) === true
  let dummy = dummies.get(cost)
  if (dummy === undefined) {
    dummy = hashPassword('no account has this password', cost)
    dummies.set(cost, dummy)
  }
  await thread.run({ password, hash: await dummy })
  return false
}

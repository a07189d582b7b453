import type { Connection } from 'mariadb'
import { delay } from './mariadb-process'

export interface KeepRunning {
  /** The connection that says, by ending, that the database is gone. */
  first: Connection
  /** Brings the database back and gives a connection to it; throws when it can't yet. */
  bringBack(): Promise<Connection>
  /** What whoever looks after the server should read. */
  report(sentence: string, cause?: unknown): void
}

export interface Kept {
  /** Ends the watch and gives the connection that stands, if any; nothing is brought back afterwards. */
  release(): Promise<Connection | undefined>
}

const shortestWait = 50
const longestWait = 5_000

/**
 * Watches the database from a connection that is held open for nothing else, and brings it back without a hand when it
 * is lost: at once, then after longer and longer waits, for as long as the app runs. Requests fail meanwhile with
 * "try again", and what people enter waits on their devices.
 */
export function keepRunning({ first, bringBack, report }: KeepRunning): Kept {
  let current: Connection | undefined
  let released = false
  let returning: Promise<void> | undefined

  function watch(connection: Connection): void {
    current = connection
    const lost = () => {
      if (current !== connection) return
      current = undefined
      if (!released) returning = comeBack()
    }
    connection.on('error', lost)
    connection.on('end', lost)
    // It may have ended between its first answer and here.
    if (!connection.isValid()) lost()
  }

  async function comeBack(): Promise<void> {
    report('The database was lost. It is being started again.')
    for (let wait = shortestWait; !released; wait = Math.min(2 * wait, longestWait)) {
      try {
        const connection = await bringBack()
        report('The database is back.')
        return watch(connection)
      } catch (error) {
        report('The database did not come back yet.', error)
        await delay(wait)
      }
    }
  }

  watch(first)
  return {
    async release() {
      released = true
      await returning
      return current
    },
  }
}

import { EventEmitter } from 'node:events'
import type { Connection } from 'mariadb'
import { describe, expect, it, vi } from 'vitest'
import { keepRunning } from './keep-running'

/** As much of a connection as the watch looks at. */
class Line extends EventEmitter {
  valid = true
  isValid = () => this.valid
  break(): void {
    this.valid = false
    this.emit('error', new Error('read ECONNRESET'))
    this.emit('end')
  }
}
const connection = (line: Line) => line as unknown as Connection

function watched(bringBack: () => Promise<Line>) {
  const first = new Line()
  const said: string[] = []
  const asked = vi.fn(bringBack)
  const kept = keepRunning({
    first: connection(first),
    bringBack: async () => connection(await asked()),
    report: (text) => said.push(text),
  })
  return { first, said, asked, kept }
}

describe('the watch over the database', () => {
  it('brings it back once for each loss, however the loss shows', async () => {
    const lines = [new Line(), new Line()]
    let next = 0
    const { first, said, asked, kept } = watched(() => Promise.resolve(lines[next++] ?? new Line()))
    first.break()
    await vi.waitFor(() => expect(said).toHaveLength(2))
    lines[0]?.break()
    await vi.waitFor(() => expect(said).toHaveLength(4))
    expect(asked).toHaveBeenCalledTimes(2)
    expect(await kept.release()).toBe(lines[1])
  })

  it('tries again until it is back, and says each time that it is not', async () => {
    let tries = 0
    const { first, said, kept } = watched(() =>
      (tries += 1) < 3 ? Promise.reject(new Error('no room on the disk')) : Promise.resolve(new Line()),
    )
    first.break()
    await vi.waitFor(() => expect(said.at(-1)).toBe('The database is back.'))
    expect(said.filter((text) => text.includes('did not come back yet'))).toHaveLength(2)
    await kept.release()
  })

  it('notices a connection that ended before it was watched', async () => {
    const dead = new Line()
    dead.valid = false
    const lines = [dead, new Line()]
    const { first, asked, kept } = watched(() => Promise.resolve(lines.shift() ?? new Line()))
    first.break()
    await vi.waitFor(() => expect(asked).toHaveBeenCalledTimes(2))
    await kept.release()
  })

  it('brings nothing back once it is released', async () => {
    const { first, asked, kept } = watched(() => Promise.resolve(new Line()))
    expect(await kept.release()).toBe(first)
    first.break()
    await new Promise((resolve) => setTimeout(resolve, 20))
    expect(asked).not.toHaveBeenCalled()
  })

  it('waits, when released in between, for a start that is under way, so that nothing is left running', async () => {
    const back = new Line()
    let finish = (): void => undefined
    const { first, asked, kept } = watched(() => new Promise((resolve) => (finish = () => resolve(back))))
    first.break()
    await vi.waitFor(() => expect(asked).toHaveBeenCalled())
    const released = kept.release()
    await new Promise((resolve) => setTimeout(resolve, 5))
    finish()
    expect(await released).toBe(back)
  })
})

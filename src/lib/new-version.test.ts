// @vitest-environment jsdom
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { NewVersion } from './new-version'

class Worker extends EventTarget {
  readonly told: unknown[] = []
  constructor(public state: ServiceWorkerState) {
    super()
  }
  become(state: ServiceWorkerState): void {
    this.state = state
    this.dispatchEvent(new Event('statechange'))
  }
  postMessage(message: unknown): void {
    this.told.push(message)
  }
}

class Registration extends EventTarget {
  active: Worker | null = null
  installing: Worker | null = null
  waiting: Worker | null = null
  update = vi.fn(() => Promise.resolve())
  find(worker: Worker): void {
    this.installing = worker
    this.dispatchEvent(new Event('updatefound'))
  }
}

let registration: Registration
const reload = vi.fn()
const settle = () => new Promise((resolve) => setTimeout(resolve, 0))

beforeEach(() => {
  registration = new Registration()
  reload.mockClear()
  vi.stubGlobal('isSecureContext', true)
  const container = { register: () => Promise.resolve(registration), getRegistration: () => Promise.resolve(registration) }
  Object.defineProperty(navigator, 'serviceWorker', { value: container, configurable: true })
})
afterEach(() => {
  vi.unstubAllGlobals()
  Reflect.deleteProperty(navigator, 'serviceWorker')
})

describe('a new version', () => {
  it('is none when the program is kept on this device for the first time', async () => {
    const version = new NewVersion(reload)
    await version.watch()
    const first = new Worker('installing')
    registration.find(first)
    first.become('installed')
    await settle()
    expect(version.isReady()).toBe(false)
  })

  it('is ready once all of it is here, and does nothing by itself', async () => {
    registration.active = new Worker('activated')
    const version = new NewVersion(reload)
    await version.watch()
    const next = new Worker('installing')
    registration.find(next)
    await settle()
    expect(version.isReady()).toBe(false)
    next.become('installed')
    await settle()
    expect(version.isReady()).toBe(true)
    expect(next.told).toEqual([])
    expect(reload).not.toHaveBeenCalled()
  })

  it('that waited since an earlier page is found again', async () => {
    registration.active = new Worker('activated')
    registration.waiting = new Worker('installed')
    const version = new NewVersion(reload)
    await version.watch()
    await settle()
    expect(version.isReady()).toBe(true)
  })

  it('is taken into use when asked for, and the page is loaded again after that, not before', async () => {
    registration.active = new Worker('activated')
    const next = new Worker('installed')
    registration.waiting = next
    const version = new NewVersion(reload)
    const loading = version.load()
    await settle()
    expect(next.told).toEqual([{ type: 'SKIP_WAITING' }])
    expect(reload).not.toHaveBeenCalled()
    next.become('activated')
    await loading
    expect(reload).toHaveBeenCalledOnce()
  })

  it('that cannot be had loads the page as it is', async () => {
    registration.active = new Worker('activated')
    registration.update.mockRejectedValue(new TypeError('Failed to fetch'))
    await new NewVersion(reload).load()
    expect(reload).toHaveBeenCalledOnce()
  })
})

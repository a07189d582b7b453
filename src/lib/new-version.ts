/** How often a page that stays open asks for a newer version (ms). */
const ASK_EVERY = 15 * 60_000

const workers = (): ServiceWorkerContainer | undefined => ('serviceWorker' in navigator ? navigator.serviceWorker : undefined)

/** Resolves when a worker has come so far; rejects when it was thrown away. */
function reaches(worker: ServiceWorker, state: ServiceWorkerState): Promise<void> {
  return new Promise((resolve, reject) => {
    const look = (): void => {
      if (worker.state === state) resolve()
      else if (worker.state === 'redundant') reject(new Error('This version was replaced before it was used.'))
      else return
      worker.removeEventListener('statechange', look)
    }
    worker.addEventListener('statechange', look)
    look()
  })
}

/**
 * The version of the program that this device has fetched and not begun to use. It is used when somebody asks for it, or
 * when the last page of the old one is closed; never by itself.
 */
export class NewVersion {
  private readonly listeners = new Set<() => void>()
  private readonly reload: () => void
  private ready = false

  constructor(reload: () => void) {
    this.reload = reload
  }

  subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener)
    return () => this.listeners.delete(listener)
  }

  /** Whether there is one. */
  isReady = (): boolean => this.ready

  /** Installs the worker that keeps the program on this device, and listens for newer ones. */
  async watch(): Promise<void> {
    const container = workers()
    if (!container || !window.isSecureContext) return
    const registration = (await container.register('/sw.js', { updateViaCache: 'none' }).catch(() => undefined)) as
      ServiceWorkerRegistration | undefined
    // A browser may forbid it, as in a private window: the program then needs its network.
    if (!registration) return
    const look = (worker: ServiceWorker | null): void => {
      if (!worker || !registration.active) return
      reaches(worker, 'installed').then(
        () => this.say(true),
        () => undefined,
      )
    }
    look(registration.waiting ?? registration.installing)
    registration.addEventListener('updatefound', () => look(registration.installing))
    const ask = (): void => {
      if (document.visibilityState === 'visible') registration.update().catch(() => undefined)
    }
    setInterval(ask, ASK_EVERY)
    window.addEventListener('online', ask)
    document.addEventListener('visibilitychange', ask)
  }

  /** Takes the worker away; what it kept stays until the browser needs the room. */
  async unregister(): Promise<void> {
    const registration = await workers()?.getRegistration()
    await registration?.unregister()
  }

  /** Loads the page again in the newest version there is; in the same one when nothing newer can be had. */
  async load(): Promise<void> {
    try {
      const registration = await workers()?.getRegistration()
      if (!registration?.waiting) await registration?.update().catch(() => undefined)
      const next = registration?.waiting ?? registration?.installing
      if (next && registration?.active) {
        await reaches(next, 'installed')
        next.postMessage({ type: 'SKIP_WAITING' })
        await reaches(next, 'activated')
      }
    } finally {
      this.reload()
    }
  }

  private say(ready: boolean): void {
    this.ready = ready
    for (const listener of this.listeners) listener()
  }
}

/** The newer version of this page, if there is one. */
export const newVersion = new NewVersion(() => window.location.reload())

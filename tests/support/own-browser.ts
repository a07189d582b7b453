import { mkdtempSync, readlinkSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { chromium, type BrowserContext, type Page } from 'playwright-core'
import { listenTo, serverAddress } from './browser'

const GONE_WITHIN = 10_000

/** A browser with a disk of its own that can be killed and switched on again, as a tablet whose battery dies. */
export class OwnBrowser {
  private readonly profile = mkdtempSync(path.join(tmpdir(), 'quarterload-tablet-'))
  private context: BrowserContext | null = null

  /** Starts the browser on what its disk holds; its service worker is let in. */
  async switchOn({ offline = false } = {}): Promise<Page> {
    const context = await chromium.launchPersistentContext(this.profile, {
      executablePath: '/usr/bin/chromium',
      args: ['--no-sandbox', '--disable-background-networking', '--hide-crash-restore-bubble'],
      baseURL: serverAddress(),
      locale: 'en-GB',
      timezoneId: 'UTC',
      viewport: { width: 1180, height: 820 },
      serviceWorkers: 'allow',
    })
    this.context = context
    context.on('page', listenTo)
    await context.setOffline(offline)
    const [page] = context.pages()
    if (!page) return context.newPage()
    listenTo(page)
    return page
  }

  /** SIGKILL to the browser: nothing of it gets to write another word. */
  async die(): Promise<void> {
    const { context } = this
    if (!context) return
    const closed = new Promise<void>((resolve) => context.once('close', () => resolve()))
    process.kill(this.pid(), 'SIGKILL')
    await Promise.race([closed, new Promise((resolve) => setTimeout(resolve, GONE_WITHIN))])
    this.context = null
  }

  async throwAway(): Promise<void> {
    await this.context?.close()
    rmSync(this.profile, { recursive: true, force: true, maxRetries: 5 })
  }

  /** The browser names itself in the lock of its profile: "host-1234". */
  private pid(): number {
    return Number(/-(\d+)$/.exec(readlinkSync(path.join(this.profile, 'SingletonLock')))?.[1])
  }
}

import { headsEventSchema } from '#shared/api/stream'

export interface StreamEvent {
  event: string
  data: unknown
  /** Since the stream was opened (ms). */
  at: number
}

/** A stream as a browser reads it, kept open until `close`. */
export class EventStream {
  readonly events: StreamEvent[] = []
  readonly ended: Promise<void>
  private readonly controller: AbortController
  private readonly begun = performance.now()

  private constructor(
    readonly response: Response,
    controller: AbortController,
  ) {
    this.controller = controller
    this.ended = this.read()
  }

  static async open(url: string, headers: Record<string, string>): Promise<EventStream> {
    const controller = new AbortController()
    return new EventStream(await fetch(url, { headers, signal: controller.signal }), controller)
  }

  private async read(): Promise<void> {
    const { body } = this.response
    if (body === null) return
    let text = ''
    try {
      for await (const chunk of body.pipeThrough(new TextDecoderStream())) {
        text += chunk
        for (let end = text.indexOf('\n\n'); end >= 0; end = text.indexOf('\n\n')) {
          this.take(text.slice(0, end))
          text = text.slice(end + 2)
        }
      }
    } catch (error) {
      if (!this.controller.signal.aborted) throw error
    }
  }

  private take(block: string): void {
    const fields = new Map(block.split('\n').map((line): [string, string] => [line.replace(/:.*/, ''), line.replace(/^[^:]*: ?/, '')]))
    this.events.push({
      event: fields.get('event') ?? 'message',
      data: JSON.parse(fields.get('data') ?? 'null'),
      at: performance.now() - this.begun,
    })
  }

  /** The heads told so far, the latest of each ledger. */
  heads(): Record<string, number> {
    const told = this.events.filter(({ event }) => event === 'heads').map(({ data }) => headsEventSchema.parse(data).heads)
    return Object.assign({}, ...told) as Record<string, number>
  }

  /** Waits until the events hold what is looked for; returns how long that took (ms). */
  async until(holds: (stream: this) => boolean, milliseconds = 3_000): Promise<number> {
    const begun = performance.now()
    while (!holds(this)) {
      if (performance.now() - begun > milliseconds) throw new Error(`Not within ${milliseconds} ms: ${JSON.stringify(this.events)}`)
      await new Promise((resolve) => {
        setTimeout(resolve, 5)
      })
    }
    return performance.now() - begun
  }

  async close(): Promise<void> {
    this.controller.abort()
    await this.ended
  }
}

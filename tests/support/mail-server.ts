import type { AddressInfo } from 'node:net'
import { SMTPServer } from 'smtp-server'

export interface Received {
  messageId: string
  to: string[]
  /** The whole message as it came over the wire. */
  raw: string
}

export interface MailServer {
  /** For SMTP_URL. */
  url: string
  received: Received[]
  /** What becomes of the next letters: taken, refused for now, refused for good at the recipient, or held without an answer. */
  mood: 'take' | 'refuse for now' | 'refuse for good' | 'hold'
  /** Called when a letter has come whole, before it is answered for. */
  onLetter: (received: Received) => void
  /** Takes the letters that are held. */
  answerHeld(): void
  close(): Promise<void>
}

class Refusal extends Error {
  constructor(
    readonly responseCode: number,
    message: string,
  ) {
    super(message)
  }
}

/** A mail server of the test's own on loopback, that speaks SMTP without a password. */
export async function startMailServer(): Promise<MailServer> {
  const state: Pick<MailServer, 'received' | 'mood' | 'onLetter'> = { received: [], mood: 'take', onLetter: () => undefined }
  const held: (() => void)[] = []
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    logger: false,
    onRcptTo(_address, _session, answer) {
      answer(state.mood === 'refuse for good' ? new Refusal(550, 'No such mailbox') : null)
    },
    onData(stream, session, answer) {
      const chunks: Buffer[] = []
      stream.on('data', (chunk: Buffer) => chunks.push(chunk))
      stream.on('end', () => {
        if (state.mood === 'refuse for now') return answer(new Refusal(451, 'Come back later'))
        const raw = Buffer.concat(chunks).toString('utf8')
        const messageId = /^Message-ID: (\S+)/im.exec(raw)?.[1] ?? ''
        const received = { messageId, to: session.envelope.rcptTo.map(({ address }) => address), raw }
        state.received.push(received)
        state.onLetter(received)
        if (state.mood === 'hold') held.push(answer)
        else answer()
      })
    },
  })
  // A client that is killed leaves its connection broken; that is what some tests are about.
  server.on('error', () => undefined)
  await new Promise<void>((resolve) => {
    server.listen(0, '127.0.0.1', resolve)
  })
  const { port } = server.server.address() as AddressInfo
  return Object.assign(state, {
    url: `smtp://127.0.0.1:${port}?ignoreTLS=true`,
    answerHeld: () => held.splice(0).forEach((answer) => answer()),
    close: () =>
      new Promise<void>((resolve) => {
        server.close(() => resolve())
      }),
  })
}

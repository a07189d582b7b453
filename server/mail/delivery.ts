import { createTransport } from 'nodemailer'
import type { Config } from '../config'

/** A letter as it leaves. */
export interface Envelope {
  /** The same at each try, so that who gets it twice sees one. */
  messageId: string
  to: string
  subject: string
  text: string
  html: string
}

export interface Delivery {
  /** Whether the letter is only ever read here, so that its link must stay in it. */
  readonly isTray: boolean
  /** What stands behind the @ of a Message-ID. */
  readonly domain: string
  /** Resolves once somebody else answers for the letter. */
  deliver(envelope: Envelope): Promise<void>
  close(): void
}

/** Will never be taken, however often it is tried. */
export class Undeliverable extends Error {}

/** Without a mail server letters lie in the tray, where the shop's owner reads them: delivered is kept. */
const tray: Delivery = { isTray: true, domain: 'quarterload.invalid', deliver: () => Promise.resolve(), close: () => undefined }

/** Together well below a lease, so that no letter is tried by two servers while both are alive. */
const timeouts = { dnsTimeout: 10_000, connectionTimeout: 10_000, greetingTimeout: 10_000, socketTimeout: 20_000 }

interface SmtpError extends Error {
  code?: string
  responseCode?: number
}

/** The mail server refuses this recipient or letter for good (RFC 5321 4.2.1, 5yz); a wrong password of ours is not that. */
const isForGood = ({ code, responseCode = 0 }: SmtpError): boolean => responseCode >= 500 && (code === 'EENVELOPE' || code === 'EMESSAGE')

function smtp({ url, from }: NonNullable<Config['mail']>): Delivery {
  const transport = createTransport({ url, ...timeouts, disableFileAccess: true, disableUrlAccess: true })
  return {
    isTray: false,
    domain: /@([^@>\s]+)>?\s*$/.exec(from)?.[1] ?? 'quarterload.invalid',
    async deliver(envelope) {
      try {
        // RFC 3834: nobody's holiday notice need answer it.
        await transport.sendMail({ ...envelope, from, headers: { 'Auto-Submitted': 'auto-generated' } })
      } catch (error) {
        if (error instanceof Error && isForGood(error)) throw new Undeliverable(error.message, { cause: error })
        throw error
      }
    },
    close: () => transport.close(),
  }
}

export function openDelivery({ mail }: Pick<Config, 'mail'>): Delivery {
  return mail === undefined ? tray : smtp(mail)
}

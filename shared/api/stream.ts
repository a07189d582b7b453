import { z } from 'zod'
import { idSchema } from './common'

/** Ledgers that one stream may watch. */
export const MOST_WATCHED = 50

/** `?ledgers=id,id`: what the stream is to tell about. */
export const streamQuerySchema = z.object({
  ledgers: z
    .string('Name the ledgers: ?ledgers=…')
    .transform((text) => [...new Set(text.split(',').filter((part) => part !== ''))])
    .pipe(
      z.array(idSchema).min(1, 'Name the ledgers: ?ledgers=…').max(MOST_WATCHED, `At most ${MOST_WATCHED} ledgers fit into one stream.`),
    ),
})

/** Event `heads`: the number of the last entry of each ledger that has moved; of all that are watched in the first. */
export const headsEventSchema = z.object({ heads: z.record(z.string(), z.int().min(0)) })
export type HeadsEvent = z.infer<typeof headsEventSchema>

/** The other events carry nothing: `beat` says that the stream stands, `signed-out` that the session has ended. */
export const STREAM_EVENTS = { heads: 'heads', beat: 'beat', signedOut: 'signed-out' } as const

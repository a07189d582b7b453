import { z } from 'zod'
import { idSchema } from './common'

const day = z.iso.date()

/** What falls due in a shop, the earliest first. */
export const calendarItemSchema = z.discriminatedUnion('kind', [
  z.object({
    kind: z.literal('calibration'),
    on: day,
    instrumentId: idSchema,
    code: z.string(),
    instrumentKind: z.enum(['gauge', 'load-cell', 'indicator']),
  }),
  /** The day a clearance runs until: examination and, where the shop's protocol asks, another proof test. */
  z.object({ kind: z.literal('clearance'), on: day, pressId: idSchema, pressName: z.string() }),
  /** Joints of a press that fell back and that its clearance waits for, since the day they did. */
  z.object({ kind: z.literal('examination'), on: day, pressId: idSchema, pressName: z.string(), joints: z.string() }),
  /** A test that went wrong and has not been repeated, from the day it was concluded. */
  z.object({ kind: z.literal('retest'), on: day, pressId: idSchema, pressName: z.string(), number: z.string() }),
])

/** GET /api/calendar?shop=&from=&to= */
export const calendarQuerySchema = z.object({ shop: idSchema, from: day, to: day })
export const calendarSchema = z.object({ items: z.array(calendarItemSchema) })

/**
 * POST /api/calendar/feed?shop= makes an address for a calendar program to follow, and ends the one before; DELETE ends it.
 * The address is a secret: whoever has it reads the due dates. GET /api/calendar/:token.ics is RFC 5545.
 */
export const calendarFeedSchema = z.object({ address: z.url().nullable() })

export type CalendarItem = z.infer<typeof calendarItemSchema>
export type Calendar = z.infer<typeof calendarSchema>
export type CalendarFeed = z.infer<typeof calendarFeedSchema>

import { z } from 'zod'
import { idSchema, timeSchema } from './common'
import { pressRowSchema } from './presses'
import { testRowSchema } from './proof-tests'

/** How far ahead the scale of due dates reaches. */
export const WEEKS_AHEAD = 14
/** What falls due within so many days needs somebody now; the rest only stands on the scale. */
export const SOON_DAYS = 30

/** GET /api/today?shop=&day= — `day` is the reader's calendar date, because a shop's days are not the server's. */
export const todayQuerySchema = z.object({ shop: idSchema, day: z.iso.date().optional() })

const day = z.iso.date()
const test = { proofTestId: idSchema, number: z.string(), pressName: z.string(), protocolName: z.string() }
const instrument = { instrumentId: idSchema, code: z.string(), instrumentKind: z.enum(['gauge', 'load-cell', 'indicator']) }
const press = { pressId: idSchema, pressName: z.string() }

/** Something that waits for the person who asks, by their role and their parts in tests. */
export const needSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('press-shut'), ...press, why: z.string(), since: timeSchema.nullable() }),
  z.object({ kind: z.literal('tag-hangs'), ...press, why: z.string(), since: timeSchema.nullable() }),
  z.object({ kind: z.literal('repair-open'), ...press, repairId: idSchema, why: z.string(), since: timeSchema }),
  z.object({ kind: z.literal('joints-to-examine'), ...press, joints: z.string(), since: timeSchema.nullable() }),
  z.object({ kind: z.literal('retest'), ...press, repeatsId: idSchema, number: z.string(), since: timeSchema.nullable() }),
  z.object({ kind: z.literal('press-overdue'), ...press, until: day }),
  z.object({ kind: z.literal('press-due'), ...press, until: day }),
  z.object({ kind: z.literal('countersign'), ...test, since: timeSchema }),
  z.object({ kind: z.literal('sign'), ...test, since: timeSchema }),
  z.object({ kind: z.literal('declined'), ...test, since: timeSchema }),
  z.object({ kind: z.literal('conclude'), ...test, since: timeSchema }),
  z.object({
    kind: z.literal('instrument-out'),
    ...instrument,
    is: z.enum(['out-of-date', 'out-of-tolerance', 'never']),
    dueOn: day.nullable(),
  }),
  z.object({ kind: z.literal('instrument-due'), ...instrument, dueOn: day }),
])

export const rungSchema = z.object({
  percent: z.number(),
  holdSeconds: z.number(),
  state: z.enum(['to-come', 'now', 'waiting', 'went-on', 'stopped']),
  at: timeSchema.nullable(),
})

export const underWaySchema = z.object({
  test: testRowSchema,
  whatFor: z.string(),
  pumpHandId: idSchema.nullable(),
  climb: z.object({ datumAt: timeSchema.nullable(), rungs: z.array(rungSchema), levelPercent: z.number(), loaded: z.boolean() }),
})

export const todayPressSchema = z.object({
  press: pressRowSchema,
  /** Why it may not be used, in a sentence, where its ledger says so. */
  why: z.string().nullable(),
  /** The test that holds it, and how far that has come. */
  test: z.object({ proofTestId: idSchema, number: z.string(), status: testRowSchema.shape.status }).nullable(),
})

export const dueSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('calibration'), on: day, ...instrument }),
  z.object({ kind: z.literal('clearance'), on: day, ...press }),
])

export const todayResponseSchema = z.object({
  day,
  underWay: z.array(underWaySchema),
  needs: z.array(needSchema),
  presses: z.array(todayPressSchema),
  due: z.array(dueSchema),
})

export type Need = z.infer<typeof needSchema>
export type UnderWay = z.infer<typeof underWaySchema>
export type TodayPress = z.infer<typeof todayPressSchema>
export type Due = z.infer<typeof dueSchema>
export type TodayResponse = z.infer<typeof todayResponseSchema>

import { z } from 'zod'
import { CONCLUSIONS } from '../proof-test/entries'
import { idSchema, timeSchema } from './common'

const figure = z.number().nullable()

/** One climb to full load of one test: what is compared over the years. SI throughout. */
export const climbHistorySchema = z.object({
  proofTestId: idSchema,
  number: z.string(),
  on: timeSchema,
  result: z.enum(CONCLUSIONS).nullable(),
  repeats: z.string().nullable(),
  leg: z.string(),
  climb: z.int(),
  /** What the line stands for: the net figure's or the point's label. */
  of: z.string(),
  /** Slope of the line turned over, N/m, with its expanded uncertainty. */
  stiffness: figure,
  stiffnessU: figure,
  /** Permanent set of the same figure, m. */
  set: figure,
  setLimit: figure,
  /** Pressure lost in the hold at full load, as a share of the pressure. */
  pressureLoss: figure,
  pressureLossLimit: figure,
  /** Force and deflection at datum and stages (N, m), for the old line beside the new. */
  line: z.array(z.object({ percent: z.number(), force: z.number(), deflection: z.number() })),
})

/** GET /api/presses/:id/history: every climb of every test, the oldest first. */
export const pressHistorySchema = z.object({ climbs: z.array(climbHistorySchema) })

export type ClimbHistory = z.infer<typeof climbHistorySchema>
export type PressHistory = z.infer<typeof pressHistorySchema>

import { z } from 'zod'
import { forceUnitSchema, lengthUnitSchema, pressureUnitSchema } from '../units'
import { idSchema, lineSchema } from './common'

export const shopNameSchema = lineSchema('the name of the shop', 120)

const wholeNumber = (sentence: string, least: number, most: number) =>
  z.number(sentence).int(sentence).min(least, sentence).max(most, sentence)

const shopSettings = {
  name: shopNameSchema,
  forceUnit: forceUnitSchema,
  pressureUnit: pressureUnitSchema,
  lengthUnit: lengthUnitSchema,
  /** A build that stood still longer than this is walked down as if new. */
  buildPauseDays: wholeNumber('Enter whole days, 1 to 365.', 1, 365),
  /** For so long an examination counts as made on the day of the load. */
  walkDownHours: wholeNumber('Enter whole hours, 1 to 24.', 1, 24),
}

/** GET /api/shops/:shopId */
export const shopSchema = z.object({ id: idSchema, ...shopSettings })
export type Shop = z.infer<typeof shopSchema>

/** PATCH /api/shops/:shopId; what is left out stays. Answers the shop. */
export const changeShopRequestSchema = z.strictObject(shopSettings).partial()
export type ChangeShopRequest = z.infer<typeof changeShopRequestSchema>

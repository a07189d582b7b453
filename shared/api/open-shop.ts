import { z } from 'zod'
import { forceUnitSchema, lengthUnitSchema, pressureUnitSchema } from '../units'
import { emailSchema, newPasswordSchema, personNameSchema } from './session'
import { shopNameSchema } from './shops'

/** POST /api/shops: opens a shop with its owner and signs the owner in; 201 with the session. */
export const openShopRequestSchema = z.strictObject({
  shopName: shopNameSchema,
  ownerName: personNameSchema,
  email: emailSchema,
  password: newPasswordSchema,
  forceUnit: forceUnitSchema.default('short-ton'),
  pressureUnit: pressureUnitSchema.default('psi'),
  lengthUnit: lengthUnitSchema.default('mm'),
})
export type OpenShopRequest = z.output<typeof openShopRequestSchema>

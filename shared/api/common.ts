import { z } from 'zod'
import { roles } from '../policy'

export const idSchema = z.uuid('This is not an id of ours.').toLowerCase()
export const timeSchema = z.iso.datetime()
export const roleSchema = z.enum(roles, 'Choose a role.')

/** Lists belong to one shop, named in the query: two tabs may look at two shops. */
export const shopQuerySchema = z.object({ shop: idSchema })
export type ShopQuery = z.infer<typeof shopQuerySchema>

/** Text of one line: spaces around it go, control characters are refused. */
export function lineSchema(what: string, longest: number) {
  return z
    .string(`Enter ${what}.`)
    .trim()
    .min(1, `Enter ${what}.`)
    .max(longest, `Keep ${what} to ${longest} characters.`)
    .regex(/^\P{Cc}*$/u, `Keep ${what} to one line.`)
}

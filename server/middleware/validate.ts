import type { Request } from 'express'
import type { z } from 'zod'
import { idSchema } from '#shared/api/common'
import { Problem, invalid, notFound } from '../problem'

function parse<S extends z.ZodType>(schema: S, value: unknown): z.output<S> {
  const parsed = schema.safeParse(value)
  if (parsed.success) return parsed.data
  const fields: Record<string, string> = {}
  const general: string[] = []
  for (const issue of parsed.error.issues) {
    if (issue.path.length === 0) general.push(issue.message)
    else fields[issue.path.join('.')] ??= issue.message
  }
  throw general.length > 0 ? invalid(fields, general.join(' ')) : invalid(fields)
}

export function parseBody<S extends z.ZodType>(request: Request, schema: S): z.output<S> {
  const body: unknown = request.body
  if (body === undefined) throw new Problem(400, 'no-json', 'Send the data as JSON.')
  return parse(schema, body)
}

export function parseQuery<S extends z.ZodType>(request: Request, schema: S): z.output<S> {
  return parse(schema, request.query)
}

/** An id in the path; what can't be an id is as unknown as an id that nobody gave out. */
export function idParam(request: Request, name: string): string {
  const parsed = idSchema.safeParse(request.params[name])
  if (!parsed.success) throw notFound()
  return parsed.data
}

/** The shop that a list belongs to. */
export function shopOf(request: Request): string {
  const value = request.query['shop']
  if (value === undefined) throw invalid({ shop: 'Name the shop.' }, 'The address must name the shop: ?shop=…')
  const parsed = idSchema.safeParse(value)
  if (!parsed.success) throw notFound('This shop')
  return parsed.data
}

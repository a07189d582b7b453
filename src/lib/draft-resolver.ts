import { zodResolver } from '@hookform/resolvers/zod'
import type { FieldValues, Resolver } from 'react-hook-form'
import type { z } from 'zod'
import { parseDecimal } from '#shared/units'

/**
 * Checks a form by the schema that the server uses. A form keeps what was typed, so its draft holds text where the
 * request holds numbers; `toRequest` turns one into the other under the same names, so that messages find their fields.
 */
export function draftResolver<Draft extends FieldValues, Request extends FieldValues>(
  schema: z.ZodType<Request, FieldValues>,
  toRequest: (draft: Draft) => FieldValues,
): Resolver<Draft, unknown, Request> {
  const resolve = zodResolver(schema)
  return async (draft, context, options) => {
    const answer = await resolve(toRequest(draft), context, { ...options, names: undefined, fields: options.fields })
    return answer as Awaited<ReturnType<Resolver<Draft, unknown, Request>>>
  }
}

/** The number in a field; undefined, so that the schema asks for it, while there is none that can be read. */
export function typedNumber(text: string): number | undefined {
  const parsed = parseDecimal(text)
  return parsed.ok ? parsed.value : undefined
}

/** A quantity that may be left empty. */
export function optionalTyped<T extends { text: string }>(typed: T): T | null {
  return typed.text.trim() === '' ? null : typed
}

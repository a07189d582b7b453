import { z } from 'zod'

/** Refusals over HTTP: problem+json (RFC 9457), told apart by `code`, which never changes its meaning. */
export const problemSchema = z.object({
  type: z.literal('about:blank'),
  title: z.string(),
  status: z.int(),
  code: z.string(),
  /** A sentence for the person: what is wrong and what to do. */
  detail: z.string(),
  /** Numbers of the rules that refuse, such as R7. */
  rules: z.array(z.string()).optional(),
  /** A sentence for each field of the form, by dotted name. */
  fields: z.record(z.string(), z.string()).optional(),
})
export type ProblemBody = z.infer<typeof problemSchema>

import { problemSchema, type ProblemBody } from '#shared/api/problem'

type Refusal = Pick<ProblemBody, 'code' | 'detail' | 'fields' | 'rules'>

/** The server answered, and its answer is no. `detail` is a sentence meant for the person. */
export class ProblemError extends Error {
  override readonly name = 'ProblemError'
  readonly status: number
  readonly code: string
  readonly detail: string
  /** Sentences by dotted field name, for the form that was sent. */
  readonly fields: Readonly<Record<string, string>>
  /** Numbers of the rules that refuse, such as `R7`. */
  readonly rules: readonly string[]
  /** How long the server asks to wait before the same is sent again (ms); null when it doesn't say. */
  readonly retryAfterMs: number | null

  constructor(status: number, problem: Refusal, retryAfterMs: number | null = null) {
    super(problem.detail)
    this.status = status
    this.code = problem.code
    this.detail = problem.detail
    this.fields = problem.fields ?? {}
    this.rules = problem.rules ?? []
    this.retryAfterMs = retryAfterMs
  }
}

/** Nothing answered: no network, no server, or something between that isn't the server. */
export class Disconnected extends Error {
  override readonly name = 'Disconnected'
  constructor(cause?: unknown) {
    super('Not connected to the server.', { cause })
  }
}

/** The server answered something that the shared schema doesn't know: one of the two is older. */
export class UnreadableAnswer extends Error {
  override readonly name = 'UnreadableAnswer'
  constructor(what: string, cause?: unknown) {
    super(`The server's answer to ${what} doesn't have the agreed shape.`, { cause })
  }
}

/** The refusal in a response's body; one of our own making if the body isn't problem+json. */
export function readProblem(status: number, body: unknown, retryAfterMs: number | null = null): ProblemError {
  const parsed = problemSchema.safeParse(body)
  if (parsed.success) return new ProblemError(status, parsed.data, retryAfterMs)
  const detail = `The server answered ${status} and gave no reason. Nothing was changed on this screen.`
  return new ProblemError(status, { code: `http-${status}`, detail }, retryAfterMs)
}

export const isSignedOut = (error: unknown): boolean => error instanceof ProblemError && error.status === 401
export const isNotFound = (error: unknown): boolean => error instanceof ProblemError && error.status === 404
export const isForbidden = (error: unknown): boolean => error instanceof ProblemError && error.status === 403

/** One sentence of what is so and what to do, for any failure of a request. */
export function sayWhatFailed(error: unknown): string {
  if (error instanceof Disconnected) return 'Not connected to the server. What you typed is kept here: try again when the link is back.'
  if (error instanceof ProblemError) return error.detail
  if (error instanceof UnreadableAnswer) return 'This page is older than the server. Load it again to update it.'
  return 'Something in this page failed. Load it again; if it fails again, tell whoever looks after the server.'
}

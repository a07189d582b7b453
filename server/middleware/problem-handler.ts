import type { ErrorRequestHandler, RequestHandler } from 'express'
import { ConnectionError, TimeoutError } from 'sequelize'
import type { Logger } from 'pino'
import { Problem } from '../problem'
import { passingReason } from '../transaction'

/** The same request may well go through a moment later. */
function isPassing(error: unknown): boolean {
  return error instanceof ConnectionError || error instanceof TimeoutError || passingReason(error) !== undefined
}

function bodyProblem(error: unknown): Problem | undefined {
  if (!(error instanceof Error) || !('type' in error)) return undefined
  switch (error.type) {
    case 'entity.parse.failed':
      return new Problem(400, 'malformed-json', 'What was sent is not JSON.')
    case 'entity.too.large':
      return new Problem(413, 'too-large', 'What was sent is too large.')
    case 'request.aborted':
    case 'request.size.invalid':
      return new Problem(400, 'broken-off', 'What was sent broke off on the way. Send it again.')
    case 'charset.unsupported':
    case 'encoding.unsupported':
      return new Problem(400, 'unknown-encoding', 'Send the data as UTF-8 JSON.')
    default:
      return undefined
  }
}

export function toProblem(error: unknown, logger: Logger): Problem {
  if (error instanceof Problem) return error
  const fromBody = bodyProblem(error)
  if (fromBody !== undefined) return fromBody
  if (error instanceof URIError) return new Problem(400, 'malformed-address', 'This address is mistyped.')
  if (isPassing(error)) {
    logger.warn({ err: error }, 'The database could not answer')
    return new Problem(503, 'try-again', 'The server is busy for a moment. Nothing was changed; try again.', { retryAfterSeconds: 2 })
  }
  logger.error({ err: error }, 'A request failed')
  return new Problem(
    500,
    'unexpected',
    'Something failed on the server. What you entered is kept; try again, and tell whoever looks after the server.',
  )
}

export const unknownEndpoint: RequestHandler = () => {
  throw new Problem(404, 'no-such-endpoint', 'The server knows no such address.')
}

export function problemHandler(logger: Logger): ErrorRequestHandler {
  return (error: unknown, _request, response, next) => {
    const problem = toProblem(error, logger)
    // Once an answer has begun, all that is left is to break it off, so that it doesn't look complete.
    if (response.headersSent) return next(error)
    const { retryAfterSeconds } = problem.options
    if (retryAfterSeconds !== undefined) response.set('Retry-After', String(retryAfterSeconds))
    response.status(problem.status).type('application/problem+json').send(JSON.stringify(problem.toBody()))
  }
}

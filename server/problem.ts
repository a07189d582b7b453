import type { ProblemBody } from '#shared/api/problem'

export interface ProblemOptions {
  rules?: string[]
  fields?: Record<string, string>
  retryAfterSeconds?: number
}

const titles: Record<number, string> = {
  400: 'Bad request',
  401: 'Not signed in',
  403: 'Not allowed',
  404: 'Not found',
  409: 'Conflict',
  413: 'Too large',
  422: 'Something is missing or wrong',
  429: 'Too many attempts',
  500: 'Something failed',
  503: 'Not available',
}

/** A refusal that the person is told about: `code` for programs, `detail` a sentence that says what to do. */
export class Problem extends Error {
  override readonly name = 'Problem'

  constructor(
    readonly status: number,
    readonly code: string,
    readonly detail: string,
    readonly options: ProblemOptions = {},
  ) {
    super(detail)
  }

  toBody(): ProblemBody {
    const { rules, fields } = this.options
    return {
      type: 'about:blank',
      title: titles[this.status] ?? 'Refused',
      status: this.status,
      code: this.code,
      detail: this.detail,
      ...(rules === undefined ? {} : { rules }),
      ...(fields === undefined ? {} : { fields }),
    }
  }
}

/** Also for what belongs to another shop, so that nobody learns whether it exists. */
export function notFound(what = 'What you asked for'): Problem {
  return new Problem(404, 'not-found', `${what} is not here. It may be in another shop, or the address is mistyped.`)
}

export function notSignedIn(): Problem {
  return new Problem(401, 'not-signed-in', 'Sign in to go on. What you entered is kept on this device.')
}

export function forbidden(): Problem {
  return new Problem(403, 'forbidden', 'Your role in this shop does not allow this. Ask the owner or the lead.')
}

export function invalid(fields: Record<string, string>, detail = 'Some fields need another look.'): Problem {
  return new Problem(422, 'invalid', detail, { fields })
}

export function conflict(code: string, detail: string, rules?: string[]): Problem {
  return new Problem(409, code, detail, rules === undefined ? {} : { rules })
}

import type { RequestHandler } from 'express'
import type { Config } from '../config'
import { Problem } from '../problem'

const reading = new Set(['GET', 'HEAD', 'OPTIONS'])

function hostOf(origin: string): string | undefined {
  try {
    return new URL(origin).host
  } catch {
    return undefined
  }
}

/**
 * A write must come from a page of our own. Browsers say where a request comes from in headers that pages can't forge;
 * a program that is no browser sets `Origin` itself.
 */
export function sameOrigin(config: Config): RequestHandler {
  const publicHost = config.publicUrl === undefined ? undefined : hostOf(config.publicUrl)
  return (request, _response, next) => {
    if (reading.has(request.method)) return next()
    const site = request.get('sec-fetch-site')
    const origin = request.get('origin')
    const originHost = origin === undefined ? undefined : hostOf(origin)
    const isOurs =
      origin === undefined
        ? site === 'same-origin'
        : originHost !== undefined && (originHost === request.get('host') || originHost === publicHost)
    if (isOurs && (site === undefined || site === 'same-origin')) return next()
    throw new Problem(
      403,
      'cross-origin',
      'This came from another site and was refused. Open Quarterload at its own address and try again.',
    )
  }
}

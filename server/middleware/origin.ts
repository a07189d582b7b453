import type { Request } from 'express'
import type { Config } from '../config'

/** The address that people reach this server at: PUBLIC_URL, else where the request came in. */
export function originOf({ publicUrl }: Config, request: Request): string {
  return publicUrl ?? `${request.protocol}://${request.get('host') ?? request.hostname}`
}

import { createServer, request as forward } from 'node:http'
import type { IncomingMessage, ServerResponse } from 'node:http'

export interface Balancer {
  address: string
  /** How many requests each server has been given. */
  given: number[]
  close(): Promise<void>
}

/**
 * Stands in front of several app servers, as a shop's proxy would, and gives each request to the next of them. Nothing
 * is held back or sent again: what a server breaks off is broken off for the client.
 */
export function balance(addresses: readonly string[]): Promise<Balancer> {
  const given = addresses.map(() => 0)
  let turn = 0
  const handle = (incoming: IncomingMessage, outgoing: ServerResponse) => {
    const index = turn % addresses.length
    turn += 1
    given[index] = (given[index] ?? 0) + 1
    const url = new URL(incoming.url ?? '/', addresses[index])
    const onward = forward(url, { method: incoming.method, headers: incoming.headers }, (answer) => {
      outgoing.writeHead(answer.statusCode ?? 502, answer.headers)
      outgoing.flushHeaders()
      answer.pipe(outgoing)
      answer.once('error', () => outgoing.destroy())
    })
    onward.once('error', () => outgoing.destroy())
    outgoing.once('close', () => onward.destroy())
    incoming.pipe(onward)
  }
  const server = createServer(handle)
  return new Promise((resolve) => {
    server.listen(0, '127.0.0.1', () => {
      const address = server.address()
      const port = address === null || typeof address === 'string' ? 0 : address.port
      resolve({
        address: `http://127.0.0.1:${port}`,
        given,
        close: () =>
          new Promise((closed) => {
            server.close(() => closed())
            server.closeAllConnections()
          }),
      })
    })
  })
}

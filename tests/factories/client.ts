import { randomInt } from 'node:crypto'
import request from 'supertest'
import type { Response, Test } from 'supertest'
import { testServer } from '../support/api-server'

type Body = object | string | undefined

let far: { address: string; patienceMilliseconds: number } | undefined

/**
 * From now on clients talk to a server of its own process, at this address, instead of the one in this process. With
 * patience they ask again for so long while nothing answers.
 */
export function aimClientsAt(address: string, patienceMilliseconds = 0): void {
  far = { address, patienceMilliseconds }
}

/**
 * The answer to a request, made again as a device makes it: for as long as nothing answers, or the server can't. Without
 * patience the first answer counts, whatever it is.
 */
export async function answered(make: () => Test): Promise<Response> {
  const until = performance.now() + (far?.patienceMilliseconds ?? 0)
  for (;;) {
    let failure: unknown
    try {
      const response = await make()
      if (response.status < 500 || performance.now() >= until) return response
    } catch (error) {
      failure = error
    }
    if (failure !== undefined && performance.now() >= until) throw failure
    await new Promise((resolve) => {
      setTimeout(resolve, 100)
    })
  }
}

function randomAddress(): string {
  return `10.${randomInt(256)}.${randomInt(256)}.${randomInt(1, 255)}`
}

/** A browser as the server sees it: it keeps its cookie, has an address, and says where its requests come from. */
export class ApiClient {
  private readonly agent = request.agent(far?.address ?? testServer().app)

  constructor(readonly address = randomAddress()) {}

  get(path: string): Test {
    return this.dress(this.agent.get(path))
  }

  post(path: string, body?: Body): Test {
    return this.write(this.agent.post(path), body)
  }

  patch(path: string, body?: Body): Test {
    return this.write(this.agent.patch(path), body)
  }

  put(path: string, body?: Body): Test {
    return this.write(this.agent.put(path), body)
  }

  delete(path: string): Test {
    return this.write(this.agent.delete(path), undefined)
  }

  private dress(test: Test): Test {
    return test.set('X-Forwarded-For', this.address)
  }

  private write(test: Test, body: Body): Test {
    const dressed = this.dress(test).set('Sec-Fetch-Site', 'same-origin')
    return body === undefined ? dressed : dressed.send(body)
  }
}

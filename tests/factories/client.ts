import { randomInt } from 'node:crypto'
import request from 'supertest'
import type { Test } from 'supertest'
import { testServer } from '../support/api-server'

type Body = object | string | undefined

function randomAddress(): string {
  return `10.${randomInt(256)}.${randomInt(256)}.${randomInt(1, 255)}`
}

/** A browser as the server sees it: it keeps its cookie, has an address, and says where its requests come from. */
export class ApiClient {
  private readonly agent = request.agent(testServer().app)
  readonly address: string

  constructor(address = randomAddress()) {
    this.address = address
  }

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

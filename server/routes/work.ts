import type { Request } from 'express'
import type { Transaction } from 'sequelize'
import type { AppContext, Work } from '../context'
import { inTransaction } from '../context'
import { personOf } from '../middleware/authenticate'
import { notFound } from '../problem'
import { actorIn, membershipOf, readerOfTest } from '../services/membership'
import { shopOfProofTest } from '../services/proof-test-register'

/** Reading may be done twice; what these routes write makes its own ids, so that a second run could write it twice. */
const isReading = (request: Request) => ({ idempotent: request.method === 'GET' || request.method === 'HEAD' })

/** One transaction in a shop that the person belongs to; 404 when not. */
export function workIn<T>(context: AppContext, request: Request, shopId: string, act: (work: Work) => Promise<T>): Promise<T> {
  const { userId } = personOf(request)
  return inTransaction(
    context,
    async (transaction) => {
      const actor = await membershipOf({ transaction, userId, shopId })
      return act({ transaction, actor, now: context.now() })
    },
    isReading(request),
  )
}

/** The same for what is named by its id alone: `shopOf` looks up whose it is. An unknown id and another shop's answer alike. */
export function workOn<T>(
  context: AppContext,
  request: Request,
  what: string,
  shopOf: (transaction: Transaction) => Promise<string | undefined>,
  act: (work: Work) => Promise<T>,
): Promise<T> {
  const { userId } = personOf(request)
  return inTransaction(
    context,
    async (transaction) => {
      const shopId = await shopOf(transaction)
      const actor = shopId === undefined ? undefined : await actorIn({ transaction, userId, shopId })
      if (actor === undefined || actor.role === null) throw notFound(what)
      return act({ transaction, actor, now: context.now() })
    },
    isReading(request),
  )
}

/** The same for a proof test, which its outside witness may look at too. */
export function workOnTest<T>(context: AppContext, request: Request, testId: string, act: (work: Work) => Promise<T>): Promise<T> {
  const { userId } = personOf(request)
  return inTransaction(
    context,
    async (transaction) => {
      const shopId = await shopOfProofTest(testId, transaction)
      if (shopId === undefined) throw notFound('This proof test')
      const actor = await readerOfTest({ transaction, userId, shopId }, testId)
      return act({ transaction, actor, now: context.now() })
    },
    isReading(request),
  )
}

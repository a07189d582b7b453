import type { Request } from 'express'
import type { AppContext, Work } from '../context'
import { inTransaction } from '../context'
import { personOf } from '../middleware/authenticate'
import { membershipOf } from '../services/membership'

/** One transaction in a shop that the person belongs to; 404 when not. */
export function workIn<T>(context: AppContext, request: Request, shopId: string, act: (work: Work) => Promise<T>): Promise<T> {
  const { userId } = personOf(request)
  return inTransaction(context, async (transaction) => {
    const actor = await membershipOf({ transaction, userId, shopId })
    return act({ transaction, actor, now: context.now() })
  })
}

import { Router } from 'express'
import { openShopRequestSchema } from '#shared/api/open-shop'
import { changeShopRequestSchema } from '#shared/api/shops'
import type { AppContext } from '../context'
import { authenticate } from '../middleware/authenticate'
import { idParam, parseBody } from '../middleware/validate'
import { presentShop } from '../presenters/people'
import { changeShop, openShop, readShop } from '../services/shops'
import { clientOf, sendSignedIn } from './session'
import { workIn } from './work'

export function shopRoutes(context: AppContext): Router {
  const router = Router()

  router.post('/shops', async (request, response) => {
    const body = parseBody(request, openShopRequestSchema)
    await sendSignedIn(context, response, await openShop(context, body, clientOf(request)), 201)
  })

  router.get('/shops/:shopId', authenticate(context), async (request, response) => {
    const shop = await workIn(context, request, idParam(request, 'shopId'), (work) => readShop(work))
    response.json(presentShop(shop))
  })

  router.patch('/shops/:shopId', authenticate(context), async (request, response) => {
    const shop = await workIn(context, request, idParam(request, 'shopId'), (work) =>
      changeShop(work, parseBody(request, changeShopRequestSchema)),
    )
    response.json(presentShop(shop))
  })

  return router
}

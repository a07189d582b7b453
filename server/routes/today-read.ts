import { Router } from 'express'
import { todayQuerySchema } from '#shared/api/today'
import type { AppContext } from '../context'
import { authenticate } from '../middleware/authenticate'
import { parseQuery, shopOf } from '../middleware/validate'
import { presentToday } from '../presenters/today'
import { readToday } from '../services/today'
import { workIn } from './work'

export function todayReadRoutes(context: AppContext): Router {
  const router = Router()

  router.get('/today', authenticate(context), async (request, response) => {
    const shopId = shopOf(request)
    const { day } = parseQuery(request, todayQuerySchema)
    response.json(presentToday(await workIn(context, request, shopId, (work) => readToday(work, day))))
  })

  return router
}

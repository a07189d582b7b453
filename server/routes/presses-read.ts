import { Router } from 'express'
import type { Transaction } from 'sequelize'
import { pressListQuerySchema } from '#shared/api/presses'
import type { AppContext } from '../context'
import { authenticate } from '../middleware/authenticate'
import { idParam, parseQuery, shopOf } from '../middleware/validate'
import { presentPress, presentPressList } from '../presenters/press-register'
import { readPressHistory } from '../services/press-history'
import { listPresses, readPress, shopOfPress } from '../services/press-register'
import { workIn, workOn } from './work'

export function pressReadRoutes(context: AppContext): Router {
  const router = Router()

  router.get('/presses', authenticate(context), async (request, response) => {
    const shopId = shopOf(request)
    const query = parseQuery(request, pressListQuerySchema)
    const page = await workIn(context, request, shopId, (work) => listPresses(work, query))
    response.json(presentPressList(page))
  })

  router.get('/presses/:pressId', authenticate(context), async (request, response) => {
    const id = idParam(request, 'pressId')
    const shopOfIt = (transaction: Transaction) => shopOfPress(id, transaction)
    const press = await workOn(context, request, 'This press', shopOfIt, (work) => readPress(work, id))
    response.json({ shopId: press.shopId, press: presentPress(press) })
  })

  router.get('/presses/:pressId/history', authenticate(context), async (request, response) => {
    const id = idParam(request, 'pressId')
    const shopOfIt = (transaction: Transaction) => shopOfPress(id, transaction)
    response.json(await workOn(context, request, 'This press', shopOfIt, (work) => readPressHistory(work, id)))
  })

  return router
}

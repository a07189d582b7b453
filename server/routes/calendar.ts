import { Router } from 'express'
import { calendarQuerySchema } from '#shared/api/calendar'
import type { AppContext } from '../context'
import { authenticate } from '../middleware/authenticate'
import { originOf } from '../middleware/origin'
import { parseQuery, shopOf } from '../middleware/validate'
import { calendarFile } from '../presenters/calendar-file'
import { endFeed, readCalendar, readFeed, renewFeed } from '../services/calendar'
import { workIn } from './work'

export function calendarRoutes(context: AppContext): Router {
  const router = Router()

  router.get('/calendar', authenticate(context), async (request, response) => {
    const { shop, from, to } = parseQuery(request, calendarQuerySchema)
    response.json(await workIn(context, request, shop, (work) => readCalendar(work, from, to)))
  })

  router.post('/calendar/feed', authenticate(context), async (request, response) => {
    const origin = originOf(context.config, request)
    const address = await workIn(context, request, shopOf(request), (work) => renewFeed(work, origin))
    response.status(201).json({ address })
  })

  router.delete('/calendar/feed', authenticate(context), async (request, response) => {
    await workIn(context, request, shopOf(request), endFeed)
    response.json({ address: null })
  })

  // Calendar programs can't sign in: the address is the secret, and says no more than when something falls due.
  router.get('/calendar/:token.ics', async (request, response) => {
    const followed = await readFeed(context, request.params.token)
    response.type('text/calendar').send(calendarFile(followed, originOf(context.config, request), context.now()))
  })

  return router
}

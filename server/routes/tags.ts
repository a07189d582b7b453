import { Router } from 'express'
import { z } from 'zod'
import { tagCodeSchema } from '#shared/api/tags'
import type { AppContext } from '../context'
import { authenticate } from '../middleware/authenticate'
import { originOf } from '../middleware/origin'
import { idParam, parseQuery } from '../middleware/validate'
import { notFound } from '../problem'
import { shopOfPress } from '../services/press-register'
import { readPublicTag, tagOf } from '../services/tags'
import { workOn } from './work'

/** The reader's calendar date, because a clearance's last day is not the server's. */
const daySchema = z.object({ day: z.iso.date().optional() })

export function tagRoutes(context: AppContext): Router {
  const router = Router()

  router.post('/presses/:pressId/tag', authenticate(context), async (request, response) => {
    const id = idParam(request, 'pressId')
    const origin = originOf(context.config, request)
    response.json(
      await workOn(
        context,
        request,
        'This press',
        (transaction) => shopOfPress(id, transaction),
        (work) => tagOf(work, id, origin),
      ),
    )
  })

  router.get('/tags/:code', async (request, response) => {
    const { day } = parseQuery(request, daySchema)
    const code = tagCodeSchema.safeParse(request.params.code)
    if (!code.success) throw notFound('This tag')
    response.json(await readPublicTag(context, code.data, day))
  })

  return router
}

import { Router } from 'express'
import type { Request } from 'express'
import { toolingListQuerySchema } from '#shared/api/tooling'
import type { ToolingResponse } from '#shared/api/tooling'
import { toolingDetailsSchema } from '#shared/tooling'
import type { AppContext, Work } from '../context'
import { authenticate } from '../middleware/authenticate'
import { idParam, parseBody, parseQuery, shopOf } from '../middleware/validate'
import { addTooling, changeTooling, listTooling, readTooling, retireTooling, shopOfTooling } from '../services/tooling'
import { workIn, workOn } from './work'

export function toolingRoutes(context: AppContext): Router {
  const router = Router()
  router.use('/tooling', authenticate(context))

  /** Acts on the piece of the path, then answers it as it is now. */
  function on(request: Request, act: (work: Work, id: string) => Promise<void>): Promise<ToolingResponse> {
    const id = idParam(request, 'toolingId')
    return workOn(
      context,
      request,
      'This piece of tooling',
      (transaction) => shopOfTooling(id, transaction),
      async (work) => {
        await act(work, id)
        return readTooling(work, id)
      },
    )
  }

  router.get('/tooling', async (request, response) => {
    const shopId = shopOf(request)
    const query = parseQuery(request, toolingListQuerySchema)
    const { rows, older, newer } = await workIn(context, request, shopId, (work) => listTooling(work, query))
    response.json({ tooling: rows, older, newer })
  })

  router.post('/tooling', async (request, response) => {
    const shopId = shopOf(request)
    const details = parseBody(request, toolingDetailsSchema)
    const added = await workIn(context, request, shopId, async (work) => readTooling(work, await addTooling(work, details)))
    response.status(201).json(added)
  })

  router.get('/tooling/:toolingId', async (request, response) => {
    response.json(await on(request, async () => {}))
  })

  router.put('/tooling/:toolingId', async (request, response) => {
    response.json(await on(request, (work, id) => changeTooling(work, id, parseBody(request, toolingDetailsSchema))))
  })

  router.post('/tooling/:toolingId/retirement', async (request, response) => {
    response.json(await on(request, (work, id) => retireTooling(work, id, true)))
  })

  router.delete('/tooling/:toolingId/retirement', async (request, response) => {
    response.json(await on(request, (work, id) => retireTooling(work, id, false)))
  })

  return router
}

import { Router } from 'express'
import type { Request } from 'express'
import { protocolRequestSchema } from '#shared/api/protocols'
import type { ProtocolResponse } from '#shared/api/protocols'
import type { AppContext, Work } from '../context'
import { authenticate } from '../middleware/authenticate'
import { idParam, parseBody, shopOf } from '../middleware/validate'
import { presentProtocolList, presentProtocolWithVersions } from '../presenters/protocols'
import { addProtocol, addProtocolVersion, archiveProtocol, listProtocols, readProtocol, shopOfProtocol } from '../services/protocols'
import { workIn, workOn } from './work'

export function protocolRoutes(context: AppContext): Router {
  const router = Router()
  router.use('/protocols', authenticate(context))

  /** Acts on the protocol of the path, then answers it as it is now. */
  function on(request: Request, act: (work: Work, id: string) => Promise<void>): Promise<ProtocolResponse> {
    const id = idParam(request, 'protocolId')
    return workOn(
      context,
      request,
      'This protocol',
      (transaction) => shopOfProtocol(id, transaction),
      async (work) => {
        await act(work, id)
        return presentProtocolWithVersions(await readProtocol(work, id))
      },
    )
  }

  router.get('/protocols', async (request, response) => {
    response.json(await workIn(context, request, shopOf(request), async (work) => presentProtocolList(await listProtocols(work))))
  })

  router.post('/protocols', async (request, response) => {
    const shopId = shopOf(request)
    const protocol = parseBody(request, protocolRequestSchema)
    const added = await workIn(context, request, shopId, async (work) =>
      presentProtocolWithVersions(await readProtocol(work, await addProtocol(work, protocol))),
    )
    response.status(201).json(added)
  })

  router.get('/protocols/:protocolId', async (request, response) => {
    response.json(await on(request, async () => {}))
  })

  router.post('/protocols/:protocolId/versions', async (request, response) => {
    const answer = await on(request, (work, id) => addProtocolVersion(work, id, parseBody(request, protocolRequestSchema)))
    response.status(201).json(answer)
  })

  router.post('/protocols/:protocolId/archive', async (request, response) => {
    response.json(await on(request, (work, id) => archiveProtocol(work, id, true)))
  })

  router.delete('/protocols/:protocolId/archive', async (request, response) => {
    response.json(await on(request, (work, id) => archiveProtocol(work, id, false)))
  })

  return router
}

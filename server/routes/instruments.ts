import { Router } from 'express'
import type { Request } from 'express'
import { calibrationRequestSchemaFor, instrumentListQuerySchema, instrumentRequestSchema } from '#shared/api/instruments'
import type { InstrumentResponse } from '#shared/api/instruments'
import type { AppContext, Work } from '../context'
import { authenticate } from '../middleware/authenticate'
import { idParam, parseBody, parseQuery, shopOf } from '../middleware/validate'
import { presentInstrumentList, presentInstrumentWithHistory } from '../presenters/instruments'
import { addCalibration } from '../services/calibrations'
import {
  addInstrument,
  changeInstrument,
  listInstruments,
  lockInstrument,
  readInstrument,
  retireInstrument,
  shopOfInstrument,
} from '../services/instruments'
import { workIn, workOn } from './work'

export function instrumentRoutes(context: AppContext): Router {
  const router = Router()
  router.use('/instruments', authenticate(context))

  /** Acts on the instrument of the path, then answers it as it is now. */
  function on(request: Request, act: (work: Work, id: string) => Promise<void>): Promise<InstrumentResponse> {
    const id = idParam(request, 'instrumentId')
    return workOn(
      context,
      request,
      'This instrument',
      (transaction) => shopOfInstrument(id, transaction),
      async (work) => {
        await act(work, id)
        return presentInstrumentWithHistory(await readInstrument(work, id))
      },
    )
  }

  router.get('/instruments', async (request, response) => {
    const shopId = shopOf(request)
    const query = parseQuery(request, instrumentListQuerySchema)
    response.json(await workIn(context, request, shopId, async (work) => presentInstrumentList(await listInstruments(work, query))))
  })

  router.post('/instruments', async (request, response) => {
    const shopId = shopOf(request)
    const details = parseBody(request, instrumentRequestSchema)
    const added = await workIn(context, request, shopId, async (work) =>
      presentInstrumentWithHistory(await readInstrument(work, await addInstrument(work, details))),
    )
    response.status(201).json(added)
  })

  router.get('/instruments/:instrumentId', async (request, response) => {
    response.json(await on(request, async () => {}))
  })

  router.put('/instruments/:instrumentId', async (request, response) => {
    response.json(await on(request, (work, id) => changeInstrument(work, id, parseBody(request, instrumentRequestSchema))))
  })

  router.post('/instruments/:instrumentId/calibrations', async (request, response) => {
    const answer = await on(request, async (work, id) => {
      const instrument = await lockInstrument(work, id)
      const { certificateFile, ...calibration } = parseBody(request, calibrationRequestSchemaFor[instrument.kind])
      await addCalibration(context.database, work, instrument, calibration, certificateFile ?? null)
    })
    response.status(201).json(answer)
  })

  router.post('/instruments/:instrumentId/retirement', async (request, response) => {
    response.json(await on(request, (work, id) => retireInstrument(work, id, true)))
  })

  router.delete('/instruments/:instrumentId/retirement', async (request, response) => {
    response.json(await on(request, (work, id) => retireInstrument(work, id, false)))
  })

  return router
}

import { Router } from 'express'
import type { Request } from 'express'
import { z } from 'zod'
import { appendRequestSchema } from '#shared/api/ledger'
import { openTestRequestSchema, signatureRequestSchema } from '#shared/api/proof-tests'
import type { AppContext } from '../context'
import { authenticate, personOf } from '../middleware/authenticate'
import { idParam, parseBody, parseQuery, shopOf } from '../middleware/validate'
import { appendPressEntries, appendTestEntries, openProofTest, registerPress, signProofTest, type Asking } from '../services/ledgers'
import { readLedger } from '../services/read-ledger'
import { clientOf } from './session'

const afterSchema = z.object({ after: z.coerce.number().int().min(0).default(0) })

/** Both ledgers over HTTP: reading what came after a number, and the only ways in. */
export function ledgerRoutes(context: AppContext): Router {
  const router = Router()
  const asking = (request: Request): Asking => ({ context, userId: personOf(request).userId })
  router.use(['/presses', '/proof-tests'], authenticate(context))

  router.post('/presses', async (request, response) => {
    response.status(201).json(await registerPress(asking(request), shopOf(request), parseBody(request, appendRequestSchema)))
  })

  router.get('/presses/:id/entries', async (request, response) => {
    const { after } = parseQuery(request, afterSchema)
    response.json(await readLedger(asking(request), 'press', idParam(request, 'id'), after))
  })

  router.post('/presses/:id/entries', async (request, response) => {
    response.json(await appendPressEntries(asking(request), idParam(request, 'id'), parseBody(request, appendRequestSchema)))
  })

  router.post('/proof-tests', async (request, response) => {
    response.status(201).json(await openProofTest(asking(request), shopOf(request), parseBody(request, openTestRequestSchema)))
  })

  router.get('/proof-tests/:id/entries', async (request, response) => {
    const { after } = parseQuery(request, afterSchema)
    response.json(await readLedger(asking(request), 'proof-test', idParam(request, 'id'), after))
  })

  router.post('/proof-tests/:id/entries', async (request, response) => {
    response.json(await appendTestEntries(asking(request), idParam(request, 'id'), parseBody(request, appendRequestSchema)))
  })

  router.post('/proof-tests/:id/signatures', async (request, response) => {
    const body = parseBody(request, signatureRequestSchema)
    const entry = await signProofTest(asking(request), clientOf(request).address, idParam(request, 'id'), body)
    response.status(201).json({ entry })
  })

  return router
}

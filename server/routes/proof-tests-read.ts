import { Router } from 'express'
import { testListQuerySchema } from '#shared/api/proof-tests'
import type { AppContext } from '../context'
import { authenticate } from '../middleware/authenticate'
import { idParam, parseQuery, shopOf } from '../middleware/validate'
import { presentProofTest, presentProofTestList } from '../presenters/proof-test-register'
import { listProofTests, readProofTest } from '../services/proof-test-register'
import { workIn, workOnTest } from './work'

export function proofTestReadRoutes(context: AppContext): Router {
  const router = Router()

  router.get('/proof-tests', authenticate(context), async (request, response) => {
    const shopId = shopOf(request)
    const query = parseQuery(request, testListQuerySchema)
    const page = await workIn(context, request, shopId, (work) => listProofTests(work, query))
    response.json(presentProofTestList(page))
  })

  router.get('/proof-tests/:proofTestId', authenticate(context), async (request, response) => {
    const id = idParam(request, 'proofTestId')
    const test = await workOnTest(context, request, id, (work) => readProofTest(work, id))
    response.json({ shopId: test.shopId, proofTest: presentProofTest(test) })
  })

  return router
}

import { Router } from 'express'
import type { Transaction } from 'sequelize'
import type { AppContext } from '../context'
import { authenticate } from '../middleware/authenticate'
import { idParam } from '../middleware/validate'
import { recordFileName, recordOf } from '../records/record'
import { recordWorkbook } from '../records/record-workbook'
import { shopOfProofTest } from '../services/proof-test-register'
import { readRecord } from '../services/records'
import { workOn } from './work'

const WORKBOOK = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet'

export function recordRoutes(context: AppContext): Router {
  const router = Router()

  router.get('/proof-tests/:proofTestId/record.xlsx', authenticate(context), async (request, response) => {
    const id = idParam(request, 'proofTestId')
    const shopOfIt = (transaction: Transaction) => shopOfProofTest(id, transaction)
    const source = await workOn(context, request, 'This proof test', shopOfIt, (work) => readRecord(work, id))
    const { opened } = recordOf(source)
    // Written after the transaction: a spreadsheet takes longer than a connection should be held.
    const workbook = await recordWorkbook(source)
    response.attachment(recordFileName(opened, 'xlsx')).type(WORKBOOK).send(workbook)
  })

  return router
}

import { Router } from 'express'
import type { Response } from 'express'
import type { Transaction } from 'sequelize'
import type { AppContext } from '../context'
import { authenticate } from '../middleware/authenticate'
import { idParam } from '../middleware/validate'
import { recordFileName, recordOf } from '../records/record'
import { recordWorkbook } from '../records/record-workbook'
import { ledgerFile, type LedgerFile } from '../services/ledger-files'
import { shopOfPress } from '../services/press-register'
import { recordFiles } from '../services/record-files'
import { readRecord } from '../services/records'
import { workOn, workOnTest } from './work'

const WORKBOOK = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet'

export function recordRoutes(context: AppContext): Router {
  const router = Router()

  router.get('/proof-tests/:proofTestId/record.xlsx', authenticate(context), async (request, response) => {
    const id = idParam(request, 'proofTestId')
    const source = await workOnTest(context, request, id, (work) => readRecord(context, work, id))
    const { opened, state } = recordOf(source)
    // Written after the transaction: a spreadsheet takes longer than a connection should be held.
    const files = await recordFiles(context, opened.shop.id, state.attachments)
    const workbook = await recordWorkbook(source, files)
    response.attachment(recordFileName(opened)).type(WORKBOOK).send(workbook)
  })

  const sendFile = (response: Response, { name, text }: LedgerFile) =>
    response.attachment(name).type('application/json').send(Buffer.from(text, 'utf8'))

  router.get('/proof-tests/:id/ledger.json', authenticate(context), async (request, response) => {
    const id = idParam(request, 'id')
    sendFile(response, await workOnTest(context, request, id, (work) => ledgerFile(context, work, 'proof-test', id)))
  })

  router.get('/presses/:id/ledger.json', authenticate(context), async (request, response) => {
    const id = idParam(request, 'id')
    const shopOfIt = (transaction: Transaction) => shopOfPress(id, transaction)
    sendFile(response, await workOn(context, request, 'This press', shopOfIt, (work) => ledgerFile(context, work, 'press', id)))
  })

  return router
}

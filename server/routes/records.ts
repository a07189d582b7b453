import { pipeline } from 'node:stream/promises'
import { Router } from 'express'
import type { Response } from 'express'
import type { Transaction } from 'sequelize'
import type { AppContext } from '../context'
import { recordPdfQuerySchema } from '#shared/api/records'
import { authenticate } from '../middleware/authenticate'
import { originOf } from '../middleware/origin'
import { idParam, parseQuery } from '../middleware/validate'
import { MOST_ON_PAPER } from '../records/files'
import { recordPdf } from '../records/pdf/record-pdf'
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

  router.get('/proof-tests/:proofTestId/record.pdf', authenticate(context), async (request, response) => {
    const id = idParam(request, 'proofTestId')
    const { paper } = parseQuery(request, recordPdfQuerySchema)
    const source = await workOnTest(context, request, id, (work) => readRecord(context, work, id))
    const { opened, state } = recordOf(source)
    const files = await recordFiles(context, opened.shop.id, state.attachments, MOST_ON_PAPER)
    // Set whole before the first byte goes out: what can't be set is answered as a problem, not as half a file.
    const document = recordPdf(source, { paper, files, checkAddress: `${originOf(context.config, request)}/check` })
    response.attachment(recordFileName(opened, 'pdf')).type('application/pdf')
    await pipeline(document, response)
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

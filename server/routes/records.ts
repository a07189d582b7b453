import { pipeline } from 'node:stream/promises'
import { Router } from 'express'
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
import { ledgerFile } from '../services/ledger-files'
import { shopOfPress } from '../services/press-register'
import { shopOfProofTest } from '../services/proof-test-register'
import { recordFiles } from '../services/record-files'
import { readRecord } from '../services/records'
import { workOn } from './work'

const WORKBOOK = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet'

export function recordRoutes(context: AppContext): Router {
  const router = Router()

  router.get('/proof-tests/:proofTestId/record.xlsx', authenticate(context), async (request, response) => {
    const id = idParam(request, 'proofTestId')
    const shopOfIt = (transaction: Transaction) => shopOfProofTest(id, transaction)
    const source = await workOn(context, request, 'This proof test', shopOfIt, (work) => readRecord(context, work, id))
    const { opened, state } = recordOf(source)
    // Written after the transaction: a spreadsheet takes longer than a connection should be held.
    const files = await recordFiles(context, opened.shop.id, state.attachments)
    const workbook = await recordWorkbook(source, files)
    response.attachment(recordFileName(opened)).type(WORKBOOK).send(workbook)
  })

  router.get('/proof-tests/:proofTestId/record.pdf', authenticate(context), async (request, response) => {
    const id = idParam(request, 'proofTestId')
    const { paper } = parseQuery(request, recordPdfQuerySchema)
    const shopOfIt = (transaction: Transaction) => shopOfProofTest(id, transaction)
    const source = await workOn(context, request, 'This proof test', shopOfIt, (work) => readRecord(context, work, id))
    const { opened, state } = recordOf(source)
    const files = await recordFiles(context, opened.shop.id, state.attachments, MOST_ON_PAPER)
    // Set whole before the first byte goes out: what can't be set is answered as a problem, not as half a file.
    const document = recordPdf(source, { paper, files, checkAddress: `${originOf(context.config, request)}/check` })
    response.attachment(recordFileName(opened, 'pdf')).type('application/pdf')
    await pipeline(document, response)
  })

  const ledgers = [
    { subject: 'proof-test', what: 'This proof test', path: '/proof-tests/:id/ledger.json', shopOf: shopOfProofTest },
    { subject: 'press', what: 'This press', path: '/presses/:id/ledger.json', shopOf: shopOfPress },
  ] as const
  for (const { subject, what, path, shopOf } of ledgers) {
    router.get(path, authenticate(context), async (request, response) => {
      const id = idParam(request, 'id')
      const shopOfIt = (transaction: Transaction) => shopOf(id, transaction)
      const { name, text } = await workOn(context, request, what, shopOfIt, (work) => ledgerFile(context, work, subject, id))
      response.attachment(name).type('application/json').send(Buffer.from(text, 'utf8'))
    })
  }

  return router
}

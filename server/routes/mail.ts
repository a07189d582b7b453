import { Router } from 'express'
import type { Request } from 'express'
import type { Transaction } from 'sequelize'
import { mailListQuerySchema } from '#shared/api/mail'
import type { AppContext } from '../context'
import { authenticate } from '../middleware/authenticate'
import { originOf } from '../middleware/origin'
import { idParam, parseQuery, shopOf } from '../middleware/validate'
import { presentMail, presentMailList } from '../presenters/mail'
import { listMail, readMail, retryMail, shopOfMail } from '../services/mail'
import { workIn, workOn } from './work'

/** The shop's letters: the tray that the owner reads where there is no mail server, and the log where there is one. */
export function mailRoutes(context: AppContext): Router {
  const router = Router()
  const isTray = context.config.mail === undefined
  const shopOfIt = (id: string) => (transaction: Transaction) => shopOfMail(id, transaction)
  const where = (request: Request) => ({ isTray, origin: originOf(context.config, request) })
  router.use('/mail', authenticate(context))

  router.get('/mail', async (request, response) => {
    const shopId = shopOf(request)
    const query = parseQuery(request, mailListQuerySchema)
    response.json(presentMailList(await workIn(context, request, shopId, (work) => listMail(work, query)), isTray))
  })

  router.get('/mail/:id', async (request, response) => {
    const id = idParam(request, 'id')
    const mail = await workOn(context, request, 'This letter', shopOfIt(id), (work) => readMail(work, id))
    response.json(presentMail(mail, where(request)))
  })

  router.post('/mail/:id/retry', async (request, response) => {
    const id = idParam(request, 'id')
    const mail = await workOn(context, request, 'This letter', shopOfIt(id), (work) => retryMail(work, id))
    response.json(presentMail(mail, where(request)))
  })

  return router
}

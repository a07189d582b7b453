import { Router } from 'express'
import type { Transaction } from 'sequelize'
import {
  acceptRequestSchema,
  forgottenPasswordRequestSchema,
  inviteRequestSchema,
  lookRequestSchema,
  newPasswordRequestSchema,
} from '#shared/api/invitations'
import type { AppContext } from '../context'
import { authenticate } from '../middleware/authenticate'
import { idParam, parseBody, shopOf } from '../middleware/validate'
import { acceptInvitation, lookAtInvitation } from '../services/accept-invitation'
import { invite, listInvitations, revokeInvitation, shopOfInvitation } from '../services/invitations'
import { askForReset, lookAtReset, useReset } from '../services/password-resets'
import { clientOf, sendSignedIn } from './session'
import { workIn, workOn } from './work'

/** Invitations, and links for a forgotten password. Secrets of links come in bodies: addresses end up in logs. */
export function invitationRoutes(context: AppContext): Router {
  const router = Router()

  router.post('/invitations/look', async (request, response) => {
    response.json(await lookAtInvitation(context, parseBody(request, lookRequestSchema).token))
  })

  router.post('/invitations/accept', async (request, response) => {
    const body = parseBody(request, acceptRequestSchema)
    await sendSignedIn(context, response, await acceptInvitation(context, body, clientOf(request)), 201)
  })

  router.get('/invitations', authenticate(context), async (request, response) => {
    response.json(await workIn(context, request, shopOf(request), listInvitations))
  })

  router.post('/invitations', authenticate(context), async (request, response) => {
    const body = parseBody(request, inviteRequestSchema)
    const { id } = await workIn(context, request, shopOf(request), (work) => invite(context.database, work, body))
    response.status(201).json({ id })
  })

  router.delete('/invitations/:id', authenticate(context), async (request, response) => {
    const id = idParam(request, 'id')
    const shopOfIt = (transaction: Transaction) => shopOfInvitation(id, transaction)
    await workOn(context, request, 'This invitation', shopOfIt, (work) => revokeInvitation(work, id))
    response.status(204).end()
  })

  router.post('/password-resets', async (request, response) => {
    const { email } = parseBody(request, forgottenPasswordRequestSchema)
    await askForReset(context, email, clientOf(request).address)
    response.status(202).json({})
  })

  router.post('/password-resets/look', async (request, response) => {
    await lookAtReset(context, parseBody(request, lookRequestSchema).token)
    response.status(204).end()
  })

  router.post('/password-resets/use', async (request, response) => {
    const { token, newPassword } = parseBody(request, newPasswordRequestSchema)
    await useReset(context, token, newPassword)
    response.status(204).end()
  })

  return router
}

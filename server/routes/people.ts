import { Router } from 'express'
import { addPersonRequestSchema, changePersonRequestSchema } from '#shared/api/people'
import type { PeopleResponse } from '#shared/api/people'
import type { AppContext } from '../context'
import { authenticate } from '../middleware/authenticate'
import { idParam, parseBody, shopOf } from '../middleware/validate'
import { presentPerson } from '../presenters/people'
import { addPerson, changePerson, listPeople } from '../services/people'
import { hashPassword } from '../services/passwords'
import { workIn } from './work'

export function peopleRoutes(context: AppContext): Router {
  const router = Router()
  router.use('/people', authenticate(context))

  router.get('/people', async (request, response) => {
    const answer = await workIn(context, request, shopOf(request), async (work): Promise<PeopleResponse> => {
      const people = await listPeople(work)
      return { people: people.map((person) => presentPerson(work.actor, person)) }
    })
    response.json(answer)
  })

  router.post('/people', async (request, response) => {
    const { password, ...person } = parseBody(request, addPersonRequestSchema)
    const passwordHash = await hashPassword(password, context.config.bcryptCost)
    const added = await workIn(context, request, shopOf(request), async (work) =>
      presentPerson(work.actor, await addPerson(work, person, passwordHash)),
    )
    response.status(201).json(added)
  })

  router.patch('/people/:userId', async (request, response) => {
    const userId = idParam(request, 'userId')
    const change = parseBody(request, changePersonRequestSchema)
    const changed = await workIn(context, request, shopOf(request), async (work) =>
      presentPerson(work.actor, await changePerson(work, userId, change)),
    )
    response.json(changed)
  })

  return router
}

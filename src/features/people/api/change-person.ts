import { useMutation, useQueryClient } from '@tanstack/react-query'
import { personSchema, type ChangePersonRequest } from '#shared/api/people'
import { api } from '../../../lib/api-client'
import { peopleQuery } from './get-people'
import { sessionQuery } from './get-session'

type Change = { userId: string; change: ChangePersonRequest }

const changePerson = (shopId: string, { userId, change }: Change) =>
  api.send('PATCH', personSchema, `/api/people/${encodeURIComponent(userId)}`, change, { query: { shop: shopId } })

/** Another role, or the end of someone's time in the shop; one's own role may be the one that changed. */
export function useChangePerson(shopId: string) {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (change: Change) => changePerson(shopId, change),
    onSuccess: () =>
      Promise.all([
        client.invalidateQueries({ queryKey: peopleQuery(shopId).queryKey }),
        client.invalidateQueries({ queryKey: sessionQuery().queryKey }),
      ]),
  })
}

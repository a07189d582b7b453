import { useMutation, useQueryClient } from '@tanstack/react-query'
import { personSchema, type AddPersonRequest } from '#shared/api/people'
import { api } from '../../../lib/api-client'
import { peopleQuery } from './get-people'

const addPerson = (shopId: string, request: AddPersonRequest) =>
  api.send('POST', personSchema, '/api/people', request, { query: { shop: shopId } })

export function useAddPerson(shopId: string) {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (request: AddPersonRequest) => addPerson(shopId, request),
    onSuccess: () => client.invalidateQueries({ queryKey: peopleQuery(shopId).queryKey }),
  })
}

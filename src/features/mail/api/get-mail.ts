import { keepPreviousData, queryOptions, useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import { mailListSchema, mailResponseSchema, type MailState } from '#shared/api/mail'
import { api } from '../../../lib/api-client'

export interface MailAsked {
  shop: string
  state?: MailState
  cursor?: string
}

/** A shop's letters; asked again by itself, since they move without anybody here. */
export const useMailList = (asked: MailAsked) =>
  useQuery({
    queryKey: ['mail', asked] as const,
    queryFn: ({ signal }) => api.get(mailListSchema, '/api/mail', { query: { ...asked }, signal }),
    placeholderData: keepPreviousData,
    refetchInterval: 10_000,
  })

const letterQuery = (id: string) =>
  queryOptions({
    queryKey: ['letter', id] as const,
    queryFn: ({ signal }) => api.get(mailResponseSchema, `/api/mail/${encodeURIComponent(id)}`, { signal }),
    refetchInterval: 10_000,
  })
export const useLetter = (id: string) => useQuery(letterQuery(id))

/** Has a letter that was given up tried again. */
export function useRetry(id: string) {
  const client = useQueryClient()
  return useMutation({
    mutationFn: () => api.send('POST', mailResponseSchema, `/api/mail/${encodeURIComponent(id)}/retry`, {}),
    onSuccess: (answer) => client.setQueryData(letterQuery(id).queryKey, answer),
  })
}

import { keepPreviousData, queryOptions, useQuery } from '@tanstack/react-query'
import { testListSchema, type TestListQuery } from '#shared/api/proof-tests'
import { api } from '../../../lib/api-client'
import { useLive } from '../../../lib/use-live'

/** What of the register is asked for; all tests, newest first, unless said otherwise. */
export type TestsAsked = Pick<TestListQuery, 'shop'> & Partial<TestListQuery>

const fetchProofTests = (asked: TestsAsked, signal?: AbortSignal) => api.get(testListSchema, '/api/proof-tests', { query: asked, signal })

const testsKey = (asked: TestsAsked) => ['proof-tests', asked.shop, asked] as const

export const proofTestsQuery = (asked: TestsAsked) =>
  queryOptions({
    queryKey: testsKey(asked),
    queryFn: ({ signal }) => fetchProofTests(asked, signal),
  })

/** A page of the register. The page before stays in place until the next one is here. */
export function useProofTests(asked: TestsAsked) {
  const query = useQuery({ ...proofTestsQuery(asked), placeholderData: keepPreviousData })
  const unfinished = query.data?.proofTests.filter(({ status }) => status === 'under way' || status === 'stopped') ?? []
  useLive(
    unfinished.map(({ id }) => id),
    testsKey(asked),
  )
  return query
}

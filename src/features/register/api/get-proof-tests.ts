import { keepPreviousData, queryOptions, useQuery } from '@tanstack/react-query'
import { testListSchema, type TestListQuery } from '#shared/api/proof-tests'
import { api } from '../../../lib/api-client'

/** What of the register is asked for; all tests, newest first, unless said otherwise. */
export type TestsAsked = Pick<TestListQuery, 'shop'> & Partial<TestListQuery>

const fetchProofTests = (asked: TestsAsked, signal?: AbortSignal) => api.get(testListSchema, '/api/proof-tests', { query: asked, signal })

export const proofTestsQuery = (asked: TestsAsked) =>
  queryOptions({
    queryKey: ['proof-tests', asked.shop, asked] as const,
    queryFn: ({ signal }) => fetchProofTests(asked, signal),
  })

/** A page of the register. The page before stays in place until the next one is here. */
export const useProofTests = (asked: TestsAsked) => useQuery({ ...proofTestsQuery(asked), placeholderData: keepPreviousData })

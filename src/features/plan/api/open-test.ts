import { useMutation, useQueryClient } from '@tanstack/react-query'
import { openTestResponseSchema, type OpenTestRequest } from '#shared/api/proof-tests'
import { api } from '../../../lib/api-client'
import { files } from '../../../lib/attachments'

const openTest = (shopId: string, request: OpenTestRequest) =>
  api.send('POST', openTestResponseSchema, '/api/proof-tests', request, { query: { shop: shopId } })

/** Opens the test. The same plan sent again answers the same test. */
export function useOpenTest(shopId: string) {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (request: OpenTestRequest) => openTest(shopId, request),
    onSuccess: (_answer, { id, attachments = [] }) => {
      // What goes wrong here is tried again at the next start.
      files
        .named(
          `ledger:${id}`,
          attachments.map(({ sha256 }) => sha256),
        )
        .catch(() => undefined)
      return Promise.all(
        [['proof-tests'], ['presses'], ['press'], ['planned-press'], ['today']].map((queryKey) => client.invalidateQueries({ queryKey })),
      )
    },
  })
}

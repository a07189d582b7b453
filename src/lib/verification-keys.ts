import { useQuery } from '@tanstack/react-query'
import { verificationKeysSchema, type ServedKey } from '#shared/api/verification'
import { api } from './api-client'

/**
 * The public keys that the server's seals are checked with; undefined until they are here, `failed` when they don't
 * come. `kids` are the keys that are asked for: one that was not known a moment ago has them fetched anew.
 */
export function useVerificationKeys(kids: readonly string[] = []): { keys: readonly ServedKey[] | undefined; failed: boolean } {
  const { data, isError } = useQuery({
    queryKey: ['verification-keys', [...new Set(kids)].sort().join(' ')] as const,
    queryFn: ({ signal }) => api.get(verificationKeysSchema, '/api/verification/keys', { signal }),
    staleTime: 60_000,
  })
  return { keys: data?.keys, failed: isError }
}

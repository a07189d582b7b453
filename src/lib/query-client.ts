import { QueryClient } from '@tanstack/react-query'
import { Disconnected } from './problem'

/** A refusal is an answer and isn't asked again; a lost link is tried twice more, a second apart. */
export function createQueryClient(): QueryClient {
  return new QueryClient({
    defaultOptions: {
      queries: {
        staleTime: 15_000,
        networkMode: 'always',
        retry: (count, error) => error instanceof Disconnected && count < 2,
        retryDelay: 1000,
      },
      mutations: { networkMode: 'always', retry: false },
    },
  })
}

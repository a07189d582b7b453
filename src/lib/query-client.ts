import { QueryCache, QueryClient } from '@tanstack/react-query'
import { Disconnected, isSignedOut } from './problem'

/** A refusal is an answer and isn't asked again; a lost link is tried twice more, a second apart. `onSignedOut` hears which query found the session ended. */
export function createQueryClient(onSignedOut: (client: QueryClient, queryKey: readonly unknown[]) => void): QueryClient {
  const client: QueryClient = new QueryClient({
    queryCache: new QueryCache({
      onError: (error, query) => {
        if (isSignedOut(error)) onSignedOut(client, query.queryKey)
      },
    }),
    defaultOptions: {
      queries: {
        staleTime: 15_000,
        networkMode: 'always',
        refetchOnReconnect: true,
        retry: (count, error) => error instanceof Disconnected && count < 2,
        retryDelay: 1000,
      },
      mutations: { networkMode: 'always', retry: false },
    },
  })
  return client
}

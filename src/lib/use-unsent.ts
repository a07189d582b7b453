import { useSyncExternalStore } from 'react'
import { outbox, type OutboxSummary } from './outbox'

/** What this browser keeps, over all ledgers and people. */
export const useOutboxSummary = (): OutboxSummary => useSyncExternalStore(outbox.subscribe, outbox.summary)

/** How many entries the server has not answered for, whoever made them. */
export const useUnsent = (): number => useOutboxSummary().unsent

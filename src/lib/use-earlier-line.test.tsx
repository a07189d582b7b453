import { QueryClientProvider } from '@tanstack/react-query'
import { renderHook, waitFor } from '@testing-library/react'
import type { ReactNode } from 'react'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import type { Opened } from '#shared/proof-test/entries'
import { historyOf } from '#shared/proof-test/climb-history'
import { firstClimb, recordedTest } from '../../tests/factories/recorded-test'
import { openedPayload } from '../../tests/factories/test-press'
import { createQueryClient } from './query-client'
import { useEarlierLine } from './use-earlier-line'

const old = recordedTest({ climbs: [firstClimb] })
const opened = { ...openedPayload(), repeats: { id: old.id, number: 'PT-0041' } }

let asked: string[] = []

function hook(first: { ask: boolean }, of: Opened = opened) {
  const client = createQueryClient(() => undefined)
  const wrapper = ({ children }: { children: ReactNode }) => <QueryClientProvider client={client}>{children}</QueryClientProvider>
  return renderHook(({ ask }) => useEarlierLine(of, 0, ask), { wrapper, initialProps: first })
}

describe('the line of the test that a run repeats', () => {
  beforeEach(() => {
    asked = []
    vi.stubGlobal('fetch', (url: string) => {
      asked.push(url)
      return Promise.resolve(new Response(JSON.stringify({ climbs: historyOf(old.state) })))
    })
  })
  afterEach(() => vi.unstubAllGlobals())

  it('is not asked for under load, and stays drawn once it is here', async () => {
    const { result, rerender } = hook({ ask: false })
    expect(asked).toEqual([])
    rerender({ ask: true })
    await waitFor(() => expect(result.current?.points).toHaveLength(5))
    rerender({ ask: false })
    expect(result.current?.points).toHaveLength(5)
    expect(asked).toHaveLength(1)
  })

  it('is left out, and nothing waits for it, where it can’t be fetched', async () => {
    vi.stubGlobal('fetch', (url: string) => {
      asked.push(url)
      return Promise.reject(new TypeError('Failed to fetch'))
    })
    const { result } = hook({ ask: true })
    await waitFor(() => expect(asked).toHaveLength(1))
    expect(result.current).toBeUndefined()
  })

  it('is not asked for by a test that repeats none', () => {
    hook({ ask: true }, { ...openedPayload(), repeats: null })
    expect(asked).toEqual([])
  })
})

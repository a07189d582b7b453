import { format } from 'node:util'
import { afterEach, beforeEach, expect, vi } from 'vitest'
import type { MockInstance } from 'vitest'

// A warning that nobody reads hides the one that matters: whatever a test makes the console say, fails it.
const said: string[] = []
let spies: MockInstance[] = []
const levels = ['debug', 'info', 'log', 'warn', 'error'] as const

beforeEach(() => {
  said.length = 0
  spies = levels.map((level) =>
    vi.spyOn(console, level).mockImplementation((...args: unknown[]) => {
      said.push(`${level}: ${format(...args)}`)
    }),
  )
})

afterEach(() => {
  for (const spy of spies) spy.mockRestore()
  expect(said, 'the console stays quiet').toEqual([])
})

import { format } from 'node:util'
import { afterEach, beforeEach, expect, vi } from 'vitest'

// A warning that nobody reads hides the one that matters: whatever a test makes the console say, fails it.
const said: string[] = []
const levels = ['debug', 'info', 'log', 'warn', 'error'] as const

beforeEach(() => {
  said.length = 0
  for (const level of levels) {
    vi.spyOn(console, level).mockImplementation((...args: unknown[]) => {
      said.push(`${level}: ${format(...args)}`)
    })
  }
})

afterEach(() => {
  for (const level of levels) vi.mocked(console[level]).mockRestore()
  expect(said, 'the console stays quiet').toEqual([])
})

import { expect, it } from 'vitest'
import { openedPayload } from '../../tests/factories/test-press'
import { marginWords, uncertaintyWords } from './criterion-words'

it('says an uncertainty in the unit of what it belongs to', () => {
  const opened = openedPayload()
  expect(uncertaintyWords(opened, { id: 'softening', U: 0.061 })).toBe('± 6.1 %')
  expect(uncertaintyWords(opened, { id: 'set', U: 0.000021 })).toMatch(/^± 0\.02\smm$/)
  expect(uncertaintyWords(opened, { id: 'rating', U: 889.6443 })).toMatch(/^± 0\.10\sshort tons$/)
  expect(uncertaintyWords(opened, { id: 'joints-after', U: null })).toBe('—')
})

it('says how far a value stays below its limit, with a minus where it is beyond', () => {
  const opened = openedPayload()
  expect(marginWords(opened, { id: 'softening', value: 0.04, limit: 0.15 })).toBe('11.0 %')
  expect(marginWords(opened, { id: 'pressure-loss', value: 0.062, limit: 0.05 })).toBe('−1.2 %')
  expect(marginWords(opened, { id: 'creep', value: 0.00003, limit: 0.00002 })).toMatch(/^−0\.01\smm$/)
  expect(marginWords(opened, { id: 'rating', value: 88964.43, limit: 133446.6 })).toMatch(/^5\.00\sshort tons$/)
  expect(marginWords(opened, { id: 'stage-reached', value: 0.99, limit: null })).toBe('—')
  expect(marginWords(opened, { id: 'prediction', value: 0.0017, limit: 0.0018 })).toBe('—')
})

import { expect, it } from 'vitest'
import { openedPayload } from '../../tests/factories/test-press'
import { uncertaintyWords } from './criterion-words'

it('says an uncertainty in the unit of what it belongs to', () => {
  const opened = openedPayload()
  expect(uncertaintyWords(opened, { id: 'softening', U: 0.061 })).toBe('± 6.1 %')
  expect(uncertaintyWords(opened, { id: 'set', U: 0.000021 })).toMatch(/^± 0\.02\smm$/)
  expect(uncertaintyWords(opened, { id: 'rating', U: 889.6443 })).toMatch(/^± 0\.10\sshort tons$/)
  expect(uncertaintyWords(opened, { id: 'joints-after', U: null })).toBe('—')
})

// @vitest-environment jsdom
import { act, cleanup, renderHook } from '@testing-library/react'
import { useForm } from 'react-hook-form'
import { afterEach, describe, expect, it } from 'vitest'
import { Disconnected, readProblem } from './problem'
import { useProblemFields } from './use-problem-fields'

afterEach(cleanup)

function formWithProblem(error: unknown) {
  const { result } = renderHook(() => {
    const form = useForm({ defaultValues: { name: 'Press 2', ratedLoad: { text: '12', unit: 'short-ton' } } })
    form.register('name')
    // Reading the errors subscribes to them.
    return { form, errors: form.formState.errors, show: useProblemFields(form) }
  })
  act(() => result.current.show(error))
  return result.current
}

const refusal = (fields?: Record<string, string>) =>
  readProblem(422, {
    type: 'about:blank',
    title: 'Not taken',
    status: 422,
    code: 'fields',
    detail: 'Two fields have to be put right.',
    fields,
  })

describe('a refusal of the server on a form', () => {
  it('stands at the fields it names, down to a part of a quantity, and not above the form as well', () => {
    const { errors } = formWithProblem(refusal({ name: 'Another press has this name.', 'ratedLoad.text': 'Above the ram’s rating.' }))
    expect(errors.name?.message).toBe('Another press has this name.')
    expect(errors.ratedLoad?.text?.message).toBe('Above the ram’s rating.')
    expect(errors.root).toBeUndefined()
  })

  it('says above the form what no field of it can say', () => {
    const { errors } = formWithProblem(refusal({ frame: 'Choose a kind of frame.' }))
    expect(errors.root?.message).toBe('Two fields have to be put right. Choose a kind of frame.')
  })

  it('keeps what was typed when nothing answers, and says that it does', () => {
    const { form, errors } = formWithProblem(new Disconnected())
    expect(errors.root?.message).toMatch(/^Not connected to the server\./)
    expect(form.getValues('name')).toBe('Press 2')
  })
})

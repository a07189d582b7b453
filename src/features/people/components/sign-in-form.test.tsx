import { QueryClientProvider } from '@tanstack/react-query'
import { render, screen } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { afterEach, describe, expect, it, vi } from 'vitest'
import { createQueryClient } from '../../../lib/query-client'
import { SignInForm } from './sign-in-form'

const session = {
  user: { id: '01990000-0000-7000-8000-000000000001', name: 'Ida Marsh', email: 'ida@people.example' },
  shops: [],
  expiresAt: '2026-09-15T10:00:00.000Z',
}

function show(status: number, body: unknown) {
  const answer = vi.fn((_url: string, _init: { body: string }) => Promise.resolve(new Response(JSON.stringify(body), { status })))
  vi.stubGlobal('fetch', answer)
  const onSignedIn = vi.fn()
  render(
    <QueryClientProvider client={createQueryClient(() => undefined)}>
      <SignInForm onSignedIn={onSignedIn} />
    </QueryClientProvider>,
  )
  return { answer, onSignedIn }
}

const press = () => userEvent.click(screen.getByRole('button', { name: 'Sign in' }))
const email = () => screen.getByLabelText('E-mail')
const password = () => screen.getByLabelText('Password')

describe('signing in', () => {
  afterEach(() => vi.unstubAllGlobals())

  it('sends what was typed, and goes on', async () => {
    const { answer, onSignedIn } = show(200, session)
    await userEvent.type(email(), 'ida@people.example')
    await userEvent.type(password(), 'long enough to be one{Enter}')
    await vi.waitFor(() => expect(onSignedIn).toHaveBeenCalledOnce())
    expect(JSON.parse(answer.mock.calls[0]?.[1].body ?? '')).toEqual({ email: 'ida@people.example', password: 'long enough to be one' })
  })

  it('says at the field what is missing, and sends nothing', async () => {
    const { answer } = show(200, session)
    await press()
    expect(email()).toBeInvalid()
    expect(email()).toHaveFocus()
    expect(password()).toHaveAccessibleDescription(/password/i)
    expect(answer).not.toHaveBeenCalled()
  })

  it('says what the server says, and keeps what was typed', async () => {
    const detail = 'The e-mail address and the password do not go together.'
    const { onSignedIn } = show(401, { type: 'about:blank', title: 'Unauthorized', status: 401, code: 'wrong-password', detail })
    await userEvent.type(email(), 'ida@people.example')
    await userEvent.type(password(), 'not the one')
    await press()
    expect(await screen.findByRole('alert')).toHaveTextContent(detail)
    expect(email()).toHaveValue('ida@people.example')
    expect(password()).toHaveValue('not the one')
    expect(onSignedIn).not.toHaveBeenCalled()
  })
})

import { useState, type FormEvent } from 'react'
import { signInRequestSchema } from '#shared/api/session'
import { Button } from '../../../components/button'
import { PasswordField, TextField } from '../../../components/field'
import { Form, FormError } from '../../../components/form'
import { ProblemError, sayWhatFailed } from '../../../lib/problem'
import { useSignIn } from '../api/sign-in'

/** What is wrong with the form as it was sent last, by field; "" for the form as a whole. */
type Wrong = Readonly<Partial<Record<'email' | 'password' | '', string>>>

const ofServer = (error: unknown): Wrong =>
  error instanceof ProblemError && Object.keys(error.fields).length > 0 ? error.fields : { '': sayWhatFailed(error) }

/**
 * E-mail and password. Says what the server says when they don't fit; keeps what was typed. It does without the form
 * library: nothing else of the first screen needs it, and it would be a tenth of what that screen fetches.
 */
export function SignInForm({ onSignedIn }: { onSignedIn: () => void }) {
  const signIn = useSignIn()
  const [wrong, setWrong] = useState<Wrong>({})
  const [attempt, setAttempt] = useState(0)
  const show = (found: Wrong, form: HTMLFormElement) => {
    setWrong(found)
    setAttempt((before) => before + 1)
    const [first = ''] = Object.keys(found)
    const field = first === '' ? null : form.elements.namedItem(first)
    if (field instanceof HTMLElement) field.focus()
  }
  const submit = async (event: FormEvent<HTMLFormElement>) => {
    const form = event.currentTarget
    const asked = signInRequestSchema.safeParse(Object.fromEntries(new FormData(form)))
    if (!asked.success) {
      const found: Record<string, string> = {}
      for (const { path, message } of asked.error.issues) found[String(path[0])] ??= message
      show(found, form)
      return
    }
    try {
      await signIn.mutateAsync(asked.data)
      onSignedIn()
    } catch (error) {
      show(ofServer(error), form)
    }
  }
  return (
    <Form onSubmit={submit}>
      <FormError message={wrong['']} attempt={attempt} />
      <TextField
        label="E-mail"
        name="email"
        type="email"
        autoComplete="username"
        inputMode="email"
        autoCapitalize="none"
        spellCheck={false}
        autoFocus
        message={wrong.email}
      />
      <PasswordField label="Password" name="password" autoComplete="current-password" message={wrong.password} />
      <Button
        type="submit"
        kind="next"
        wide
        className="mt-1 min-h-16 text-20 desktop:min-h-16 desktop:text-20"
        busy={signIn.isPending && 'Signing in'}
      >
        Sign in
      </Button>
    </Form>
  )
}

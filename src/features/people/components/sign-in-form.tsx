import { zodResolver } from '@hookform/resolvers/zod'
import { useForm } from 'react-hook-form'
import { signInRequestSchema } from '#shared/api/session'
import { Button } from '../../../components/button'
import { PasswordField, TextField } from '../../../components/field'
import { Form, FormError } from '../../../components/form'
import { useProblemFields } from '../../../lib/use-problem-fields'
import { useSignIn } from '../api/sign-in'

/** E-mail and password. Says what the server says when they don't fit; keeps what was typed. */
export function SignInForm({ onSignedIn }: { onSignedIn: () => void }) {
  const signIn = useSignIn()
  const form = useForm({ resolver: zodResolver(signInRequestSchema), defaultValues: { email: '', password: '' } })
  const { errors, submitCount } = form.formState
  const showProblem = useProblemFields(form)
  return (
    <Form onSubmit={form.handleSubmit((request) => signIn.mutate(request, { onSuccess: onSignedIn, onError: showProblem }))}>
      <FormError message={errors.root?.message} attempt={submitCount} />
      <TextField
        label="E-mail"
        type="email"
        autoComplete="username"
        inputMode="email"
        autoCapitalize="none"
        spellCheck={false}
        autoFocus
        message={errors.email?.message}
        {...form.register('email')}
      />
      <PasswordField label="Password" autoComplete="current-password" message={errors.password?.message} {...form.register('password')} />
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

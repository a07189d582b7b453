import { zodResolver } from '@hookform/resolvers/zod'
import { useForm } from 'react-hook-form'
import { forgottenPasswordRequestSchema, RESET_MINUTES } from '#shared/api/invitations'
import { Button } from '../../../components/button'
import { TextField } from '../../../components/field'
import { Form, FormError } from '../../../components/form'
import { useProblemFields } from '../../../lib/use-problem-fields'
import { useForgottenPassword } from '../api/password-reset'

/** An address. Says the same whether it has an account. */
export function ForgottenForm() {
  const ask = useForgottenPassword()
  const form = useForm({ resolver: zodResolver(forgottenPasswordRequestSchema), defaultValues: { email: '' } })
  const { errors, submitCount } = form.formState
  const showProblem = useProblemFields(form)
  if (ask.isSuccess) {
    return (
      <div role="status" className="grid gap-2">
        <p className="text-20 font-semibold">Look into your mail</p>
        <p>
          If {ask.variables} has an account here, a link is on its way. It works once, for {RESET_MINUTES} minutes.
        </p>
        <p className="text-graphite">Nothing came? Look among unwanted mail, or ask the owner of your shop.</p>
      </div>
    )
  }
  return (
    <Form onSubmit={form.handleSubmit(({ email }) => ask.mutate(email, { onError: showProblem }))}>
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
      <Button
        type="submit"
        kind="next"
        wide
        className="mt-1 min-h-16 text-20 desktop:min-h-16 desktop:text-20"
        busy={ask.isPending && 'Sending'}
      >
        Send me a link
      </Button>
    </Form>
  )
}

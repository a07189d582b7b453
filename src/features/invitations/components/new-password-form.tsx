import { zodResolver } from '@hookform/resolvers/zod'
import { useForm } from 'react-hook-form'
import { z } from 'zod'
import { newPasswordSchema } from '#shared/api/session'
import { Button } from '../../../components/button'
import { PasswordField } from '../../../components/field'
import { Form, FormError } from '../../../components/form'
import { useProblemFields } from '../../../lib/use-problem-fields'
import { useNewPassword } from '../api/password-reset'

/** A new password, by a link from a letter. */
export function NewPasswordForm({ token, onSet }: { token: string; onSet: () => void }) {
  const set = useNewPassword()
  const form = useForm({ resolver: zodResolver(z.object({ newPassword: newPasswordSchema })), defaultValues: { newPassword: '' } })
  const { errors, submitCount } = form.formState
  const showProblem = useProblemFields(form)
  return (
    <Form onSubmit={form.handleSubmit(({ newPassword }) => set.mutate({ token, newPassword }, { onSuccess: onSet, onError: showProblem }))}>
      <FormError message={errors.root?.message} attempt={submitCount} />
      <PasswordField
        label="New password"
        hint="At least 10 characters. Every device signs in again with it."
        autoComplete="new-password"
        autoFocus
        message={errors.newPassword?.message}
        {...form.register('newPassword')}
      />
      <Button
        type="submit"
        kind="next"
        wide
        className="mt-1 min-h-16 text-20 desktop:min-h-16 desktop:text-20"
        busy={set.isPending && 'Setting it'}
      >
        Set this password
      </Button>
    </Form>
  )
}

import { zodResolver } from '@hookform/resolvers/zod'
import { useForm } from 'react-hook-form'
import { changePasswordRequestSchema } from '#shared/api/session'
import { Button } from '../../../components/button'
import { PasswordField } from '../../../components/field'
import { Form, FormActions, FormError } from '../../../components/form'
import { useProblemFields } from '../../../lib/use-problem-fields'
import { useChangePassword } from '../api/change-password'

/** The old password and a new one. Other devices of this person are signed out by it. */
export function ChangePasswordForm() {
  const change = useChangePassword()
  const form = useForm({ resolver: zodResolver(changePasswordRequestSchema), defaultValues: { currentPassword: '', newPassword: '' } })
  const { errors, submitCount } = form.formState
  const showProblem = useProblemFields(form)
  return (
    <Form
      className="max-w-md"
      onSubmit={form.handleSubmit((request) => change.mutate(request, { onSuccess: () => form.reset(), onError: showProblem }))}
    >
      <FormError message={errors.root?.message} attempt={submitCount} />
      <PasswordField
        label="Password now"
        autoComplete="current-password"
        message={errors.currentPassword?.message}
        {...form.register('currentPassword')}
      />
      <PasswordField
        label="New password"
        hint="At least 10 characters."
        autoComplete="new-password"
        message={errors.newPassword?.message}
        {...form.register('newPassword')}
      />
      <FormActions>
        <Button type="submit" kind="next" busy={change.isPending && 'Changing it'}>
          Change the password
        </Button>
        <p role="status" className="font-medium text-sound">
          {change.isSuccess && 'Changed. Your other devices are signed out.'}
        </p>
      </FormActions>
    </Form>
  )
}

import { zodResolver } from '@hookform/resolvers/zod'
import { useForm } from 'react-hook-form'
import { z } from 'zod'
import type { AcceptRequest, InvitationLook } from '#shared/api/invitations'
import { newPasswordSchema, passwordSchema, personNameSchema } from '#shared/api/session'
import { Button } from '../../../components/button'
import { PasswordField, TextField } from '../../../components/field'
import { Form, FormError } from '../../../components/form'
import { useProblemFields } from '../../../lib/use-problem-fields'

interface AcceptFormProps {
  token: string
  invitation: InvitationLook
  busy: boolean
  accept: (request: AcceptRequest, failed: (error: unknown) => void) => void
}

const large = 'mt-1 min-h-16 text-20 desktop:min-h-16 desktop:text-20'

/** A new account: the name as it prints on records, and a password. */
function NewAccount({ token, invitation, busy, accept }: AcceptFormProps) {
  const form = useForm({
    resolver: zodResolver(z.object({ name: personNameSchema, newPassword: newPasswordSchema })),
    defaultValues: { name: '', newPassword: '' },
  })
  const { errors, submitCount } = form.formState
  const showProblem = useProblemFields(form)
  return (
    <Form onSubmit={form.handleSubmit((request) => accept({ token, ...request }, showProblem))}>
      <FormError message={errors.root?.message} attempt={submitCount} />
      <TextField label="E-mail" value={invitation.email} readOnly autoComplete="username" />
      <TextField label="Your name, as it prints on records" autoComplete="name" message={errors.name?.message} {...form.register('name')} />
      <PasswordField
        label="A password"
        hint="At least 10 characters. Signing a record asks for it again."
        autoComplete="new-password"
        message={errors.newPassword?.message}
        {...form.register('newPassword')}
      />
      <Button type="submit" kind="next" wide className={large} busy={busy && 'Accepting'}>
        Accept
      </Button>
    </Form>
  )
}

/** Somebody who has an account: its password. */
function KnownAccount({ token, invitation, busy, accept }: AcceptFormProps) {
  const form = useForm({ resolver: zodResolver(z.object({ password: passwordSchema })), defaultValues: { password: '' } })
  const { errors, submitCount } = form.formState
  const showProblem = useProblemFields(form)
  return (
    <Form onSubmit={form.handleSubmit((request) => accept({ token, ...request }, showProblem))}>
      <FormError message={errors.root?.message} attempt={submitCount} />
      <TextField label="E-mail" value={invitation.email} readOnly autoComplete="username" />
      <PasswordField
        label="Password of your account"
        hint="This address has an account already. You keep your name."
        autoComplete="current-password"
        message={errors.password?.message}
        {...form.register('password')}
      />
      <Button type="submit" kind="next" wide className={large} busy={busy && 'Accepting'}>
        Sign in and accept
      </Button>
    </Form>
  )
}

export function AcceptForm(props: AcceptFormProps) {
  return props.invitation.hasAccount ? <KnownAccount {...props} /> : <NewAccount {...props} />
}

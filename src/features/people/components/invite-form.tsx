import { zodResolver } from '@hookform/resolvers/zod'
import { useForm } from 'react-hook-form'
import { INVITATION_DAYS, inviteRequestSchema } from '#shared/api/invitations'
import type { Role } from '#shared/policy'
import { Button } from '../../../components/button'
import { TextField } from '../../../components/field'
import { Form, FormActions, FormError } from '../../../components/form'
import { RadioRow } from '../../../components/radio-row'
import { useProblemFields } from '../../../lib/use-problem-fields'
import { useInvite } from '../api/invitations'
import { roleChoices, roleNotes } from './roles'

type InviteFormProps = { shopId: string; onInvited: (email: string) => void; onLeave: () => void }

/** An address and a role: the person chooses name and password on the page that the letter leads to. */
export function InviteForm({ shopId, onInvited, onLeave }: InviteFormProps) {
  const invite = useInvite(shopId)
  const form = useForm({
    resolver: zodResolver(inviteRequestSchema.options[0]),
    defaultValues: { kind: 'member' as const, email: '', role: 'crew' as Role },
  })
  const { errors, submitCount } = form.formState
  const showProblem = useProblemFields(form)
  return (
    <Form
      className="gap-x-8 desktop:grid-cols-2"
      onSubmit={form.handleSubmit((request) => invite.mutate(request, { onSuccess: () => onInvited(request.email), onError: showProblem }))}
    >
      <div className="empty:hidden desktop:col-span-2">
        <FormError message={errors.root?.message} attempt={submitCount} />
      </div>
      <div className="grid content-start gap-4">
        <TextField
          label="E-mail"
          type="email"
          autoComplete="off"
          inputMode="email"
          autoCapitalize="none"
          spellCheck={false}
          autoFocus
          hint={`A link goes there. It works once, for ${INVITATION_DAYS} days.`}
          message={errors.email?.message}
          {...form.register('email')}
        />
      </div>
      <RadioRow
        label="Role"
        stacked
        choices={roleChoices.map((choice) => ({ ...choice, note: roleNotes[choice.value] }))}
        message={errors.role?.message}
        {...form.register('role')}
      />
      <FormActions>
        <Button type="submit" kind="next" busy={invite.isPending && 'Sending'}>
          Send the invitation
        </Button>
        <Button onClick={onLeave}>Leave it</Button>
      </FormActions>
    </Form>
  )
}

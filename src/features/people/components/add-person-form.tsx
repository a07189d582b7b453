import { zodResolver } from '@hookform/resolvers/zod'
import { useForm } from 'react-hook-form'
import { addPersonRequestSchema, type Person } from '#shared/api/people'
import type { Role } from '#shared/policy'
import { Button } from '../../../components/button'
import { PasswordField, TextField } from '../../../components/field'
import { Form, FormActions, FormError } from '../../../components/form'
import { RadioRow } from '../../../components/radio-row'
import { useProblemFields } from '../../../lib/use-problem-fields'
import { useAddPerson } from '../api/add-person'
import { roleChoices, roleNotes } from './roles'

type AddPersonFormProps = { shopId: string; onAdded: (person: Person) => void; onLeave: () => void }

/** A person, the role, and a first password to hand over. */
export function AddPersonForm({ shopId, onAdded, onLeave }: AddPersonFormProps) {
  const add = useAddPerson(shopId)
  const form = useForm({
    resolver: zodResolver(addPersonRequestSchema),
    defaultValues: { name: '', email: '', role: 'crew' as Role, password: '' },
  })
  const { errors, submitCount } = form.formState
  const showProblem = useProblemFields(form)
  return (
    <Form
      className="gap-x-8 desktop:grid-cols-2"
      onSubmit={form.handleSubmit((request) => add.mutate(request, { onSuccess: onAdded, onError: showProblem }))}
    >
      <div className="empty:hidden desktop:col-span-2">
        <FormError message={errors.root?.message} attempt={submitCount} />
      </div>
      <div className="grid content-start gap-4">
        <TextField
          label="Name, as it prints on records"
          autoComplete="off"
          autoFocus
          message={errors.name?.message}
          {...form.register('name')}
        />
        <TextField
          label="E-mail"
          type="email"
          autoComplete="off"
          inputMode="email"
          autoCapitalize="none"
          spellCheck={false}
          message={errors.email?.message}
          {...form.register('email')}
        />
        <PasswordField
          label="First password"
          hint="Hand it over in person, to be changed after signing in. Whoever has an account already keeps their own."
          autoComplete="new-password"
          message={errors.password?.message}
          {...form.register('password')}
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
        <Button type="submit" kind="next" busy={add.isPending && 'Adding'}>
          Add this person
        </Button>
        <Button onClick={onLeave}>Leave it</Button>
      </FormActions>
    </Form>
  )
}

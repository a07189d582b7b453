import { zodResolver } from '@hookform/resolvers/zod'
import { useForm } from 'react-hook-form'
import { PRESS_PAYLOADS } from '#shared/press/entries'
import { Button } from '../../../../components/button'
import { TextArea } from '../../../../components/field'
import { Form, FormActions, FormError } from '../../../../components/form'
import { useProblemFields } from '../../../../lib/use-problem-fields'
import type { Sending } from './sending'

/** Takes the clearance away, with the reason. */
export function WithdrawForm({ send, busy, onDone, onLeave }: Sending & { onDone: () => void; onLeave: () => void }) {
  const form = useForm({ resolver: zodResolver(PRESS_PAYLOADS.withdrawn), defaultValues: { why: '' } })
  const { errors, submitCount } = form.formState
  const onError = useProblemFields(form)
  return (
    <Form onSubmit={form.handleSubmit((payload) => send([{ kind: 'withdrawn', payload }], { onSuccess: onDone, onError }))}>
      <FormError message={errors.root?.message} attempt={submitCount} />
      <TextArea
        label="Why the press is not to be used"
        hint="The clearance ends with it; the tag is to come off the press. Only a proof test clears it again."
        message={errors.why?.message}
        {...form.register('why')}
      />
      <FormActions>
        <Button type="submit" kind="stop" busy={busy && 'Withdrawing it'}>
          Withdraw it from use
        </Button>
        <Button onClick={onLeave}>Leave it</Button>
      </FormActions>
    </Form>
  )
}

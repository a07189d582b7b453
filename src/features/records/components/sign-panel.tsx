import { zodResolver } from '@hookform/resolvers/zod'
import type { ReactNode } from 'react'
import { useForm } from 'react-hook-form'
import { z } from 'zod'
import { Button } from '../../../components/button'
import { PasswordField, TextArea, TextField } from '../../../components/field'
import { Form, FormActions, FormError } from '../../../components/form'
import type { Files } from '../../../lib/attachment-held'
import { useProblemFields } from '../../../lib/use-problem-fields'
import { hasMovedOn, useSign } from '../api/sign'
import type { RecordView } from '../record-view'
import type { SignTurn } from '../sign-turn'
import { missingOf } from '../file-places'
import { MissingFiles } from './missing-files'

const MEANINGS = {
  lead: 'I ran this test and these are its readings.',
  witness: 'I was present and read the gauge myself.',
} as const

const MOVED_ON = 'Something was entered since you read this record. It is shown above now: read it again, then sign.'

const signingSchema = z.object({
  password: z.string().min(1, 'Enter your password.'),
  meaning: z.string().trim().min(3, 'Say what your signature means.').max(200, 'Keep it to 200 characters.'),
})
const decliningSchema = z.object({
  password: z.string().min(1, 'Enter your password.'),
  why: z.string().trim().min(3, 'Say why in a few words.').max(500, 'Keep it to 500 characters.'),
})

function SignForm({ record, as }: { record: RecordView; as: 'lead' | 'witness' }) {
  const sign = useSign(record.id)
  const form = useForm({ resolver: zodResolver(signingSchema), defaultValues: { password: '', meaning: MEANINGS[as] as string } })
  const showProblem = useProblemFields(form)
  const { errors, submitCount } = form.formState
  const submit = form.handleSubmit((values) =>
    sign.mutate(
      { as, ...values, headHash: record.state.headHash },
      { onError: (error) => (hasMovedOn(error) ? form.setError('root', { message: MOVED_ON }) : showProblem(error)) },
    ),
  )
  return (
    <Form onSubmit={submit} aria-label={as === 'lead' ? 'Sign' : 'Countersign'}>
      <FormError message={errors.root?.message} attempt={submitCount} />
      <TextField label="What your signature means" message={errors.meaning?.message} {...form.register('meaning')} />
      <PasswordField
        label="Your password"
        hint="Asked again, so that nobody signs on a device you left open."
        autoComplete="current-password"
        message={errors.password?.message}
        {...form.register('password')}
      />
      <FormActions>
        <Button type="submit" kind="next" busy={sign.isPending && 'Signing'}>
          {as === 'lead' ? 'Sign as lead' : 'Countersign'}
        </Button>
        <p className="text-graphite">Prints with your name and the time. Nothing can be changed after it.</p>
      </FormActions>
    </Form>
  )
}

function DeclineForm({ record }: { record: RecordView }) {
  const decline = useSign(record.id)
  const form = useForm({ resolver: zodResolver(decliningSchema), defaultValues: { password: '', why: '' } })
  const showProblem = useProblemFields(form)
  const { errors, submitCount } = form.formState
  const submit = form.handleSubmit((values) =>
    decline.mutate(
      { as: 'decline', ...values, headHash: record.state.headHash },
      { onError: (error) => (hasMovedOn(error) ? form.setError('root', { message: MOVED_ON }) : showProblem(error)) },
    ),
  )
  return (
    <Form onSubmit={submit} aria-label="Decline">
      <FormError message={errors.root?.message} attempt={submitCount} />
      <TextArea
        label="Why you decline"
        hint="Prints on the record; it goes back to the lead."
        message={errors.why?.message}
        {...form.register('why')}
      />
      <PasswordField
        label="Your password"
        autoComplete="current-password"
        message={errors.password?.message}
        {...form.register('password')}
      />
      <FormActions>
        <Button type="submit" busy={decline.isPending && 'Sending'}>
          Decline with this reason
        </Button>
      </FormActions>
    </Form>
  )
}

function Panel({ title, note, children }: { title: string; note: ReactNode; children: ReactNode }) {
  return (
    <section id="sign" aria-labelledby="sign-title" className="mt-6 scroll-mt-4 border-t-2 border-ink pt-4 print:hidden">
      <h2 id="sign-title" className="text-22">
        {title}
      </h2>
      <p className="pb-4 text-graphite">{note}</p>
      {children}
    </section>
  )
}

interface SignPanelProps {
  record: RecordView
  turn: SignTurn
  files: Files
  /** Lead and witness may declare a file lost. */
  mayGiveUp: boolean
}

/** What the person who reads may do about it now: sign, countersign, decline, or know who is waited for. */
export function SignPanel({ record, turn, files, mayGiveUp }: SignPanelProps) {
  const { opened, state } = record
  const missing = missingOf(record, files.where)
  const waiting = missing.length > 0 && <MissingFiles record={record} files={files} missing={missing} mayGiveUp={mayGiveUp} />
  if (turn.is === 'nobody') return null
  if (turn.is === 'waits') {
    return (
      <p className="mt-6 border-t-2 border-ink pt-4 text-18 print:hidden" role="status">
        {turn.says}
      </p>
    )
  }
  if (turn.is === 'lead') {
    return (
      <Panel
        title="Sign this record"
        note={`You concluded it ${state.conclusion?.conclusion ?? ''}. Read what stands above as it will print; then only ${opened.people.witness.name} can act.`}
      >
        {waiting || (
          <div className="max-w-xl">
            <SignForm record={record} as="lead" />
          </div>
        )}
      </Panel>
    )
  }
  return (
    <Panel
      title="Countersign, or decline"
      note={`${state.signed?.printedName ?? ''} signed it as lead. You are named as the witness, ${opened.people.witness.relation}.`}
    >
      <div className="grid gap-x-12 gap-y-8 desktop:grid-cols-2">
        {waiting || <SignForm record={record} as="witness" />}
        <DeclineForm record={record} />
      </div>
    </Panel>
  )
}

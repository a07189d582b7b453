import { zodResolver } from '@hookform/resolvers/zod'
import { useState } from 'react'
import { useForm } from 'react-hook-form'
import { z } from 'zod'
import { Thumbnail, calledWords } from '../../../components/attachments/thumbnail'
import { Button } from '../../../components/button'
import { TextField } from '../../../components/field'
import { Form, FormActions, FormError } from '../../../components/form'
import type { Files } from '../../../lib/attachment-held'
import { sayWhatFailed } from '../../../lib/problem'
import { useDeclareLost } from '../api/declare-lost'
import type { MissingFile } from '../file-places'
import type { RecordView } from '../record-view'

const lostSchema = z.object({ why: z.string().trim().min(3, 'Say why in a few words.').max(500, 'Keep it to 500 characters.') })

/** What is so of bytes that the server lacks, and what to do. */
function stands({ where }: MissingFile): string {
  if (where.is === 'tablet')
    return where.refused === null
      ? 'On this tablet: it is being sent. Leave this page open.'
      : `On this tablet, but the server does not take it: ${where.refused}`
  return 'Still on another device. Open this test on the one that took it, with a connection, and wait.'
}

function LostForm({ record, file, onDone }: { record: RecordView; file: MissingFile; onDone: () => void }) {
  const declare = useDeclareLost(record)
  const form = useForm({ resolver: zodResolver(lostSchema), defaultValues: { why: '' } })
  const submit = form.handleSubmit(({ why }) => declare.mutate({ sha256: file.attachment.sha256, why }))
  return (
    <Form onSubmit={submit} aria-label={`Declare lost: ${file.place}`} className="mt-3 max-w-xl">
      <FormError message={declare.error && sayWhatFailed(declare.error)} attempt={form.formState.submitCount} />
      <TextField
        label="Why its bytes will not come"
        hint="Stands in the record. The entry keeps the hash: if the file turns up, it can be told."
        message={form.formState.errors.why?.message}
        {...form.register('why')}
      />
      <FormActions>
        <Button type="submit" busy={(declare.isPending || declare.isSuccess) && 'Writing it down'}>
          It is lost
        </Button>
        <Button onClick={onDone}>Wait for it</Button>
      </FormActions>
    </Form>
  )
}

function Missing({ record, files, file, mayGiveUp }: { record: RecordView; files: Files; file: MissingFile; mayGiveUp: boolean }) {
  const [asked, setAsked] = useState(false)
  const given = mayGiveUp && (file.where.is === 'elsewhere' || (file.where.is === 'tablet' && file.where.refused !== null))
  return (
    <li className="flex flex-wrap gap-x-4 gap-y-3 border-b border-hairline py-3">
      <span className="block size-22 shrink-0 overflow-hidden border-2 border-rule">
        <Thumbnail owner={files.owner} attachment={file.attachment} />
      </span>
      <div className="min-w-64 flex-1">
        <h3 className="text-18">{file.place}</h3>
        <p className="font-condensed text-graphite">
          {calledWords(file.attachment)}. {file.note}
        </p>
        <p className="mt-1">{stands(file)}</p>
        {asked && <LostForm record={record} file={file} onDone={() => setAsked(false)} />}
      </div>
      {given && !asked && (
        <Button className="self-start" onClick={() => setAsked(true)}>
          Declare it lost
        </Button>
      )}
    </li>
  )
}

interface MissingFilesProps {
  record: RecordView
  files: Files
  missing: readonly MissingFile[]
  mayGiveUp: boolean
}

/** In the place of the signature while bytes that the record names are not on the server (R53). */
export function MissingFiles({ record, files, missing, mayGiveUp }: MissingFilesProps) {
  const several = missing.length > 1
  return (
    <div role="status">
      <p className="text-18 font-semibold">
        {several
          ? `${missing.length} photos or documents are not on the server yet. The signature waits for them.`
          : 'A photo or document is not on the server yet. The signature waits for it.'}
      </p>
      <ul aria-label="Not on the server yet" className="mt-2 border-t border-hairline">
        {missing.map((file) => (
          <Missing key={file.attachment.sha256} record={record} files={files} file={file} mayGiveUp={mayGiveUp} />
        ))}
      </ul>
    </div>
  )
}

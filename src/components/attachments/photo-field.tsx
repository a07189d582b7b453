import { useId, useRef, useState, type ReactElement } from 'react'
import { ATTACHMENT_TYPES, type Attachment } from '#shared/ledger/envelope'
import type { Owner } from '../../lib/attachment-database'
import { FileRefused, prepareAttachment } from '../../lib/attachment-prepare'
import { files } from '../../lib/attachments'
import { Button } from '../button'
import { FieldMessage } from '../field'
import { CameraGlyph, DocumentGlyph } from './glyphs'
import { calledWords, Thumbnail } from './thumbnail'

interface PhotoFieldProps {
  label: string
  /** What it will belong to; the bytes are kept for it as soon as they are chosen. */
  owner: Owner
  chosen: readonly Attachment[]
  onChange: (chosen: Attachment[]) => void
  hint?: string
  /** How many one entry may name. */
  most?: number
  className?: string
}

interface Work {
  done: number
  of: number
}

const ACCEPTED = ATTACHMENT_TYPES.join(',')
export const PHOTO_HINT = 'A photo is made smaller here; where and with what it was taken is left out.'

const plural = (count: number, one: string): string => (count === 1 ? `one ${one}` : `${count} ${one}s`)

function Chosen({ owner, attachment, onRemove }: { owner: Owner; attachment: Attachment; onRemove: () => void }): ReactElement {
  return (
    <li className="flex items-stretch border-2 border-rule bg-field">
      <span className="block size-22 shrink-0 overflow-hidden">
        <Thumbnail owner={owner} attachment={attachment} />
      </span>
      <button
        type="button"
        onClick={onRemove}
        aria-label={`Leave out ${calledWords(attachment)}`}
        className="w-20 touch-manipulation border-l-2 border-rule text-16 hover:bg-sheet"
      >
        <span aria-hidden className="block text-26 leading-7">
          ×
        </span>
        <span aria-hidden className="font-condensed">
          leave out
        </span>
      </button>
    </li>
  )
}

/** What was made of a handful of chosen files: kept on the disk, or refused with a sentence each. */
async function take(
  owner: Owner,
  picked: readonly File[],
  onEach: (done: number) => void,
): Promise<{ taken: Attachment[]; problems: string[] }> {
  const taken: Attachment[] = []
  const problems: string[] = []
  for (const [index, file] of picked.entries()) {
    onEach(index)
    try {
      const prepared = await prepareAttachment(file)
      await files.keep(owner, prepared)
      taken.push(prepared.attachment)
    } catch (failure) {
      const says = failure instanceof FileRefused || failure instanceof Error ? failure.message : 'This file can’t be read. Choose another.'
      problems.push(picked.length > 1 ? `${file.name}: ${says}` : says)
    }
  }
  return { taken, problems }
}

/**
 * Photos by the camera or from a file, documents from a file. Each is made ready and written to this device's disk
 * before it is shown; whoever enters the entry names what stands here.
 */
export function PhotoField({ label, owner, chosen, onChange, hint = PHOTO_HINT, most = 6, className }: PhotoFieldProps): ReactElement {
  const id = useId()
  const camera = useRef<HTMLInputElement>(null)
  const choose = useRef<HTMLInputElement>(null)
  const [work, setWork] = useState<Work | null>(null)
  const [problems, setProblems] = useState<readonly string[]>([])
  // What is chosen while others are made ready goes after them.
  const latest = useRef(chosen)
  latest.current = chosen
  const room = most - chosen.length
  const add = async (list: FileList | null): Promise<void> => {
    const picked = [...(list ?? [])]
    if (picked.length === 0) return
    const over = picked.length - room
    setProblems([])
    setWork({ done: 0, of: Math.min(picked.length, room) })
    const { taken, problems: found } = await take(owner, picked.slice(0, room), (done) =>
      setWork({ done, of: Math.min(picked.length, room) }),
    )
    const have = new Set(latest.current.map(({ sha256 }) => sha256))
    const added = taken.filter(({ sha256 }, index) => !have.has(sha256) && taken.findIndex((one) => one.sha256 === sha256) === index)
    if (added.length > 0) onChange([...latest.current, ...added])
    setProblems(over > 0 ? [...found, `At most ${most} go with one entry; ${plural(over, 'file')} left out.`] : found)
    setWork(null)
  }
  const remove = (sha256: string): void => {
    setProblems([])
    onChange(chosen.filter((one) => one.sha256 !== sha256))
    void files.remove(owner, sha256)
  }
  const busy = work !== null && (work.of > 1 ? `Reading ${work.done + 1} of ${work.of}` : 'Reading it')
  return (
    <div role="group" aria-labelledby={`${id}-label`} aria-describedby={`${id}-hint`} className={className}>
      <p id={`${id}-label`} className="mb-1 font-medium">
        {label} <span className="font-normal text-graphite">may be left empty</span>
      </p>
      {chosen.length > 0 && (
        <ul aria-label="Chosen" className="mb-2 flex flex-wrap gap-3">
          {chosen.map((attachment) => (
            <Chosen key={attachment.sha256} owner={owner} attachment={attachment} onRemove={() => remove(attachment.sha256)} />
          ))}
        </ul>
      )}
      {room > 0 && (
        <div className="flex flex-wrap items-center gap-3">
          <Button className="min-h-14 pointer-fine:hidden" busy={busy} onClick={() => camera.current?.click()}>
            <span className="flex items-center gap-2.5">
              <CameraGlyph /> Take photo
            </span>
          </Button>
          <Button className="min-h-14" busy={busy} onClick={() => choose.current?.click()}>
            <span className="flex items-center gap-2.5">
              <DocumentGlyph /> Choose file
            </span>
          </Button>
          <input
            ref={camera}
            hidden
            type="file"
            accept="image/*"
            capture="environment"
            aria-label={`${label}: take a photo`}
            onChange={(event) => {
              void add(event.target.files).finally(() => (event.target.value = ''))
            }}
          />
          <input
            ref={choose}
            hidden
            type="file"
            multiple={most > 1}
            accept={ACCEPTED}
            aria-label={`${label}: choose a file`}
            onChange={(event) => {
              void add(event.target.files).finally(() => (event.target.value = ''))
            }}
          />
          <p id={`${id}-hint`} className="min-w-48 flex-1 text-16 text-graphite">
            {hint}
          </p>
        </div>
      )}
      <div role="status">
        {work && <p className="sr-only">{busy}</p>}
        {problems.map((says) => (
          <FieldMessage key={says} id={`${id}-${says}`}>
            {says}
          </FieldMessage>
        ))}
      </div>
    </div>
  )
}

import { useState, type ReactElement, type ReactNode } from 'react'
import type { Attachment } from '#shared/ledger/envelope'
import { useAttachmentUrl, type Files } from '../../lib/attachment-held'
import { classNames } from '../../lib/class-names'
import { AttachmentViewer } from './attachment-viewer'
import { calledWords, isDocument, Thumbnail } from './thumbnail'
import { WhereItIs } from './where-it-is'

/** A photo or document as a screen shows it: what it is of, and who took it when. */
export interface Shown {
  attachment: Attachment
  place: string
  note: string
}

const frame = 'block shrink-0 touch-manipulation overflow-hidden border-2 border-rule bg-field hover:border-ink'

interface DocumentLinkProps {
  files: Files
  attachment: Attachment
  className: string
  children: ReactNode
}

function DocumentLink({ files, attachment, className, children }: DocumentLinkProps): ReactElement {
  const url = useAttachmentUrl(files.owner, attachment)
  const label = `${calledWords(attachment)}: opens in a new tab`
  if (url === null) return <span className={className}>{children}</span>
  return (
    <a href={url} target="_blank" rel="noreferrer" aria-label={label} className={className}>
      {children}
    </a>
  )
}

interface StripProps {
  files: Files
  shown: readonly Shown[]
  /** With what it is of, beside each: for a section of its own. Without, thumbnails in a row with where they are. */
  captions?: boolean
  /** In a run, where Stop at the foot of the screen stays free. */
  leavesFoot?: boolean
  className?: string
}

/** Photos and documents in a row: a photo opens large, a document in a tab of its own. */
export function AttachmentStrip({ files, shown, captions = false, leavesFoot = false, className }: StripProps): ReactElement | null {
  const [open, setOpen] = useState<number | null>(null)
  if (shown.length === 0) return null
  const box = classNames(frame, captions ? 'size-22' : 'size-28')
  const photos = shown.filter(({ attachment }) => !isDocument(attachment))
  return (
    <>
      <ul
        aria-label="Photos and documents"
        className={classNames(captions ? 'grid gap-x-6 gap-y-3 tablet:grid-cols-2 desktop:grid-cols-3' : 'flex flex-wrap gap-3', className)}
      >
        {shown.map((one) => {
          const { attachment, place, note } = one
          const thumbnail = <Thumbnail owner={files.owner} attachment={attachment} />
          return (
            <li
              key={`${place}${note}${attachment.sha256}`}
              className={captions ? 'flex min-w-0 gap-3 border-t border-hairline pt-3' : 'w-28'}
            >
              {isDocument(attachment) ? (
                <DocumentLink files={files} attachment={attachment} className={box}>
                  {thumbnail}
                </DocumentLink>
              ) : (
                <button
                  type="button"
                  aria-label={`${calledWords(attachment)}, ${place}: open it large`}
                  onClick={() => setOpen(photos.indexOf(one))}
                  className={box}
                >
                  {thumbnail}
                </button>
              )}
              {captions ? (
                <div className="min-w-0">
                  <p className="font-semibold">{place}</p>
                  <p className="font-condensed text-graphite">{note}</p>
                  <WhereItIs where={files.where(attachment)} className="font-condensed text-graphite print:hidden" />
                </div>
              ) : (
                <WhereItIs where={files.where(attachment)} className="mt-1 font-condensed text-16 leading-5 text-graphite" />
              )}
            </li>
          )
        })}
      </ul>
      {open !== null && (
        <AttachmentViewer files={files} all={photos} index={open} onIndex={setOpen} onClose={() => setOpen(null)} leavesFoot={leavesFoot} />
      )}
    </>
  )
}

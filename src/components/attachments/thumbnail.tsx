import { useState, type ReactElement } from 'react'
import type { Attachment } from '#shared/ledger/envelope'
import { sizeText } from '../../lib/attachment-bytes'
import type { Owner } from '../../lib/attachment-database'
import { useAttachmentUrl } from '../../lib/attachment-held'
import { DocumentGlyph, PictureGlyph } from './glyphs'

export const isDocument = ({ type }: Attachment): boolean => type === 'application/pdf'

/** "Photo weld-7.jpg", "Document": how it is called where it is not seen. */
export const calledWords = (attachment: Attachment): string =>
  [isDocument(attachment) ? 'Document' : 'Photo', attachment.name].filter(Boolean).join(' ')

function Sheet({ attachment }: { attachment: Attachment }): ReactElement {
  return (
    <span className="flex size-full flex-col items-center justify-center gap-0.5 bg-field text-ink">
      <DocumentGlyph size={36} />
      <span className="font-condensed text-16 leading-5 whitespace-nowrap">PDF {sizeText(attachment.size)}</span>
    </span>
  )
}

/** A photo cut square, or the sign of a document. It fills what it stands in. */
export function Thumbnail({ owner, attachment }: { owner: Owner; attachment: Attachment }): ReactElement {
  const url = useAttachmentUrl(owner, attachment, 'thumb')
  const [failed, setFailed] = useState<string | null>(null)
  if (isDocument(attachment)) return <Sheet attachment={attachment} />
  if (url === null || failed === url) {
    return (
      <span className="flex size-full items-center justify-center bg-field text-graphite">
        <PictureGlyph size={36} />
      </span>
    )
  }
  return <img src={url} alt="" className="size-full object-cover" onError={() => setFailed(url)} />
}

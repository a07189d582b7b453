import { useEffect, useRef, useState, type KeyboardEvent, type ReactElement } from 'react'
import { classNames } from '../../lib/class-names'
import { shortHash, sizeText } from '../../lib/attachment-bytes'
import { useAttachmentUrl, type Files } from '../../lib/attachment-held'
import { Button } from '../button'
import { PictureGlyph } from './glyphs'
import type { Shown } from './attachment-strip'
import { calledWords } from './thumbnail'
import { WhereItIs } from './where-it-is'

function Picture({ files, shown, large, onLarge }: { files: Files; shown: Shown; large: boolean; onLarge: () => void }): ReactElement {
  const url = useAttachmentUrl(files.owner, shown.attachment, 'page')
  const [failed, setFailed] = useState<string | null>(null)
  if (url === null || failed === url) {
    return (
      <p className="m-auto flex flex-col items-center gap-3 text-18">
        <PictureGlyph size={64} />
        This photo can’t be shown here yet.
      </p>
    )
  }
  return (
    <img
      src={url}
      alt={`${calledWords(shown.attachment)}. ${shown.place}`}
      onError={() => setFailed(url)}
      onClick={onLarge}
      className={large ? 'm-auto max-w-none cursor-zoom-out' : 'm-auto max-h-full max-w-full cursor-zoom-in object-contain'}
      style={large ? { width: 'max(200%, 1600px)' } : undefined}
    />
  )
}

interface ViewerProps {
  files: Files
  all: readonly Shown[]
  index: number
  onIndex: (index: number) => void
  onClose: () => void
  /** In a run: Stop lies at the foot of the screen and stays to be pressed. */
  leavesFoot: boolean
}

/** One photo, large: the next and the one before, closer, and what is known of it. */
export function AttachmentViewer({ files, all, index, onIndex, onClose, leavesFoot }: ViewerProps): ReactElement | null {
  const dialog = useRef<HTMLDialogElement>(null)
  const [large, setLarge] = useState(false)
  const shown = all[index]
  useEffect(() => {
    const element = dialog.current
    const before = document.activeElement
    if (leavesFoot) element?.show()
    else element?.showModal()
    return () => {
      element?.close()
      if (before instanceof HTMLElement) before.focus()
    }
  }, [leavesFoot])
  if (!shown) return null
  const go = (to: number): void => {
    if (to < 0 || to >= all.length) return
    setLarge(false)
    onIndex(to)
  }
  const keys = (event: KeyboardEvent): void => {
    if (event.key === 'Escape') onClose()
    else if (event.key === 'ArrowLeft') go(index - 1)
    else if (event.key === 'ArrowRight') go(index + 1)
    else return
    event.preventDefault()
  }
  const { attachment, place, note } = shown
  const where = files.where(attachment)
  return (
    <dialog
      ref={dialog}
      aria-label={`${calledWords(attachment)}, large`}
      onKeyDown={keys}
      onCancel={(event) => {
        event.preventDefault()
        onClose()
      }}
      className={classNames(
        'ground-deep-dye fixed z-50 m-0 h-auto max-h-none w-full max-w-none flex-col border-0 p-0 open:flex',
        leavesFoot ? 'inset-x-0 top-0 bottom-36 border-b-2! border-ghost' : 'inset-0 h-dvh',
      )}
    >
      <header className="flex shrink-0 flex-wrap items-center justify-between gap-x-6 gap-y-2 border-b border-ghost px-4 py-2 tablet:px-6">
        <div className="min-w-0">
          <h2 className="text-20 tablet:text-22">{place}</h2>
          {note !== '' && <p className="text-faint-scribe">{note}</p>}
        </div>
        <div className="flex gap-3">
          <Button kind="scribed" size="line" className="min-h-14!" aria-pressed={large} onClick={() => setLarge(!large)}>
            {large ? 'Whole' : 'Closer'}
          </Button>
          {/* Where the keys of the viewer are heard from, as soon as it opens. */}
          <Button kind="scribed" size="line" className="min-h-14!" autoFocus onClick={onClose}>
            Close
          </Button>
        </div>
      </header>
      <div
        className="flex min-h-0 flex-1 touch-manipulation overflow-auto bg-deep-dye p-2 tablet:p-4"
        style={{ touchAction: 'pan-x pan-y pinch-zoom' }}
      >
        <Picture key={attachment.sha256} files={files} shown={shown} large={large} onLarge={() => setLarge(!large)} />
      </div>
      <footer className="flex shrink-0 items-center gap-3 border-t border-ghost px-4 py-2 tablet:px-6">
        {all.length > 1 && (
          <Button kind="scribed" size="line" className="min-h-14!" disabled={index === 0} onClick={() => go(index - 1)}>
            Before
          </Button>
        )}
        <p className="min-w-0 flex-1 text-center text-16 text-faint-scribe">
          <span className="text-scribe">{[attachment.name, sizeText(attachment.size)].filter(Boolean).join(', ')}</span>
          {all.length > 1 && `. ${index + 1} of ${all.length}`}
          <span className="flex flex-wrap items-center justify-center gap-x-4">
            <WhereItIs where={where} />
            <span className="whitespace-nowrap">
              SHA-256 <span className="font-mono text-14">{shortHash(attachment.sha256)}</span>
            </span>
          </span>
        </p>
        {all.length > 1 && (
          <Button kind="scribed" size="line" className="min-h-14!" disabled={index === all.length - 1} onClick={() => go(index + 1)}>
            Next
          </Button>
        )}
      </footer>
    </dialog>
  )
}

import { useState, type ReactNode } from 'react'
import type { PublicTag, TagResponse } from '#shared/api/tags'
import { Button, ButtonAnchor, ButtonLink } from '../../../components/button'
import { Mark } from '../../../components/marks'
import { PageHeading, inset } from '../../../components/page'
import { classNames } from '../../../lib/class-names'
import { useTitle } from '../../../lib/use-title'
import { paths } from '../../../paths'
import { pressWords } from '../tag-words'
import { TagPaper, type TagSize } from './tag-paper'

const SIZES: readonly { value: TagSize; label: string; note: string }[] = [
  { value: 'small', label: '100 mm × 70 mm', note: 'a label, or a card in a sleeve' },
  { value: 'a6', label: 'A6', note: '105 mm × 148 mm, upright' },
]

function Notice({ children }: { children: ReactNode }) {
  return (
    <p role="status" className="flex items-start gap-3 border-2 border-ink bg-sheet px-4 py-3">
      <span className="mt-0.5">
        <Mark name="wait" size={20} />
      </span>
      <span className="min-w-0">{children}</span>
    </p>
  )
}

type PrintTagProps = {
  pressId: string
  made: TagResponse
  tag: PublicTag
  /** The server was not reached when it was last asked: what stands here may have ended. */
  old: boolean
}

/** The tag in the size it is printed in, and what to know before it is hung up. */
export function PrintTag({ pressId, made, tag, old }: PrintTagProps) {
  const [size, setSize] = useState<TagSize>('small')
  const [full, setFull] = useState(false)
  // What would be printed one line over the other is not printed at all.
  const runsOver = full && size === 'small'
  const cleared = tag.answer.is === 'cleared'
  const title = `${cleared ? 'Tag' : 'Do-not-use tag'} of ${pressWords(tag)}`
  useTitle(title)
  return (
    <div className={classNames(inset, 'pt-5 pb-10 print:p-0')}>
      <div className="print:hidden">
        <PageHeading>{title}</PageHeading>
        <p className="mt-1 mb-5 max-w-[72ch] text-graphite">
          {cleared
            ? 'Hang it where whoever pumps sees it. When the clearance ends, the paper comes off and the page behind its code says so at once.'
            : 'The press is not cleared. Hang this over the gauge until it is, and take an older tag off.'}
        </p>
      </div>
      <div className="grid gap-x-6 gap-y-6 desktop:gap-x-10 tablet:grid-cols-[auto_minmax(0,1fr)] print:block">
        <div className={classNames('self-start justify-self-start border border-rule print:border-0', runsOver && 'print:hidden')}>
          <TagPaper tag={tag} address={made.address} code={made.code} size={size} onFull={setFull} />
        </div>
        <div className="grid max-w-[34rem] content-start gap-4 print:hidden max-tablet:order-first">
          <div role="group" aria-label="Size of the paper" className="grid gap-3 desktop:grid-cols-2">
            {SIZES.map(({ value, label, note }) => (
              <Button
                key={value}
                note={note}
                aria-pressed={size === value}
                className={size === value ? 'border-ink! bg-field! outline-2 -outline-offset-4 outline-ink' : undefined}
                onClick={() => setSize(value)}
              >
                {label}
              </Button>
            ))}
          </div>
          {!made.reachable && (
            <Notice>
              Phones can’t open this code: its address leads only to the machine the server runs on. Whoever looks after the server sets{' '}
              <span className="font-mono">PUBLIC_URL</span> to the address that the shop’s phones reach, then print the tag.
            </Notice>
          )}
          {full && (
            <Notice>
              Not every word goes onto this size. {size === 'small' ? 'Print it at A6.' : 'The page behind the code has all of it.'}
            </Notice>
          )}
          {old && (
            <Notice>Not connected to the server, so nobody knows whether this still holds. It can be printed when the link is back.</Notice>
          )}
          <Button kind="next" wide disabled={old || runsOver} onClick={() => window.print()}>
            Print this tag
          </Button>
          <p className="text-graphite">In the print window choose no margins and a scale of 100 %, on paper or labels of that size.</p>
          <div className="flex flex-wrap gap-3">
            <ButtonLink size="line" to={paths.press.href(pressId)}>
              Back to the press
            </ButtonLink>
            <ButtonAnchor size="line" href={made.address}>
              What the code leads to
            </ButtonAnchor>
          </div>
          <p className="border-t border-hairline pt-2 break-all text-graphite">
            <span className="font-mono text-14">{made.address}</span>
          </p>
        </div>
      </div>
    </div>
  )
}

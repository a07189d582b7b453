import { useEffect, useRef } from 'react'
import { verdictAdvice, verdictTitle } from '#shared/ledger/verdict-words'
import type { FileCheck } from '#shared/ledger/verify-ledger-file'
import { Mark, type MarkName } from '../../../components/marks'
import { classNames } from '../../../lib/class-names'

const MARKS: Record<FileCheck['verdict'], MarkName> = {
  whole: 'within',
  'not sealed yet': 'to-countersign',
  altered: 'stop',
  'altered outside': 'stop',
  'wrong key': 'stop',
  'not a ledger file': 'not-read',
  'newer version': 'wait',
}

const BEYOND: ReadonlySet<FileCheck['verdict']> = new Set(['altered', 'altered outside', 'wrong key'])

interface VerdictProps {
  check: FileCheck
  fileName: string
  /** What the file is instead, when it is no ledger file. */
  instead: string | null
}

/** What is so, in words that can be read from across the room. */
export function Verdict({ check, fileName, instead }: VerdictProps) {
  const heading = useRef<HTMLHeadingElement>(null)
  useEffect(() => heading.current?.focus({ preventScroll: true }), [check])
  const isBeyond = BEYOND.has(check.verdict)
  return (
    <section
      aria-live="polite"
      className={classNames('px-4 py-5 tablet:px-6', isBeyond ? 'bg-stop text-on-stop' : 'ground-sheet border-t-2 border-ink')}
    >
      <div className="flex items-start gap-4 tablet:gap-6">
        <Mark
          name={MARKS[check.verdict]}
          size={64}
          tone={isBeyond ? 'plate' : 'steel'}
          className="h-12 w-12 shrink-0 tablet:h-20 tablet:w-20"
        />
        <div className="min-w-0">
          <h2 ref={heading} tabIndex={-1} className="text-26 tablet:text-46" data-part="verdict">
            {verdictTitle(check)}
          </h2>
          <p className="mt-1 text-18">
            {instead} {verdictAdvice(check)}
          </p>
          <p className={classNames('mt-2 wrap-anywhere', !isBeyond && 'text-graphite')}>{fileName}</p>
        </div>
      </div>
    </section>
  )
}

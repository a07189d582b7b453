import type { CheckedSeal } from '#shared/ledger/check-ledger'
import { kindWords } from '#shared/ledger/verdict-words'
import type { FileCheck } from '#shared/ledger/verify-ledger-file'
import { Mark } from '../../../components/marks'
import { Section } from '../../../components/page'
import { dateAndTime } from '../../../lib/dates'
import { toldBy } from '../told'

export type WholeCheck = Extract<FileCheck, { file: unknown }>

const AS: Record<string, string> = {
  signed: 'Signed as lead',
  countersigned: 'Countersigned as witness',
  declined: 'Declined to countersign',
}

function Signature({ seal }: { seal: CheckedSeal }) {
  return (
    <li className="border-t border-hairline py-2">
      <p>
        {AS[seal.kind] ?? kindWords(seal.kind)}: <span className="text-18 font-semibold">{seal.printedName}</span>
      </p>
      <p>{seal.meaning}</p>
      <p className="text-graphite">
        {dateAndTime(seal.sealedAt)}, sealed over entries 1 to {seal.seq} with key{' '}
        <span className="font-mono wrap-anywhere">{seal.kid}</span>
      </p>
    </li>
  )
}

/** What the file is a record of, worked out in this browser from its entries. */
export function WhatItWas({ check }: { check: WholeCheck }) {
  const told = toldBy(check.file)
  return (
    <Section title="What it is a record of">
      {told === null ? (
        <p className="border-t border-hairline py-2">This version can’t tell it. The entries are whole all the same.</p>
      ) : (
        <>
          <p className="text-20 font-semibold">{told.title}</p>
          <p className="pb-2 text-18">{told.headline}</p>
          <dl>
            {told.facts.map(({ what, is }) => (
              <div key={what} className="grid grid-cols-[9rem_minmax(0,1fr)] gap-x-3 border-t border-hairline py-1.5">
                <dt className="text-graphite">{what}</dt>
                <dd className="wrap-anywhere">{is}</dd>
              </div>
            ))}
          </dl>
        </>
      )}
    </Section>
  )
}

/** Who signed it, with which meaning and when; and what no signature covers. */
export function WhoSigned({ check }: { check: WholeCheck }) {
  const { seals, afterSeal } = check
  return (
    <Section title="Who signed">
      {seals.length === 0 && <p className="border-t border-hairline py-2">Nobody. The server signed the file when it wrote it out.</p>}
      <ol>
        {seals.map((seal) => (
          <Signature key={seal.seq} seal={seal} />
        ))}
      </ol>
      {afterSeal.length > 0 && (
        <div className="mt-2 flex gap-3 border-t-2 border-ink py-2">
          <Mark name="wait" size={20} className="mt-0.5 shrink-0" />
          <div>
            <p className="font-semibold">After the seal: no signature covers these</p>
            {afterSeal.map(({ seq, kind, receivedAt }) => (
              <p key={seq}>
                Entry {seq}, {kindWords(kind)}, received {dateAndTime(receivedAt)}
              </p>
            ))}
          </div>
        </div>
      )}
    </Section>
  )
}

import type { ReactNode } from 'react'
import type { Signature } from '#shared/proof-test/entries'
import { hashLines, lateness } from '#shared/proof-test/record-words'
import { Mark } from '../../../components/marks'
import { TextLink } from '../../../components/button'
import { dateAndTime, shortDate } from '../../../lib/dates'
import { paths } from '../../../paths'
import type { RecordView } from '../record-view'

function Block({ title, children }: { title: string; children: ReactNode }) {
  return (
    <div className="border-t border-ink px-4 py-3 first:border-t-0 tablet:border-t-0 tablet:border-l tablet:first:border-l-0 desktop:px-6">
      <p className="text-14">{title}</p>
      {children}
    </div>
  )
}

interface SignedProps {
  title: string
  name: string
  relation: string
  signature: Signature | null
  waiting: string
  late?: string | null
}

function Signed({ title, name, relation, signature, waiting, late = null }: SignedProps) {
  return (
    <Block title={title}>
      <p className="text-22 font-semibold">{signature?.printedName ?? name}</p>
      {relation !== '' && <p className="text-graphite">{relation}</p>}
      {signature ? (
        <>
          <p className="border-b border-hairline pb-1">
            {dateAndTime(signature.signedAt)}, signed with password
            {late !== null && <span className="font-medium text-stop-ink">. {late}</span>}
          </p>
          <p className="pt-1">{signature.meaning}</p>
        </>
      ) : (
        <p className="flex items-center gap-2 pt-1">
          <Mark name="to-countersign" size={20} />
          {waiting}
        </p>
      )}
    </Block>
  )
}

/** What was checked here, over what was received: entries, their chain, and the seals over it. */
function checkedWords({ broken, check, chain, sealed }: RecordView, today: Date): string {
  if (broken !== null) return broken.at === null ? 'Not as it was sealed' : `Altered at entry ${broken.at}`
  const entries = chain.whole ? chain.entries : 0
  if (check === null || sealed.length === 0) return `Chain whole over ${entries} entries, checked ${shortDate(today)}`
  const by = check.verdict === 'whole' ? check.seals.map(({ printedName }) => printedName).join(' and ') : ''
  return `Whole: ${entries} entries, sealed by ${by}; checked ${shortDate(today)}`
}

function Seal({ record, today }: { record: RecordView; today: Date }) {
  const { state, broken, sealed } = record
  const seal = sealed.at(-1)
  return (
    <Block title={seal ? `Seal over ${seal.seq} entries` : `No seal yet; ${state.headSeq} entries`}>
      <p className="font-mono leading-6">
        {hashLines(seal?.headHash ?? state.headHash).map((line) => (
          <span key={line} className="block">
            {line}
          </span>
        ))}
      </p>
      <p className="flex items-center gap-2">
        <Mark name={broken === null ? 'within' : 'stop'} size={20} />
        {checkedWords(record, today)}
      </p>
      {seal && (
        <p className="text-graphite">
          Sealed {dateAndTime(seal.sealedAt)}, key {seal.kid}
        </p>
      )}
      <p className="print:hidden">
        <TextLink to={paths.checkRecord.href()}>Check its ledger file</TextLink>
      </p>
    </Block>
  )
}

/** Who signed, as what, when and with which meaning; and the seal over it. */
export function SignatureBlocks({ record, today }: { record: RecordView; today: Date }) {
  const { opened, state } = record
  const { lead, witness } = opened.people
  const { signed, countersigned } = state
  const notYet = state.conclusion === null ? 'Not concluded yet' : 'Not signed yet'
  return (
    <section aria-label="Signatures" className="grid border-t-2 border-ink tablet:grid-cols-3 print:break-inside-avoid">
      <Signed title="Lead, who ran the test" name={lead.name} relation="" signature={signed} waiting={notYet} />
      <Signed
        title="Witness, who was there"
        name={witness.name}
        relation={witness.relation}
        signature={countersigned}
        waiting={signed ? 'Not countersigned yet' : notYet}
        late={lateness(state)}
      />
      <Seal record={record} today={today} />
    </section>
  )
}

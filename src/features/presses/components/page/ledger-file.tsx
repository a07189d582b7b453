import { ButtonAnchor, TextLink } from '../../../../components/button'
import { paths } from '../../../../paths'

/** The press's own ledger as a file, which anybody can check without this server. */
export function LedgerFile({ pressId }: { pressId: string }) {
  return (
    <div className="mt-2 grid justify-items-start gap-2 border-t border-hairline pt-3">
      <ButtonAnchor href={`/api/presses/${encodeURIComponent(pressId)}/ledger.json`} download size="line">
        Download ledger file
      </ButtonAnchor>
      <p className="text-graphite">
        All of this, entry by entry. <TextLink to={paths.checkRecord.href()}>Check a ledger file</TextLink>
      </p>
    </div>
  )
}

import type { Guest, Invitation } from '#shared/api/invitations'
import { Button } from '../../../components/button'
import { FormError } from '../../../components/form'
import { Mark } from '../../../components/marks'
import { RuledList } from '../../../components/ruled-list'
import { shortDate } from '../../../lib/dates'
import { sayWhatFailed } from '../../../lib/problem'
import { useRevoke } from '../api/invitations'

type RowProps = {
  mark: 'clock' | 'clock-late' | 'within'
  title: string
  note: string
  word: string
  act: string
  busy: boolean
  onAct: () => void
}

function Row({ mark, title, note, word, act, busy, onAct }: RowProps) {
  return (
    <li className="grid grid-cols-[2rem_minmax(0,1fr)] items-center gap-y-2 border-b border-hairline py-2 tablet:grid-cols-[2rem_minmax(0,1fr)_auto_auto] tablet:gap-x-4">
      <Mark name={mark} size={22} />
      <p className="min-w-0">
        <span className="block font-semibold wrap-anywhere">{title}</span>
        <span className="block text-graphite">{note}</span>
      </p>
      <p className="text-graphite max-tablet:col-start-2">{word}</p>
      <div className="max-tablet:col-start-2">
        <Button size="line" aria-label={`${act}: ${title}`} busy={busy && 'Ending it'} onClick={onAct}>
          {act}
        </Button>
      </div>
    </li>
  )
}

const whatTo = ({ kind, role, pressName }: Invitation): string =>
  kind === 'member' ? `as ${role ?? 'crew'}` : `to witness the next test of ${pressName ?? ''}`

type InvitationsListProps = { shopId: string; invitations: readonly Invitation[]; guests: readonly Guest[] }

/** What waits, and which witnesses came from outside; each can be taken back. */
export function InvitationsList({ shopId, invitations, guests }: InvitationsListProps) {
  const revoke = useRevoke(shopId)
  const busy = (id: string) => revoke.isPending && revoke.variables === id
  return (
    <>
      <FormError message={revoke.error && sayWhatFailed(revoke.error)} attempt={revoke.failureCount} />
      <RuledList>
        {invitations.map((one) => (
          <Row
            key={one.id}
            mark={one.expired ? 'clock-late' : 'clock'}
            title={one.email}
            note={`${whatTo(one)}, invited by ${one.invitedBy} on ${shortDate(one.createdAt)}`}
            word={one.expired ? `ran out on ${shortDate(one.expiresAt)}` : `until ${shortDate(one.expiresAt)}`}
            act="Take it back"
            busy={busy(one.id)}
            onAct={() => revoke.mutate(one.id)}
          />
        ))}
        {guests.map((one) => (
          <Row
            key={one.invitationId}
            mark="within"
            title={one.name}
            note={
              one.test === null
                ? `accepted: can be named in the next test of ${one.pressName}`
                : `witness from outside of ${one.test.number}, ${one.pressName}`
            }
            word="sees that test only"
            act="End it"
            busy={busy(one.invitationId)}
            onAct={() => revoke.mutate(one.invitationId)}
          />
        ))}
      </RuledList>
    </>
  )
}

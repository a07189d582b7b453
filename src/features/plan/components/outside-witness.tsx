import { useState } from 'react'
import type { Invitation } from '#shared/api/invitations'
import { emailSchema } from '#shared/api/session'
import { Button } from '../../../components/button'
import { TextField } from '../../../components/field'
import { Mark } from '../../../components/marks'
import { shortDate } from '../../../lib/dates'
import { ProblemError, sayWhatFailed } from '../../../lib/problem'
import { useInviteWitness } from '../api/outside-witness'

type OutsideWitnessProps = { shopId: string; pressId: string; waiting: readonly Invitation[] }

const sayWhy = (error: unknown): string =>
  (error instanceof ProblemError ? (error.fields['email'] ?? error.fields['pressId']) : undefined) ?? sayWhatFailed(error)

/**
 * Somebody who does not belong to the shop, invited by mail to the press's next test. They are named once they accepted:
 * what a test freezes is the printed name that the witness gave.
 */
export function OutsideWitness({ shopId, pressId, waiting }: OutsideWitnessProps) {
  const invite = useInviteWitness(shopId)
  const [email, setEmail] = useState('')
  const [wrong, setWrong] = useState<string>()
  const send = () => {
    const parsed = emailSchema.safeParse(email)
    if (!parsed.success) return setWrong(parsed.error.issues[0]?.message)
    setWrong(undefined)
    invite.mutate({ email: parsed.data, pressId }, { onSuccess: () => setEmail(''), onError: (error) => setWrong(sayWhy(error)) })
  }
  return (
    <div className="grid gap-3">
      <div className="grid gap-3 tablet:grid-cols-[minmax(0,1fr)_auto] tablet:items-end">
        <TextField
          label="Or invite a witness from outside"
          hint="They see this one test. Once they accepted, they stand in the list of witnesses; the test can be opened then."
          type="email"
          inputMode="email"
          autoComplete="off"
          autoCapitalize="none"
          spellCheck={false}
          placeholder="name@works.example"
          value={email}
          message={wrong}
          onChange={(event) => setEmail(event.target.value)}
          onKeyDown={(event) => {
            if (event.key !== 'Enter') return
            // The plan round it is not sent by this.
            event.preventDefault()
            send()
          }}
        />
        <Button
          disabled={pressId === ''}
          note={pressId === '' ? 'choose the press first' : undefined}
          busy={invite.isPending && 'Sending'}
          onClick={send}
        >
          Send the invitation
        </Button>
      </div>
      <ul aria-live="polite" className="empty:hidden">
        {waiting.map((one) => (
          <li key={one.id} className="flex items-center gap-2 py-1 text-graphite">
            <Mark name="clock" size={20} />
            <span className="wrap-anywhere">{`${one.email} is invited and has not accepted yet; the link holds until ${shortDate(one.expiresAt)}.`}</span>
          </li>
        ))}
      </ul>
    </div>
  )
}

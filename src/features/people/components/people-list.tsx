import { useState } from 'react'
import type { Person } from '#shared/api/people'
import { roles, type Role } from '#shared/policy'
import { Button } from '../../../components/button'
import { FormError } from '../../../components/form'
import { RadioRow } from '../../../components/radio-row'
import { shortDate } from '../../../lib/dates'
import { sayWhatFailed } from '../../../lib/problem'
import { useChangePerson } from '../api/change-person'
import { roleChoices, roleNotes } from './roles'

type ChangeProps = { person: Person; shopId: string; onDone: () => void }

/** Another role for someone, or the end of their time here. Both take effect at once and stay on the record. */
function ChangePerson({ person, shopId, onDone }: ChangeProps) {
  const [role, setRole] = useState<Role>(person.role)
  const change = useChangePerson(shopId)
  return (
    <div className="grid gap-4 border-t border-hairline py-4">
      <FormError message={change.error && sayWhatFailed(change.error)} attempt={change.failureCount} />
      <RadioRow
        label={`Role of ${person.name}`}
        name={`role-${person.userId}`}
        stacked
        value={role}
        choices={roleChoices.map((choice) => ({ ...choice, note: roleNotes[choice.value] }))}
        onChange={(event) => setRole(roles.find((one) => one === event.target.value) ?? person.role)}
      />
      <div className="flex flex-wrap gap-3">
        <Button
          disabled={role === person.role}
          busy={change.isPending && 'Changing it'}
          onClick={() => change.mutate({ userId: person.userId, change: { role } }, { onSuccess: onDone })}
        >
          Give this role
        </Button>
        <Button onClick={() => change.mutate({ userId: person.userId, change: { ended: true } }, { onSuccess: onDone })}>
          {`${person.name} has left the shop`}
        </Button>
        <Button onClick={onDone}>Leave it as it is</Button>
      </div>
      <p className="text-graphite">Whoever has left can't sign in to this shop. Their name stays on every record they are part of.</p>
    </div>
  )
}

type PeopleListProps = { people: readonly Person[]; shopId: string; mayChange: boolean; selfId: string }

/** Everyone of the shop; the owner opens a row to change it. */
export function PeopleList({ people, shopId, mayChange, selfId }: PeopleListProps) {
  const [open, setOpen] = useState<string | null>(null)
  return (
    <ul className="border-t border-hairline">
      {people.map((person) => (
        <li key={person.userId} className="border-b border-hairline">
          <div className="grid min-h-16 grid-cols-[minmax(0,1fr)_auto] items-center gap-x-6 gap-y-1 py-2 tablet:grid-cols-[minmax(0,1fr)_6rem_10rem_6rem] desktop:min-h-14 desktop:grid-cols-[minmax(0,4fr)_minmax(0,5fr)_8rem_11rem_6rem]">
            <p className="font-semibold">
              {person.name}
              {person.userId === selfId && <span className="font-normal text-graphite"> you</span>}
              <span className="block font-normal wrap-anywhere text-graphite desktop:hidden">{person.email}</span>
            </p>
            <p className="text-graphite wrap-anywhere max-desktop:hidden">{person.email ?? roleNotes[person.role]}</p>
            <p className="font-semibold max-tablet:text-right">{person.endedAt === null ? person.role : `was ${person.role}`}</p>
            <p className="text-graphite">
              {person.endedAt === null ? `since ${shortDate(person.addedAt)}` : `left ${shortDate(person.endedAt)}`}
            </p>
            <div className="flex justify-end">
              {mayChange && person.endedAt === null && (
                <Button
                  size="line"
                  aria-expanded={open === person.userId}
                  aria-label={`Change ${person.name}`}
                  onClick={() => setOpen(open === person.userId ? null : person.userId)}
                >
                  Change
                </Button>
              )}
            </div>
          </div>
          {open === person.userId && <ChangePerson person={person} shopId={shopId} onDone={() => setOpen(null)} />}
        </li>
      ))}
    </ul>
  )
}

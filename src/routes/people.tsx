import { useState } from 'react'
import { Button } from '../components/button'
import { Page, Section } from '../components/page'
import { SkeletonRows } from '../components/skeleton'
import { usePeople } from '../features/people/api/get-people'
import { useInvitations } from '../features/people/api/invitations'
import { AddPersonForm } from '../features/people/components/add-person-form'
import { InvitationsList } from '../features/people/components/invitations-list'
import { InviteForm } from '../features/people/components/invite-form'
import { PeopleList } from '../features/people/components/people-list'
import { useCan, useShop, useUser } from '../lib/here'

export function Component() {
  const shop = useShop()
  const user = useUser()
  const can = useCan()
  const people = usePeople(shop.id)
  const open = useInvitations(shop.id, can('proof-test:invite-witness')).data
  const [form, setForm] = useState<'add' | 'invite' | null>(null)
  const [sentTo, setSentTo] = useState<string | null>(null)
  const members = people.data?.people.filter((person) => person.endedAt === null) ?? []
  const former = people.data?.people.filter((person) => person.endedAt !== null) ?? []
  const list = { shopId: shop.id, mayChange: can('people:change-role'), selfId: user.id }
  const close = () => setForm(null)
  if (people.error && people.data === undefined) throw people.error
  return (
    <Page
      title="People"
      note={people.data && `${members.length} at ${shop.name}`}
      actions={
        can('people:invite') && form === null ? (
          <>
            <Button onClick={() => setForm('add')}>Add with a password</Button>
            <Button kind="next" onClick={() => setForm('invite')}>
              Invite by mail
            </Button>
          </>
        ) : undefined
      }
    >
      <div className="grid grid-cols-1 gap-8">
        {form === 'invite' && (
          <Section title="Invite by mail" className="border-t-2 border-ink pt-4">
            <InviteForm key={shop.id} shopId={shop.id} onInvited={(email) => (setSentTo(email), close())} onLeave={close} />
          </Section>
        )}
        {form === 'add' && (
          <Section title="A person to add" className="border-t-2 border-ink pt-4">
            <AddPersonForm key={shop.id} shopId={shop.id} onAdded={close} onLeave={close} />
          </Section>
        )}
        <p role="status" className="font-medium text-sound empty:hidden">
          {sentTo !== null && form === null && `The invitation to ${sentTo} is on its way.`}
        </p>
        {people.data === undefined ? <SkeletonRows /> : <PeopleList people={members} {...list} />}
        {open !== undefined && open.invitations.length + open.guests.length > 0 && (
          <Section title="Invited, and from outside" note="A link works once">
            <InvitationsList shopId={shop.id} {...open} />
          </Section>
        )}
        {former.length > 0 && (
          <Section title="No longer here" note="Their names stay on their records">
            <PeopleList people={former} {...list} />
          </Section>
        )}
      </div>
    </Page>
  )
}

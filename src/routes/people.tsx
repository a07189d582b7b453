import { useState } from 'react'
import { Button } from '../components/button'
import { Page, Section } from '../components/page'
import { SkeletonRows } from '../components/skeleton'
import { usePeople } from '../features/people/api/get-people'
import { AddPersonForm } from '../features/people/components/add-person-form'
import { PeopleList } from '../features/people/components/people-list'
import { useCan, useShop, useUser } from '../lib/here'

export function Component() {
  const shop = useShop()
  const user = useUser()
  const can = useCan()
  const people = usePeople(shop.id)
  const [adding, setAdding] = useState(false)
  const members = people.data?.people.filter((person) => person.endedAt === null) ?? []
  const former = people.data?.people.filter((person) => person.endedAt !== null) ?? []
  const list = { shopId: shop.id, mayChange: can('people:change-role'), selfId: user.id }
  if (people.error && people.data === undefined) throw people.error
  return (
    <Page
      title="People"
      note={people.data && `${members.length} at ${shop.name}`}
      actions={
        can('people:add') && !adding ? (
          <Button kind="next" onClick={() => setAdding(true)}>
            Add a person
          </Button>
        ) : undefined
      }
    >
      <div className="grid grid-cols-1 gap-8">
        {adding && (
          <Section title="A person to add" className="border-t-2 border-ink pt-4">
            <AddPersonForm key={shop.id} shopId={shop.id} onAdded={() => setAdding(false)} onLeave={() => setAdding(false)} />
          </Section>
        )}
        {people.data === undefined ? <SkeletonRows /> : <PeopleList people={members} {...list} />}
        {former.length > 0 && (
          <Section title="No longer here" note="Their names stay on their records">
            <PeopleList people={former} {...list} />
          </Section>
        )}
      </div>
    </Page>
  )
}

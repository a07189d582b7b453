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
      note={people.data && `${members.length} of ${shop.name}`}
      actions={
        can('people:add') && !adding ? (
          <Button kind="next" onClick={() => setAdding(true)}>
            Add a person
          </Button>
        ) : undefined
      }
    >
      <div className="grid gap-8 desktop:grid-cols-[minmax(0,1fr)_minmax(0,30rem)]">
        {adding && (
          <Section title="A person to add" className="desktop:order-2">
            <AddPersonForm key={shop.id} shopId={shop.id} onAdded={() => setAdding(false)} onLeave={() => setAdding(false)} />
          </Section>
        )}
        <div className={adding ? 'grid content-start gap-8' : 'grid gap-8 desktop:col-span-2'}>
          {people.data === undefined ? <SkeletonRows /> : <PeopleList people={members} {...list} />}
          {former.length > 0 && (
            <Section title="No longer here" note="Their names stay on their records">
              <PeopleList people={former} {...list} />
            </Section>
          )}
        </div>
      </div>
    </Page>
  )
}

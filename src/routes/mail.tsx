import { useSearchParams } from 'react-router-dom'
import { mailStateSchema } from '#shared/api/mail'
import { KeysetPages } from '../components/keyset-pages'
import { NothingHere } from '../components/nothing-here'
import { Page } from '../components/page'
import { PlainScreen } from '../components/plain-screen'
import { RadioRow } from '../components/radio-row'
import { SkeletonRows } from '../components/skeleton'
import { useMailList } from '../features/mail/api/get-mail'
import { MailList } from '../features/mail/components/mail-list'
import { useCan, useShop } from '../lib/here'
import { paths } from '../paths'

const choices = [
  { value: '', label: 'All' },
  { value: 'queued', label: 'Waiting' },
  { value: 'dead', label: 'Given up' },
]

export function Component() {
  const shop = useShop()
  const can = useCan()
  const [search, setSearch] = useSearchParams()
  const state = mailStateSchema.safeParse(search.get('state')).data
  const cursor = search.get('cursor') ?? undefined
  const list = useMailList({ shop: shop.id, state, cursor })
  if (!can('mail:read')) {
    return (
      <PlainScreen title="The owner reads the shop’s letters">
        <p>Ask the owner of {shop.name}.</p>
      </PlainScreen>
    )
  }
  if (list.error && list.data === undefined) throw list.error
  const to = (query: Record<string, string | undefined>) => paths.mail.href({ shop: shop.id, state, ...query })
  return (
    <Page
      title="Mail"
      note={list.data && (list.data.isTray ? 'No mail server is set up: letters stay here' : 'Letters that were sent, and those that wait')}
    >
      <RadioRow
        label="Which letters"
        name="state"
        className="mb-5 max-w-xl"
        value={state ?? ''}
        choices={choices}
        onChange={(event) => setSearch({ shop: shop.id, ...(event.target.value === '' ? {} : { state: event.target.value }) })}
      />
      {list.data === undefined ? (
        <SkeletonRows />
      ) : list.data.mail.length === 0 ? (
        <NothingHere
          what="No letter here."
          next="Letters are written by what happens: an invitation, a signature, a clearance, a date that comes near."
        />
      ) : (
        <MailList mail={list.data.mail} isTray={list.data.isTray} />
      )}
      <KeysetPages
        newer={cursor === undefined ? undefined : to({})}
        older={list.data?.older ? to({ cursor: list.data.older }) : undefined}
        words={{ newer: 'The newest', older: 'Older' }}
      />
    </Page>
  )
}

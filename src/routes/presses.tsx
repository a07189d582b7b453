import { PRESS_SORTS, PRESS_STATUSES } from '#shared/api/presses'
import { ButtonLink } from '../components/button'
import { KeysetPages } from '../components/keyset-pages'
import { NothingHere } from '../components/nothing-here'
import { Page } from '../components/page'
import { SkeletonRows } from '../components/skeleton'
import { usePresses } from '../features/presses/api/get-presses'
import { PressFilters } from '../features/presses/components/press-filters'
import { PressTable } from '../features/presses/components/press-table'
import { calendarDate } from '../lib/dates'
import { useCan, useShop } from '../lib/here'
import { useRegister } from '../lib/register-view'
import { paths } from '../paths'

export function Component() {
  const shop = useShop()
  const can = useCan()
  const view = useRegister({ sorts: PRESS_SORTS, fallback: 'name', href: paths.presses.href })
  const status = PRESS_STATUSES.find((one) => one === view.value('status'))
  const search = view.value('search')
  const list = usePresses({ shop: shop.id, search, status, sort: view.sortName, cursor: view.cursor })
  if (list.error && list.data === undefined) throw list.error
  const enter = can('press:register') && (
    <ButtonLink kind="next" to={paths.newPress.href({ shop: shop.id })}>
      Enter a press
    </ButtonLink>
  )
  const nothing =
    search || status ? (
      <NothingHere what="No press fits." next="Take out a word, or show all presses." />
    ) : (
      <NothingHere what="No press is entered yet." next="Its frame, its joints and its train come first." />
    )
  return (
    <Page title="Presses" note={`of ${shop.name}`} actions={enter || undefined}>
      <PressFilters search={search} status={status ?? ''} onChange={view.change} />
      {list.data === undefined ? (
        <SkeletonRows />
      ) : (
        <>
          <PressTable
            presses={list.data.presses}
            today={calendarDate(new Date())}
            sort={view.sort}
            onSort={(sort) => view.change(view.sortBy(sort))}
            nothing={nothing}
          />
          <KeysetPages
            newer={view.pageAt(list.data.newer)}
            older={view.pageAt(list.data.older)}
            words={{ newer: 'Before these', older: 'After these' }}
            note="Cleared means loaded once to that figure and examined after. It ends with any change to the press."
          />
        </>
      )}
    </Page>
  )
}

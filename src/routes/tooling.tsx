import { ButtonLink } from '../components/button'
import { KeysetPages } from '../components/keyset-pages'
import { NothingHere } from '../components/nothing-here'
import { Page } from '../components/page'
import { SkeletonRows } from '../components/skeleton'
import { useTooling } from '../features/tooling/api/get-tooling'
import { ToolingFilters } from '../features/tooling/components/tooling-filters'
import { ToolingTable } from '../features/tooling/components/tooling-table'
import { useCan, useShop } from '../lib/here'
import { useRegister } from '../lib/register-view'
import { paths } from '../paths'

const sorts = ['code', '-code'] as const

export function Component() {
  const shop = useShop()
  const can = useCan()
  const view = useRegister({ sorts, fallback: 'code', href: paths.tooling.href })
  const search = view.value('search')
  const retired = view.value('retired') === 'yes'
  const list = useTooling({
    shop: shop.id,
    search: search || undefined,
    retired: retired ? 'yes' : undefined,
    sort: view.sortName,
    cursor: view.cursor,
  })
  if (list.error && list.data === undefined) throw list.error
  const enter = can('tooling:write') && (
    <ButtonLink kind="next" to={paths.newTool.href({ shop: shop.id })}>
      Enter a piece
    </ButtonLink>
  )
  const nothing =
    search || retired ? (
      <NothingHere what="No piece fits." next="Take out a word, or show the pieces in use." />
    ) : (
      <NothingHere
        what="No tooling is entered yet."
        next={
          can('tooling:write')
            ? 'Enter adaptors, noses and dies with the load they carry: a test then never goes above the weakest.'
            : 'A lead or the owner enters it, with the load each piece carries.'
        }
      />
    )
  return (
    <Page title="Tooling" note="loose pieces that the force passes through" actions={enter || undefined}>
      <ToolingFilters search={search} retired={retired} sort={view.sortName} onChange={view.change} />
      {list.data === undefined ? (
        <SkeletonRows />
      ) : (
        <>
          <ToolingTable tooling={list.data.tooling} sort={view.sort} onSort={(sort) => view.change(view.sortBy(sort))} nothing={nothing} />
          <KeysetPages
            newer={view.pageAt(list.data.newer)}
            older={view.pageAt(list.data.older)}
            words={{ newer: 'Before these', older: 'After these' }}
            note="A test is opened with the pieces it uses. It goes no higher than the weakest of them."
          />
        </>
      )}
    </Page>
  )
}

import { TEST_SORTS } from '#shared/api/proof-tests'
import { ButtonLink } from '../components/button'
import { KeysetPages } from '../components/keyset-pages'
import { NothingHere } from '../components/nothing-here'
import { Page } from '../components/page'
import { SkeletonRows } from '../components/skeleton'
import { useProofTests } from '../features/register/api/get-proof-tests'
import { testsAsked } from '../features/register/asked'
import { TestFilters } from '../features/register/components/test-filters'
import { TestTable } from '../features/register/components/test-table'
import { calendarDate } from '../lib/dates'
import { useCan, useShop, useUser } from '../lib/here'
import { useRegister } from '../lib/register-view'
import { useKeptOnDevice } from '../lib/use-kept-on-device'
import { paths } from '../paths'

export function Component() {
  const shop = useShop()
  const user = useUser()
  const can = useCan()
  const today = calendarDate(new Date())
  const view = useRegister({ sorts: TEST_SORTS, fallback: '-opened', href: paths.proofTests.href })
  const { asked, note, narrowed } = testsAsked(shop.id, view)
  const list = useProofTests(asked)
  const underWay =
    list.data?.proofTests.filter((test) => test.status === 'under way' && [test.leadId, test.witnessId].includes(user.id)) ?? []
  useKeptOnDevice(underWay.map(({ id }) => id))
  if (list.error && list.data === undefined) throw list.error
  const plan = can('proof-test:open') && (
    <ButtonLink kind="next" to={paths.planProofTest.href({ shop: shop.id })}>
      Plan a test
    </ButtonLink>
  )
  const nothing = narrowed ? (
    <NothingHere what="No proof test fits." next="Take out a word, or show more days." />
  ) : (
    <NothingHere
      what="No proof test was opened yet."
      next="A test begins with its plan: press, gauge, indicators, lead, pump hand and witness."
    />
  )
  return (
    <Page title="Proof tests" note={note} actions={plan || undefined}>
      <TestFilters shopId={shop.id} today={today} value={view.value} onChange={view.change} />
      {list.data === undefined ? (
        <SkeletonRows />
      ) : (
        <>
          <TestTable
            tests={list.data.proofTests}
            userId={user.id}
            sort={view.sort}
            onSort={(sort) => view.change(view.sortBy(sort, 'descending'))}
            nothing={nothing}
          />
          <KeysetPages
            newer={view.pageAt(list.data.newer)}
            older={view.pageAt(list.data.older)}
            note="Bars show how far each test climbed. An octagon marks where it was stopped."
          />
        </>
      )}
    </Page>
  )
}

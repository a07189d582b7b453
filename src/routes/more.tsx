import { Page } from '../components/page'
import { MoreList } from '../features/people/components/more-list'
import { useHere } from '../lib/here'

export function Component() {
  const { user, shop } = useHere()
  return (
    <Page title="More" note={`${user.name}, ${shop.role}`} narrow>
      <MoreList />
    </Page>
  )
}

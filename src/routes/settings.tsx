import { Page } from '../components/page'
import { ShopSettingsForm } from '../features/people/components/shop-settings-form'
import { useCan, useShop } from '../lib/here'

export function Component() {
  const shop = useShop()
  const can = useCan()
  return (
    <Page title="Shop settings" note={shop.name}>
      <ShopSettingsForm key={shop.id} shop={shop} mayChange={can('shop:settings')} />
    </Page>
  )
}

import { useNavigate } from 'react-router-dom'
import { PlainScreen } from '../components/plain-screen'
import { NewPressForm } from '../features/presses/components/form/new-press-form'
import { useCan, useShop } from '../lib/here'
import { paths } from '../paths'

export function Component() {
  const shop = useShop()
  const can = useCan()
  const navigate = useNavigate()
  if (!can('press:register')) {
    return (
      <PlainScreen title="A lead or the owner enters presses">
        <p>Ask one of them. You can report what happened to a press on its own page.</p>
      </PlainScreen>
    )
  }
  return (
    <NewPressForm
      key={shop.id}
      shopId={shop.id}
      units={{ length: shop.lengthUnit, pressure: shop.pressureUnit }}
      onEntered={(pressId) => void navigate(paths.press.href(pressId))}
    />
  )
}

import { Navigate, useNavigate, useParams } from 'react-router-dom'
import { SkeletonPage } from '../components/skeleton'
import { usePress } from '../features/presses/api/get-press'
import { EditPressForm } from '../features/presses/components/form/edit-press-form'
import { useAdoptShop, useCan, useShop } from '../lib/here'
import { paths } from '../paths'

export function Component() {
  const { pressId = '' } = useParams()
  const shop = useShop()
  const can = useCan()
  const navigate = useNavigate()
  const press = usePress(pressId)
  useAdoptShop(press.data?.shopId)
  if (press.data === undefined) {
    if (press.error) throw press.error
    return <SkeletonPage />
  }
  const { shopId, state } = press.data
  const back = paths.press.href(pressId)
  if (shopId !== shop.id) return <SkeletonPage />
  if (!can('press:describe') || state.description === null || state.underTest) return <Navigate replace to={back} />
  return (
    <EditPressForm
      key={pressId}
      state={state}
      description={state.description}
      units={{ length: shop.lengthUnit, pressure: shop.pressureUnit }}
      onDone={() => void navigate(back)}
    />
  )
}

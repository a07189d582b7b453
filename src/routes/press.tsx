import { useParams } from 'react-router-dom'
import { SkeletonPage } from '../components/skeleton'
import { usePress } from '../features/presses/api/get-press'
import { PressPage } from '../features/presses/components/page/press-page'
import { useAdoptShop } from '../lib/here'

export function Component() {
  const { pressId = '' } = useParams()
  const press = usePress(pressId)
  useAdoptShop(press.data?.shopId)
  if (press.data === undefined) {
    if (press.error) throw press.error
    return <SkeletonPage />
  }
  return <PressPage key={pressId} state={press.data.state} people={press.data.people} photos={press.data.photos} />
}

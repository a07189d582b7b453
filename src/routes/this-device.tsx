import { useSearchParams } from 'react-router-dom'
import { DevicePage } from '../features/device/device-page'
import { useLeave } from '../features/people/api/sign-out'

export function Component() {
  const [search] = useSearchParams()
  const { leave, failed } = useLeave()
  return <DevicePage leaving={search.has('leaving')} onSignOut={leave} signOutFailed={failed} />
}

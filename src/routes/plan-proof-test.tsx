import { useNavigate, useSearchParams } from 'react-router-dom'
import { PlainScreen } from '../components/plain-screen'
import { SkeletonPage } from '../components/skeleton'
import { usePlanRegisters } from '../features/plan/api/get-plan-registers'
import { PlanForm } from '../features/plan/components/plan-form'
import { useCan, useShop } from '../lib/here'
import { paths } from '../paths'

export function Component() {
  const shop = useShop()
  const can = useCan()
  const navigate = useNavigate()
  const [search] = useSearchParams()
  const registers = usePlanRegisters(shop.id)
  if (!can('proof-test:open')) {
    return (
      <PlainScreen title="A lead or the owner plans tests">
        <p>Ask one of them. You can be pump hand or witness of a test that they open.</p>
      </PlainScreen>
    )
  }
  if (registers.data === undefined) {
    if (registers.error) throw registers.error
    return <SkeletonPage />
  }
  return (
    <PlanForm
      key={shop.id}
      registers={registers.data}
      asked={{ press: search.get('press') ?? '', repeats: search.get('repeats') ?? '' }}
      onOpened={(testId) => void navigate(paths.runProofTest.href(testId))}
    />
  )
}

import { useParams } from 'react-router-dom'
import { SkeletonPage } from '../components/skeleton'
import { usePiece } from '../features/tooling/api/get-tooling'
import { ToolingPage } from '../features/tooling/components/tooling-page'
import { useAdoptShop, useCan } from '../lib/here'
import { paths } from '../paths'

export function Component() {
  const { toolingId = '' } = useParams()
  const can = useCan()
  const { data, error } = usePiece(toolingId)
  useAdoptShop(data?.shopId)
  if (data === undefined) {
    if (error) throw error
    return <SkeletonPage />
  }
  const { shopId, tooling } = data
  return (
    <ToolingPage
      key={toolingId}
      tooling={tooling}
      mayWrite={can('tooling:write', { shopId })}
      planTo={can('proof-test:open', { shopId }) ? paths.planProofTest.href({ shop: shopId }) : undefined}
    />
  )
}

import { useNavigate, useParams } from 'react-router-dom'
import { Page } from '../components/page'
import { SkeletonPage } from '../components/skeleton'
import { useAddPiece, useChangePiece } from '../features/tooling/api/change-tooling'
import { usePiece } from '../features/tooling/api/get-tooling'
import { ToolingForm } from '../features/tooling/components/tooling-form'
import { useAdoptShop, useShop } from '../lib/here'
import { paths } from '../paths'

function NewPiece() {
  const shop = useShop()
  const navigate = useNavigate()
  const add = useAddPiece(shop.id)
  return (
    <Page title="Enter a piece of tooling" note={`of ${shop.name}`}>
      <ToolingForm
        units={shop}
        sending={add.isPending}
        send={async (details) => navigate(paths.tool.href((await add.mutateAsync(details)).tooling.id), { replace: true })}
        onLeave={() => void navigate(paths.tooling.href({ shop: shop.id }))}
      />
    </Page>
  )
}

function ChangedPiece({ id }: { id: string }) {
  const shop = useShop()
  const navigate = useNavigate()
  const { data, error } = usePiece(id)
  const change = useChangePiece(id)
  useAdoptShop(data?.shopId)
  if (data === undefined) {
    if (error) throw error
    return <SkeletonPage />
  }
  const back = () => navigate(paths.tool.href(id))
  const { details } = data.tooling
  return (
    <Page title={`Details of ${details.code}`}>
      <ToolingForm
        units={shop}
        existing={details}
        sending={change.isPending}
        send={async (changed) => {
          await change.mutateAsync(changed)
          await back()
        }}
        onLeave={() => void back()}
      />
    </Page>
  )
}

export function Component() {
  const { toolingId } = useParams()
  return toolingId === undefined ? <NewPiece /> : <ChangedPiece key={toolingId} id={toolingId} />
}

import { useParams, useSearchParams } from 'react-router-dom'
import { SkeletonPage } from '../components/skeleton'
import { useProtocol } from '../features/protocols/api/get-protocol'
import { ProtocolPage } from '../features/protocols/components/protocol-page'
import { useAdoptShop, useCan } from '../lib/here'

export function Component() {
  const { protocolId = '' } = useParams()
  const [params] = useSearchParams()
  const can = useCan()
  const { data, error } = useProtocol(protocolId)
  useAdoptShop(data?.shopId)
  if (data === undefined) {
    if (error) throw error
    return <SkeletonPage />
  }
  const asked = Number(params.get('version') ?? undefined)
  return <ProtocolPage key={protocolId} answer={data} asked={asked} mayWrite={can('protocol:write', { shopId: data.shopId })} />
}

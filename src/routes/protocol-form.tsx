import { useNavigate, useParams } from 'react-router-dom'
import { FIRST_LOAD_BY_QUARTERS } from '#shared/proof-test/protocol'
import { Page } from '../components/page'
import { SkeletonPage } from '../components/skeleton'
import { useAddProtocol } from '../features/protocols/api/add-protocol'
import { useAddProtocolVersion } from '../features/protocols/api/add-protocol-version'
import { useProtocol } from '../features/protocols/api/get-protocol'
import { ProtocolForm } from '../features/protocols/components/protocol-form'
import { useAdoptShop, useShop } from '../lib/here'
import { paths } from '../paths'

function NewProtocol() {
  const shop = useShop()
  const navigate = useNavigate()
  const add = useAddProtocol(shop.id)
  return (
    <Page title="Write a protocol" note="begins with the values of a first load by quarters">
      <ProtocolForm
        name=""
        content={{ ...FIRST_LOAD_BY_QUARTERS, purpose: '' }}
        lengthUnit={shop.lengthUnit}
        version={1}
        sending={add.isPending}
        send={async (request) => navigate(paths.protocol.href((await add.mutateAsync(request)).protocol.id), { replace: true })}
        onLeave={() => void navigate(paths.protocols.href({ shop: shop.id }))}
      />
    </Page>
  )
}

function NextVersion({ id }: { id: string }) {
  const shop = useShop()
  const navigate = useNavigate()
  const { data, error } = useProtocol(id)
  const add = useAddProtocolVersion(id)
  useAdoptShop(data?.shopId)
  if (data === undefined) {
    if (error) throw error
    return <SkeletonPage />
  }
  const { name, content, version } = data.protocol
  const back = () => navigate(paths.protocol.href(id))
  const send = (request: Parameters<typeof add.mutateAsync>[0]) => add.mutateAsync(request).then(back)
  const form = { name, content, lengthUnit: shop.lengthUnit, version: version + 1 }
  return (
    <Page title={name} note={`version ${version + 1}, to be written`}>
      <ProtocolForm {...form} sending={add.isPending} send={send} onLeave={() => void back()} />
    </Page>
  )
}

export function Component() {
  const { protocolId } = useParams()
  return protocolId === undefined ? <NewProtocol /> : <NextVersion key={protocolId} id={protocolId} />
}

import { useNavigate, useParams } from 'react-router-dom'
import { Page } from '../components/page'
import { SkeletonPage } from '../components/skeleton'
import { useAddInstrument } from '../features/instruments/api/add-instrument'
import { useChangeInstrument } from '../features/instruments/api/change-instrument'
import { useInstrument } from '../features/instruments/api/get-instrument'
import { InstrumentForm } from '../features/instruments/components/instrument-form'
import { useAdoptShop, useShop } from '../lib/here'
import { paths } from '../paths'

function NewInstrument() {
  const shop = useShop()
  const navigate = useNavigate()
  const add = useAddInstrument(shop.id)
  return (
    <Page title="Enter an instrument" note={`of ${shop.name}`}>
      <InstrumentForm
        units={shop}
        sending={add.isPending}
        send={async (details) => navigate(paths.instrument.href((await add.mutateAsync(details)).instrument.id), { replace: true })}
        onLeave={() => void navigate(paths.instruments.href({ shop: shop.id }))}
      />
    </Page>
  )
}

function ChangedInstrument({ id }: { id: string }) {
  const shop = useShop()
  const navigate = useNavigate()
  const { data, error } = useInstrument(id)
  const change = useChangeInstrument(id)
  useAdoptShop(data?.shopId)
  if (data === undefined) {
    if (error) throw error
    return <SkeletonPage />
  }
  const back = () => navigate(paths.instrument.href(id))
  const { details } = data.instrument
  return (
    <Page title={`Details of ${details.code}`}>
      <InstrumentForm
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
  const { instrumentId } = useParams()
  return instrumentId === undefined ? <NewInstrument /> : <ChangedInstrument key={instrumentId} id={instrumentId} />
}

import { useParams } from 'react-router-dom'
import { SkeletonPage } from '../components/skeleton'
import { useInstrument } from '../features/instruments/api/get-instrument'
import { InstrumentPage } from '../features/instruments/components/instrument-page'
import { calendarDate } from '../lib/dates'
import { useAdoptShop, useCan } from '../lib/here'

export function Component() {
  const { instrumentId = '' } = useParams()
  const can = useCan()
  const { data, error } = useInstrument(instrumentId)
  useAdoptShop(data?.shopId)
  if (data === undefined) {
    if (error) throw error
    return <SkeletonPage />
  }
  const { shopId } = data
  return (
    <InstrumentPage
      key={instrumentId}
      answer={data}
      today={calendarDate(new Date())}
      mayWrite={can('instrument:write', { shopId })}
      mayCalibrate={can('calibration:write', { shopId })}
    />
  )
}

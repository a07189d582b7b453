import { useParams } from 'react-router-dom'
import { SkeletonPage } from '../components/skeleton'
import { useRecord } from '../features/records/api/get-ledger'
import { RecordSheet } from '../features/records/components/record-sheet'
import { ShutRecord } from '../features/records/components/shut-record'
import { isShutToWitness, partOf, signTurn } from '../features/records/sign-turn'
import { useAdoptShop, useCan, useUser } from '../lib/here'

export function Component() {
  const { proofTestId = '' } = useParams()
  const can = useCan()
  const user = useUser()
  const { record, error } = useRecord(proofTestId)
  const shopId = record?.opened.shop.id
  useAdoptShop(shopId)
  if (record === undefined) {
    if (error) throw error
    return <SkeletonPage />
  }
  if (isShutToWitness(record, user.id)) return <ShutRecord record={record} />
  return (
    <RecordSheet
      record={record}
      turn={signTurn(record, can)}
      mayExport={can('record:export', { shopId, testId: proofTestId })}
      part={partOf(record, user.id)}
      today={new Date()}
    />
  )
}

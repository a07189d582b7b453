import { useParams } from 'react-router-dom'
import { SkeletonPage } from '../components/skeleton'
import { useRecord } from '../features/records/api/get-ledger'
import { RecordSheet } from '../features/records/components/record-sheet'
import { signTurn } from '../features/records/sign-turn'
import { useAdoptShop, useCan } from '../lib/here'

export function Component() {
  const { proofTestId = '' } = useParams()
  const can = useCan()
  const { record, error } = useRecord(proofTestId)
  const shopId = record?.opened.shop.id
  useAdoptShop(shopId)
  if (record === undefined) {
    if (error) throw error
    return <SkeletonPage />
  }
  return <RecordSheet record={record} turn={signTurn(record, can)} mayExport={can('record:export', { shopId })} today={new Date()} />
}

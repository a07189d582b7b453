import { useParams } from 'react-router-dom'
import { AttendPage } from '../features/proof-test/attend/attend-page'

export function Component() {
  const { proofTestId = '' } = useParams()
  return <AttendPage key={proofTestId} testId={proofTestId} />
}

import { useParams } from 'react-router-dom'
import { RunPage } from '../features/proof-test/run/run-page'

export function Component() {
  const { proofTestId = '' } = useParams()
  return <RunPage key={proofTestId} testId={proofTestId} />
}

import { useParams } from 'react-router-dom'
import { SkeletonPage } from '../components/skeleton'
import { usePublicTag, useTag } from '../features/tag/api/get-tag'
import { PrintTag } from '../features/tag/components/print-tag'

export function Component() {
  const { pressId = '' } = useParams()
  const made = useTag(pressId)
  const tag = usePublicTag(made.data?.code ?? '')
  const error = made.error ?? (tag.data === undefined ? tag.error : null)
  if (error && (made.data === undefined || tag.data === undefined)) throw error
  if (made.data === undefined || tag.data === undefined) return <SkeletonPage />
  return <PrintTag key={pressId} pressId={pressId} made={made.data} tag={tag.data} old={tag.error !== null} />
}

import { useParams } from 'react-router-dom'
import { NotFound } from '../components/route-error'
import { TopicPage } from '../features/help/components/topic-page'
import { TOPICS } from '../features/help/topics'

export function Component() {
  const { topic: slug } = useParams()
  const index = TOPICS.findIndex((topic) => topic.slug === slug)
  const topic = TOPICS[index]
  if (topic === undefined) return <NotFound />
  return <TopicPage key={topic.slug} topic={topic} before={TOPICS[index - 1]} after={TOPICS[index + 1]} />
}

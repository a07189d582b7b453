import { RuledList, RuledRow } from '../../../components/ruled-list'
import { paths } from '../../../paths'
import type { Topic } from '../topic'

/** Every page of help, by the question it answers. */
export function TopicList({ topics }: { topics: readonly Topic[] }) {
  return (
    <RuledList className="border-t-2 border-t-ink">
      {topics.map((topic) => (
        <RuledRow key={topic.slug} title={topic.question} note={topic.title} to={paths.helpTopic.href(topic.slug)} />
      ))}
    </RuledList>
  )
}

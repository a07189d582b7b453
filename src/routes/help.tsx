import { Page } from '../components/page'
import { TopicList } from '../features/help/components/topic-list'
import { TOPICS } from '../features/help/topics'

export function Component() {
  return (
    <Page title="Help" note="how each figure is worked out, and by which rule" narrow>
      <TopicList topics={TOPICS} />
    </Page>
  )
}

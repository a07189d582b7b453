import { TextLink } from '../components/button'
import { Page } from '../components/page'
import { TopicList } from '../features/help/components/topic-list'
import { TOPICS } from '../features/help/topics'
import { paths } from '../paths'

export function Component() {
  return (
    <Page title="Help" note="how each figure is worked out, and by which rule" narrow>
      <TopicList topics={TOPICS} />
      <p className="py-4">
        Whether a record is as it was sealed: <TextLink to={paths.checkRecord.href()}>Check a record</TextLink>
      </p>
    </Page>
  )
}

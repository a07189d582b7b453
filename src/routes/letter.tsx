import { useParams } from 'react-router-dom'
import { ButtonLink } from '../components/button'
import { Page } from '../components/page'
import { SkeletonPage } from '../components/skeleton'
import { useLetter } from '../features/mail/api/get-mail'
import { LetterView } from '../features/mail/components/letter-view'
import { useAdoptShop } from '../lib/here'
import { paths } from '../paths'

export function Component() {
  const { mailId = '' } = useParams()
  const letter = useLetter(mailId)
  useAdoptShop(letter.data?.shopId)
  if (letter.data === undefined) {
    if (letter.error) throw letter.error
    return <SkeletonPage />
  }
  return (
    <Page title={letter.data.mail.subject} actions={<ButtonLink to={paths.mail.href()}>All letters</ButtonLink>}>
      <LetterView letter={letter.data} />
    </Page>
  )
}

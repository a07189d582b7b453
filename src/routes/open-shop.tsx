import { useNavigate } from 'react-router-dom'
import { FootLink } from '../features/people/components/foot-link'
import { OpenShopForm } from '../features/people/components/open-shop-form'
import { TitleBlock } from '../features/people/components/title-block'
import { useTitle } from '../lib/use-title'
import { paths } from '../paths'

export function Component() {
  useTitle('Open a shop')
  const navigate = useNavigate()
  return (
    <TitleBlock
      wide
      title="Open a shop"
      lead="You become its owner and add the lead, the witness and the crew."
      foot={<FootLink to={paths.signIn.href()}>Sign in to a shop that is open</FootLink>}
    >
      <OpenShopForm onOpened={() => void navigate(paths.today.href(), { replace: true })} />
    </TitleBlock>
  )
}

import { ForgottenForm } from '../features/invitations/components/forgotten-form'
import { FootLink } from '../features/people/components/foot-link'
import { TitleBlock } from '../features/people/components/title-block'
import { useTitle } from '../lib/use-title'
import { paths } from '../paths'

export function Component() {
  useTitle('Forgotten password')
  return (
    <TitleBlock
      title="Forgotten password"
      lead="A link goes to your address. By it you choose a new one."
      foot={<FootLink to={paths.signIn.href()}>Back to signing in</FootLink>}
    >
      <ForgottenForm />
    </TitleBlock>
  )
}

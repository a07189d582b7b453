import { useNavigate, useSearchParams } from 'react-router-dom'
import { VersionPlate } from '../components/version-plate'
import { FootLink } from '../features/people/components/foot-link'
import { SignInForm } from '../features/people/components/sign-in-form'
import { TitleBlock } from '../features/people/components/title-block'
import { ownPath } from '../lib/own-path'
import { useTitle } from '../lib/use-title'
import { paths } from '../paths'

export function Component() {
  useTitle('Sign in')
  const navigate = useNavigate()
  const [search] = useSearchParams()
  return (
    <TitleBlock
      over={<VersionPlate />}
      title={
        <>
          First load
          <br />
          by quarters
        </>
      }
      lead={
        <>
          Load it in four steps. Read it at each one.
          <br />
          Stop when it stops behaving like a spring.
        </>
      }
      foot={
        <>
          <FootLink to={paths.forgottenPassword.href()}>Forgotten password</FootLink>
          <FootLink to={paths.openShop.href()}>Open a shop</FootLink>
          <FootLink to={paths.checkRecord.href()}>Check a record</FootLink>
        </>
      }
    >
      <SignInForm onSignedIn={() => void navigate(ownPath(search.get('next')) ?? paths.today.href(), { replace: true })} />
    </TitleBlock>
  )
}

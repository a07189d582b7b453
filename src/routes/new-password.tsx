import { useNavigate, useParams } from 'react-router-dom'
import { SkeletonRows } from '../components/skeleton'
import { useResetLink } from '../features/invitations/api/password-reset'
import { NewPasswordForm } from '../features/invitations/components/new-password-form'
import { FootLink } from '../features/people/components/foot-link'
import { TitleBlock } from '../features/people/components/title-block'
import { sayWhatFailed } from '../lib/problem'
import { useTitle } from '../lib/use-title'
import { paths } from '../paths'

export function Component() {
  useTitle('A new password')
  const { token = '' } = useParams()
  const navigate = useNavigate()
  const link = useResetLink(token)
  return (
    <TitleBlock
      title="A new password"
      lead="Choose one that nobody else knows: it also signs records."
      foot={
        <FootLink to={link.error ? paths.forgottenPassword.href() : paths.signIn.href()}>
          {link.error ? 'Ask for another link' : 'Back to signing in'}
        </FootLink>
      }
    >
      {link.isSuccess && <NewPasswordForm token={token} onSet={() => void navigate(paths.signIn.href(), { replace: true })} />}
      {link.error && <p className="text-18">{sayWhatFailed(link.error)}</p>}
      {link.isPending && <SkeletonRows rows={3} />}
    </TitleBlock>
  )
}

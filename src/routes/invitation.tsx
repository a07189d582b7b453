import { useNavigate, useParams } from 'react-router-dom'
import { useQueryClient } from '@tanstack/react-query'
import { SkeletonRows } from '../components/skeleton'
import { useAccept, useInvitation } from '../features/invitations/api/invitation'
import { AcceptForm } from '../features/invitations/components/accept-form'
import { invitationHolds, invitedTo } from '../features/invitations/components/invitation-words'
import { rememberSession, sessionQuery } from '../features/people/api/get-session'
import { FootLink } from '../features/people/components/foot-link'
import { TitleBlock } from '../features/people/components/title-block'
import { sayWhatFailed } from '../lib/problem'
import { useTitle } from '../lib/use-title'
import { paths } from '../paths'

export function Component() {
  useTitle('Invitation')
  const { token = '' } = useParams()
  const navigate = useNavigate()
  const client = useQueryClient()
  const { data: invitation, error, isPending } = useInvitation(token)
  const accept = useAccept((session) => {
    client.setQueryData(sessionQuery().queryKey, session)
    void rememberSession(session)
  })
  return (
    <TitleBlock
      wide
      title={invitation ? `${invitation.invitedBy} invites you to ${invitation.shopName}` : 'Invitation'}
      lead={invitation && <p className="max-w-prose">{`${invitedTo(invitation)} ${invitationHolds(invitation)}`}</p>}
      foot={<FootLink to={paths.signIn.href()}>Sign in</FootLink>}
    >
      {invitation && (
        <AcceptForm
          token={token}
          invitation={invitation}
          busy={accept.isPending}
          accept={(request, onError) =>
            accept.mutate(request, { onSuccess: () => void navigate(paths.today.href(), { replace: true }), onError })
          }
        />
      )}
      {error && <p className="text-18">{sayWhatFailed(error)}</p>}
      {isPending && <SkeletonRows rows={3} />}
    </TitleBlock>
  )
}

import { useCallback, useEffect, useMemo, useState, type ReactNode } from 'react'
import { Navigate, useLocation, useSearchParams } from 'react-router-dom'
import { HereContext, type GuestHere, type Here } from '../../../lib/here'
import { isSignedOut } from '../../../lib/problem'
import { chooseShop, rememberShop, rememberedShop } from '../../../lib/shop-memory'
import { ButtonLink } from '../../../components/button'
import { PlainScreen } from '../../../components/plain-screen'
import { SkeletonPage } from '../../../components/skeleton'
import { paths } from '../../../paths'
import { useSession } from '../api/get-session'

type HereProviderProps = {
  children: ReactNode
  /** A test under load goes on when the session ends: only sending waits. Elsewhere one signs in again. */
  staysWhenSignedOut?: boolean
  /** What somebody from outside gets instead, who sees one test and nothing else; without it the same. */
  guestScreens?: ReactNode
}

/** Says to every screen below who is signed in and which shop the tab shows. */
export function HereProvider({ children, staysWhenSignedOut = false, guestScreens }: HereProviderProps) {
  const session = useSession()
  const location = useLocation()
  const [search] = useSearchParams()
  const [picked, setPicked] = useState(rememberedShop)

  const shops = session.data?.shops
  const shop = shops && chooseShop(shops, search.get('shop'), picked)
  const shopId = shop?.id
  const adopt = useCallback((id: string) => {
    rememberShop(id)
    setPicked(id)
  }, [])
  useEffect(() => {
    if (shopId !== undefined) adopt(shopId)
  }, [adopt, shopId])

  const user = session.data?.user
  const userId = user?.id
  useEffect(() => {
    // What an earlier page kept and could not send goes out from whichever screen comes next.
    if (userId === undefined || !('indexedDB' in window)) return
    void import('../../../lib/outbox').then(({ outbox }) => outbox.sendAs(userId))
    void import('../../../lib/attachments').then(({ files }) => files.sendNow({ everything: true }))
  }, [userId])
  const guestOf = session.data?.guestOf
  const here = useMemo<Here | GuestHere | null>(() => {
    if (!user || !shops) return null
    if (shop) return { user, shops, shop, adopt, guestOf }
    return guestOf && guestOf.length > 0 ? { user, shops, shop: null, adopt, guestOf } : null
  }, [user, shops, shop, adopt, guestOf])

  if (isSignedOut(session.error) && !(staysWhenSignedOut && here)) {
    return <Navigate replace to={paths.signIn.href({ next: location.pathname + location.search })} />
  }
  if (session.data === undefined) {
    if (session.error) throw session.error
    return <SkeletonPage />
  }
  if (here === null) {
    return (
      <PlainScreen title="You belong to no shop" actions={<ButtonLink to={paths.signIn.href()}>Sign in as someone else</ButtonLink>}>
        <p>Ask the owner of your shop to add you again, or open a shop of your own.</p>
      </PlainScreen>
    )
  }
  return <HereContext value={here}>{here.shop === null && guestScreens ? guestScreens : children}</HereContext>
}

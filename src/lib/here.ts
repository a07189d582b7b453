import { createContext, useContext, useEffect } from 'react'
import type { GuestTest, SessionResponse } from '#shared/api/session'
import { can, type Action, type Assignment } from '#shared/policy'

export type SignedInUser = SessionResponse['user']
/** A shop this person belongs to, with the role there. */
export type MyShop = SessionResponse['shops'][number]

type Person = {
  user: SignedInUser
  shops: readonly MyShop[]
  /** Tests of other shops that this person witnesses from outside. */
  guestOf?: readonly GuestTest[]
  /** Shows another of the person's shops in this tab, because something of it was opened. */
  adopt: (shopId: string) => void
}

export type Here = Person & {
  /** The shop this tab shows. */
  shop: MyShop
}

/** Somebody who belongs to no shop, and witnesses a test of one. */
export type GuestHere = Person & { shop: null }

export const HereContext = createContext<Here | GuestHere | null>(null)

function useAnybody(): Here | GuestHere {
  const here = useContext(HereContext)
  if (here === null) throw new Error('useHere() is called outside the signed-in screens.')
  return here
}

/** Who is signed in and which shop this tab shows. Only inside the signed-in part of the router. */
export function useHere(): Here {
  const here = useAnybody()
  if (here.shop === null) throw new Error('This screen is for people of a shop.')
  return here
}

export const useUser = (): SignedInUser => useAnybody().user
export const useMyShops = (): readonly MyShop[] => useAnybody().shops
export const useGuestOf = (): readonly GuestTest[] => useAnybody().guestOf ?? []
export const useShop = (): MyShop => useHere().shop

/** Asks the shared policy for the signed-in person, in the shop given or the one this tab shows. */
export function useCan(): (action: Action, subject?: { shopId?: string; assignment?: Assignment; testId?: string }) => boolean {
  const { user, shops, shop, guestOf = [] } = useAnybody()
  return (action, subject = {}) => {
    const shopId = subject.shopId ?? shop?.id ?? ''
    const role = shops.find((one) => one.id === shopId)?.role ?? null
    const tests = guestOf.flatMap(({ test }) => test?.proofTestId ?? [])
    return can({ userId: user.id, shopId, role, guestOf: tests }, action, { ...subject, shopId })
  }
}

/** A thing opened by its id brings its shop along: the navigation follows it. */
export function useAdoptShop(shopId: string | undefined): void {
  const { adopt, shop, shops } = useAnybody()
  const mine = shops.some(({ id }) => id === shopId)
  useEffect(() => {
    if (shopId !== undefined && mine && shopId !== shop?.id) adopt(shopId)
  }, [adopt, mine, shop?.id, shopId])
}

import { createContext, useContext, useEffect } from 'react'
import type { SessionResponse } from '#shared/api/session'
import { can, type Action, type Assignment } from '#shared/policy'

export type SignedInUser = SessionResponse['user']
/** A shop this person belongs to, with the role there. */
export type MyShop = SessionResponse['shops'][number]

export type Here = {
  user: SignedInUser
  shops: readonly MyShop[]
  /** The shop this tab shows. */
  shop: MyShop
  /** Shows another of the person's shops in this tab, because something of it was opened. */
  adopt: (shopId: string) => void
}

export const HereContext = createContext<Here | null>(null)

/** Who is signed in and which shop this tab shows. Only inside the signed-in part of the router. */
export function useHere(): Here {
  const here = useContext(HereContext)
  if (here === null) throw new Error('useHere() is called outside the signed-in screens.')
  return here
}

export const useUser = (): SignedInUser => useHere().user
export const useShop = (): MyShop => useHere().shop

/** Asks the shared policy for the signed-in person, in the shop given or the one this tab shows. */
export function useCan(): (action: Action, subject?: { shopId?: string; assignment?: Assignment }) => boolean {
  const { user, shops, shop } = useHere()
  return (action, subject = {}) => {
    const shopId = subject.shopId ?? shop.id
    const role = shops.find((one) => one.id === shopId)?.role ?? null
    return can({ userId: user.id, shopId, role }, action, { shopId, assignment: subject.assignment })
  }
}

/** A thing opened by its id brings its shop along: the navigation follows it. */
export function useAdoptShop(shopId: string | undefined): void {
  const { adopt, shop } = useHere()
  useEffect(() => {
    if (shopId !== undefined && shopId !== shop.id) adopt(shopId)
  }, [adopt, shop.id, shopId])
}

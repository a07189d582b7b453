import type { ReactNode } from 'react'
import { useLocation, useNavigate } from 'react-router-dom'
import { PhoneNavigation, PhoneTitleBar } from '../../../components/navigation/phone-navigation'
import { ShopMenu, type MenuEntry } from '../../../components/navigation/shop-menu'
import { TopNavigation } from '../../../components/navigation/top-navigation'
import { useCan, useHere } from '../../../lib/here'
import { paths } from '../../../paths'
import { entriesWait, useLeave } from '../api/sign-out'

/** What belongs to the person and the shop: the menu on wide screens, part of "More" on the phone. */
export function usePersonEntries(): readonly MenuEntry[] {
  const { user, shop, shops, guestOf = [] } = useHere()
  const can = useCan()
  const { leave, failed } = useLeave()
  const navigate = useNavigate()
  const leaveOrSay = async (): Promise<void> => {
    if (await entriesWait(user.id)) await navigate(paths.thisDevice.href({ leaving: 'yes' }))
    else leave()
  }
  const otherShops = shops.filter((one) => one.id !== shop.id)
  return [
    { label: 'Your account', to: paths.account.href() },
    { label: 'Shop settings', to: paths.settings.href() },
    ...(can('mail:read') ? [{ label: 'Mail', note: 'letters of this shop', to: paths.mail.href() }] : []),
    { label: 'On this device', note: 'what is kept here, sent and sealed', to: paths.thisDevice.href() },
    { label: 'Help', note: 'how each figure is worked out', to: paths.help.href() },
    ...otherShops.map((one) => ({ label: `Go to ${one.name}`, note: `there you are ${one.role}`, to: paths.today.href({ shop: one.id }) })),
    ...guestOf.flatMap(({ test, shopName }) =>
      test === null ? [] : [{ label: `Witness ${test.number}`, note: `at ${shopName}`, to: paths.attendProofTest.href(test.proofTestId) }],
    ),
    {
      label: failed ? 'Still signed in: try again' : 'Sign out',
      note: failed ? 'The server was not reached.' : undefined,
      act: () => void leaveOrSay(),
    },
  ]
}

type SignedInFrameProps = {
  /** On the phone's title bar, at the right of Today: the day. */
  day: string
  children: ReactNode
}

/** Navigation round every signed-in screen but the run and the witness's view. */
export function SignedInFrame({ day, children }: SignedInFrameProps) {
  const { user, shop } = useHere()
  const entries = usePersonEntries()
  const { pathname } = useLocation()
  const onToday = pathname === paths.today.pattern
  return (
    <div className="flex min-h-dvh flex-col">
      <a
        href="#content"
        className="ground-steel sr-only z-40 border-2 border-ink px-4 py-3 font-semibold focus:not-sr-only focus:absolute focus:top-2 focus:left-2"
      >
        Go to the content
      </a>
      <TopNavigation>
        <ShopMenu shop={shop.name} person={user.name} role={shop.role} entries={entries} />
      </TopNavigation>
      <PhoneTitleBar title={onToday ? 'Today' : shop.name}>{onToday ? day : shop.role}</PhoneTitleBar>
      <main id="content" tabIndex={-1} className="flex min-w-0 grow flex-col">
        {children}
      </main>
      <PhoneNavigation />
    </div>
  )
}

import type { ReactNode } from 'react'
import { Link, matchPath, useLocation, useNavigate } from 'react-router-dom'
import { ButtonLink } from '../../../components/button'
import { Page } from '../../../components/page'
import { ProductMark } from '../../../components/product-mark'
import { ScaleEdge } from '../../../components/plate'
import { RuledList, RuledRow } from '../../../components/ruled-list'
import { Mark } from '../../../components/marks'
import { useGuestOf, useUser } from '../../../lib/here'
import { paths } from '../../../paths'
import { entriesWait, useLeave } from '../api/sign-out'

/** What somebody from outside may open besides the test itself. */
const OWN = [paths.proofTest, paths.account, paths.thisDevice, paths.help, paths.helpTopic].map(({ pattern }) => pattern)
/** Screens of a shop’s people that look like a test by their address. */
const NOT_OWN = [paths.planProofTest.pattern]

/** The tests that somebody witnesses from outside: their only first screen. */
function GuestTests() {
  const guestOf = useGuestOf()
  return (
    <Page title="What you witness" narrow>
      <RuledList className="border-t-2 border-t-ink">
        {guestOf.map(({ shopName, pressName, test }, index) =>
          test === null ? (
            <RuledRow
              key={`next-${index}`}
              mark={<Mark name="to-come" size={22} />}
              title={`The next proof test of ${pressName}`}
              note={`${shopName}. It is not open yet: come back when the lead tells you, and have this page at hand at the press.`}
            />
          ) : (
            <li key={test.proofTestId} className="border-b border-hairline py-4">
              <p className="text-20 font-semibold">{`${test.number}, ${pressName}`}</p>
              <p className="text-graphite">{`${shopName}, ${test.status}`}</p>
              <div className="mt-3 grid gap-3 tablet:grid-cols-2">
                <ButtonLink kind={index === 0 ? 'next' : 'plain'} to={paths.attendProofTest.href(test.proofTestId)}>
                  Attend it
                </ButtonLink>
                <ButtonLink to={paths.proofTest.href(test.proofTestId)}>Read its record</ButtonLink>
              </div>
            </li>
          ),
        )}
      </RuledList>
      <p className="mt-4 text-graphite">You see the tests you were invited to and nothing else of the shop.</p>
    </Page>
  )
}

/** Round the screens of somebody who belongs to no shop and witnesses a test of one. */
export function GuestFrame({ children }: { children: ReactNode }) {
  const user = useUser()
  const { pathname } = useLocation()
  const { leave, failed } = useLeave()
  const navigate = useNavigate()
  const leaveOrSay = async (): Promise<void> => {
    if (await entriesWait(user.id)) await navigate(paths.thisDevice.href({ leaving: 'yes' }))
    else leave()
  }
  const isOwn = OWN.some((pattern) => matchPath(pattern, pathname)) && !NOT_OWN.some((pattern) => matchPath(pattern, pathname))
  return (
    <div className="flex min-h-dvh flex-col">
      <header className="ground-deep-dye print:hidden">
        <div className="flex min-h-[60px] items-stretch">
          <Link to={paths.today.href()} className="flex min-w-0 grow items-center gap-2.5 px-4 -outline-offset-4!">
            <ProductMark size={36} />
            <span className="min-w-0">
              <span className="block truncate font-semibold">{user.name}</span>
              <span className="block truncate text-14/[17px] text-faint-scribe">witness from outside</span>
            </span>
          </Link>
          <Link to={paths.account.href()} className="flex shrink-0 items-center border-l border-ghost px-4 -outline-offset-4! hover:bg-dye">
            Account
          </Link>
          <button
            type="button"
            className="flex shrink-0 items-center border-l border-ghost px-4 whitespace-nowrap -outline-offset-4! hover:bg-dye"
            onClick={() => void leaveOrSay()}
          >
            {failed ? 'Still signed in' : 'Sign out'}
          </button>
        </div>
        <ScaleEdge />
      </header>
      <main id="content" tabIndex={-1} className="flex min-w-0 grow flex-col">
        {isOwn ? children : <GuestTests />}
      </main>
    </div>
  )
}

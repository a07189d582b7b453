import { paths } from '../../paths'

export type Destination = { label: string; to: string; matches: (pathname: string) => boolean }

const under = (root: string) => (pathname: string) => pathname === root || pathname.startsWith(`${root}/`)

const at = (label: string, root: string): Destination => ({
  label,
  to: root,
  matches: root === '/' ? (pathname) => pathname === '/' : under(root),
})

// The calendar is Today's scale in full, and has no cell of its own.
const today: Destination = {
  ...at('Today', paths.today.pattern),
  matches: (pathname) => pathname === paths.today.pattern || under(paths.calendar.pattern)(pathname),
}
const presses = at('Presses', paths.presses.pattern)
const instruments = at('Instruments', paths.instruments.pattern)
const tooling = at('Tooling', paths.tooling.pattern)
const calendar = at('Calendar', paths.calendar.pattern)
const protocols = at('Protocols', paths.protocols.pattern)
const proofTests = at('Proof tests', paths.proofTests.pattern)
const people = at('People', paths.people.pattern)

/** The cells of the navigation on tablet and desktop. */
export const destinations: readonly Destination[] = [today, presses, instruments, tooling, protocols, proofTests, people]

const elsewhere = [
  paths.more,
  paths.instruments,
  paths.tooling,
  paths.protocols,
  paths.people,
  paths.mail,
  paths.settings,
  paths.account,
  paths.thisDevice,
  paths.help,
]

/** The four cells at the foot of the phone; the fourth stands for all the rest. */
export const phoneDestinations: readonly Destination[] = [
  today,
  presses,
  { ...proofTests, label: 'Tests' },
  { label: 'More', to: paths.more.href(), matches: (pathname) => elsewhere.some(({ pattern }) => under(pattern)(pathname)) },
]

/** What the phone's "More" leads to. */
export const moreDestinations: readonly Destination[] = [instruments, tooling, protocols, people, calendar]

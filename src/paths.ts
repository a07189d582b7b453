/**
 * Every address of the product: the router's pattern beside the function that writes it. Lists name their
 * shop in the query, so that two tabs can show two shops; a thing opened by its id brings its shop along.
 */

type ListQuery = { shop?: string } & Record<string, string | undefined>

/** `path?a=b`, leaving out what is undefined or empty. */
export function withQuery(path: string, query: Record<string, string | undefined> = {}): string {
  const search = new URLSearchParams()
  for (const [name, value] of Object.entries(query)) {
    if (value !== undefined && value !== '') search.set(name, value)
  }
  const text = search.toString()
  return text === '' ? path : `${path}?${text}`
}

const list = (path: string) => ({ pattern: path, href: (query: ListQuery = {}) => withQuery(path, query) })
const one = <Name extends string>(base: string, parameter: Name, tail = '') => ({
  pattern: `${base}/:${parameter}${tail}` as const,
  href: (id: string) => `${base}/${encodeURIComponent(id)}${tail}`,
})

export const paths = {
  today: list('/'),

  presses: list('/presses'),
  newPress: list('/presses/new'),
  press: one('/presses', 'pressId'),
  editPress: one('/presses', 'pressId', '/edit'),
  pressTag: one('/presses', 'pressId', '/tag'),

  instruments: list('/instruments'),
  newInstrument: list('/instruments/new'),
  instrument: one('/instruments', 'instrumentId'),
  editInstrument: one('/instruments', 'instrumentId', '/edit'),

  tooling: list('/tooling'),
  newTool: list('/tooling/new'),
  tool: one('/tooling', 'toolingId'),
  editTool: one('/tooling', 'toolingId', '/edit'),

  protocols: list('/protocols'),
  newProtocol: list('/protocols/new'),
  protocol: one('/protocols', 'protocolId'),
  newProtocolVersion: one('/protocols', 'protocolId', '/new-version'),

  proofTests: list('/proof-tests'),
  planProofTest: list('/proof-tests/new'),
  proofTest: one('/proof-tests', 'proofTestId'),
  runProofTest: one('/proof-tests', 'proofTestId', '/run'),
  attendProofTest: one('/proof-tests', 'proofTestId', '/attend'),

  calendar: list('/calendar'),

  people: list('/people'),
  mail: list('/mail'),
  letter: one('/mail', 'mailId'),
  settings: list('/settings'),
  account: list('/account'),
  more: list('/more'),
  /** `leaving` when somebody signs out while entries wait. */
  thisDevice: list('/this-device'),

  help: list('/help'),
  helpTopic: one('/help', 'topic'),

  signIn: {
    pattern: '/sign-in',
    href: (query: { next?: string } = {}) => withQuery('/sign-in', query),
  },
  forgottenPassword: { pattern: '/forgotten-password', href: () => '/forgotten-password' },
  newPassword: one('/new-password', 'token'),
  invitation: one('/invitation', 'token'),
  openShop: { pattern: '/open-shop', href: () => '/open-shop' },
  checkRecord: { pattern: '/check', href: () => '/check' },
  /** What the QR code of a press's tag leads to, for whoever scans it. */
  publicTag: one('/tag', 'code'),
} as const

// The arrows between folders, as a lint rule: what may know what. The message says where the code belongs instead.
import path from 'node:path'

/** Folders of `src` from top to bottom; each may use itself and what lies below it. */
const clientLayers = ['app', 'routes', 'features', 'components', 'lib', 'paths']

/** What each part of the server may use besides itself and the foundation. */
const serverUses = {
  app: ['bootstrap', 'database', 'routes', 'middleware', 'presenters', 'services', 'ledger', 'models', 'records', 'jobs', 'mail', 'storage', 'seeders'],
  bootstrap: ['app'],
  routes: ['middleware', 'presenters', 'services', 'records'],
  middleware: ['services'],
  presenters: ['services', 'models', 'ledger', 'mail'],
  jobs: ['services', 'ledger', 'models', 'mail', 'storage'],
  seeders: ['services', 'ledger', 'models'],
  services: ['ledger', 'models', 'records', 'mail', 'storage'],
  records: ['ledger', 'models'],
  ledger: ['models', 'database', 'mail'],
  models: [],
  database: [],
  mail: ['models'],
  storage: [],
}

/** Files at the top of `server` that know nothing of the rest. */
const serverFoundation = new Set(['config', 'context', 'problem', 'secrets', 'transaction'])

const advice = {
  shared: 'shared is pure and uses zod, @noble and itself only: take what the clock, the network or the platform gives as an argument, and keep this in src or server.',
  routes: 'a page only composes: move what others need to a feature, a component or src/lib.',
  features: 'move what several features need to src/components (looks) or src/lib (the rest), or put the features together in src/routes.',
  components: 'components know no feature: pass it in as a prop, or move the component into the feature.',
  lib: 'src/lib draws nothing: move this to src/components, or pass what it needs as an argument.',
  paths: 'src/paths.ts stands below everything in src.',
  app: 'nothing may use what puts the program together: pass what is needed down as an argument.',
  client: 'the client never sees the server: what both need belongs in shared.',
  server: 'the server never sees the client: what both need belongs in shared.',
  services: 'a service knows no HTTP: do this in server/routes and hand the service plain values.',
  ledger: 'the ledger is written on its own terms: services call it, never the other way round.',
  models: 'models hold columns only: put this in server/services or server/ledger.',
  'server routes': 'a route authenticates, parses, calls a service and presents: reading and writing belongs in server/services.',
}

function slash(file) {
  return file.split(path.sep).join('/')
}

/** `{ side, layer, feature? }` of a path below the project's root, or undefined for what no arrow concerns. */
export function placeOf(file) {
  const parts = slash(file).replace(/\.(test\.)?[cm]?[jt]sx?$/, '').split('/')
  const [side, folder, name] = parts
  if (side === 'shared') return { side, layer: 'shared' }
  if (side === 'src') {
    if (parts.length === 2) return { side, layer: folder === 'paths' ? 'paths' : 'app' }
    if (!clientLayers.includes(folder)) return { side, layer: 'app' }
    return { side, layer: folder, feature: folder === 'features' ? name : undefined }
  }
  if (side === 'server') {
    if (parts.length === 2 && folder in serverUses) return { side, layer: folder }
    if (parts.length === 2) return { side, layer: serverFoundation.has(folder) ? 'foundation' : 'app' }
    if (folder === 'database' && name === 'seeders') return { side, layer: 'seeders' }
    return { side, layer: folder in serverUses ? folder : 'app' }
  }
  return undefined
}

function targetOf(specifier, file) {
  const alias = /^#(shared|server)\/(.*)$/.exec(specifier)
  if (alias !== null) return `${alias[1]}/${alias[2]}`
  if (specifier.startsWith('.')) return slash(path.normalize(path.join(path.dirname(file), specifier)))
  return undefined
}

function complaintAboutPackage(from, specifier, isTest) {
  if (from.side !== 'shared' || isTest) return undefined
  return specifier === 'zod' || specifier.startsWith('@noble/') ? undefined : advice.shared
}

function complaintAboutServer(from, to) {
  if (to.layer === from.layer || to.layer === 'foundation') return undefined
  if (from.layer === 'foundation') return advice.app
  if (serverUses[from.layer].includes(to.layer)) return undefined
  if (from.layer === 'routes') return advice['server routes']
  return advice[from.layer] ?? (to.layer === 'app' ? advice.app : `server/${from.layer} uses only ${serverUses[from.layer].map((layer) => `server/${layer}`).join(', ') || 'itself'}.`)
}

function complaintAboutClient(from, to) {
  if (from.layer === 'features' && to.layer === 'features' && from.feature !== to.feature) return advice.features
  if (clientLayers.indexOf(to.layer) >= clientLayers.indexOf(from.layer)) return undefined
  return to.layer === 'app' ? advice.app : advice[from.layer]
}

/** Why `file` may not import `specifier`, or undefined when it may. Both relative to the project's root. */
export function complaintAbout(file, specifier) {
  const from = placeOf(file)
  if (from === undefined) return undefined
  const isTest = /\.test\.tsx?$/.test(file)
  const target = targetOf(specifier, slash(file))
  if (target === undefined) return complaintAboutPackage(from, specifier, isTest)
  // Tests beside their source may use builders and fixtures; programs may not use tests.
  if (target.startsWith('tests/') || target.startsWith('fixtures/')) return isTest ? undefined : 'tests and fixtures are for tests only.'
  const to = placeOf(target)
  if (to === undefined) return undefined
  if (from.side === 'shared') return to.side === 'shared' ? undefined : advice.shared
  if (to.side === 'shared') return undefined
  if (from.side !== to.side) return from.side === 'src' ? advice.client : advice.server
  return from.side === 'src' ? complaintAboutClient(from, to) : complaintAboutServer(from, to)
}

const rule = {
  meta: {
    type: 'problem',
    docs: { description: 'Imports follow the arrows between the folders.' },
    messages: { against: '{{ from }} may not import {{ specifier }}: {{ advice }}' },
    schema: [],
  },
  create(context) {
    const file = slash(path.relative(context.cwd, context.filename))
    const check = (source) => {
      if (source === null || source === undefined || source.type !== 'Literal' || typeof source.value !== 'string') return
      const complaint = complaintAbout(file, source.value)
      if (complaint === undefined) return
      const from = file.split('/').slice(0, -1).join('/')
      context.report({ node: source, messageId: 'against', data: { from, specifier: source.value, advice: complaint } })
    }
    return {
      ImportDeclaration: (node) => check(node.source),
      ImportExpression: (node) => check(node.source),
      ExportNamedDeclaration: (node) => check(node.source),
      ExportAllDeclaration: (node) => check(node.source),
    }
  },
}

export const arrows = { meta: { name: 'quarterload' }, rules: { arrows: rule } }

import { readdirSync, readFileSync } from 'node:fs'
import path from 'node:path'
import { gzipSync } from 'node:zlib'
import { projectRoot } from '#server/config'
import type { Line } from './measure'

const dist = path.join(projectRoot, 'dist')

/** What a chunk imports whether it is used or not, by the names of files; not what it may load later. */
function importsOf(chunk: string): string[] {
  const text = readFileSync(path.join(dist, 'assets', chunk), 'utf8')
  return [...text.matchAll(/(?:from|import)\s*["']\.\/([\w.-]+\.js)["']/g)].map((found) => found[1] ?? '')
}

function withImports(names: readonly string[]): Set<string> {
  const all = new Set<string>()
  const left = [...names]
  for (let name = left.pop(); name !== undefined; name = left.pop()) {
    if (all.has(name)) continue
    all.add(name)
    left.push(...importsOf(name))
  }
  return all
}

/** The page's own scripts and the chunk of the first screen, with all that they import. */
export function clientLines(): Line[] {
  const page = readFileSync(path.join(dist, 'index.html'), 'utf8')
  const own = [...page.matchAll(/(?:src|href)="\/assets\/([\w.-]+\.js)"/g)].map((found) => found[1] ?? '')
  // Files of former builds lie beside this one's; the service worker's list holds this one's only.
  const ofThisBuild = readFileSync(path.join(dist, 'sw.js'), 'utf8')
  const screen = readdirSync(path.join(dist, 'assets')).filter((name) => /^sign-in-[\w-]+\.js$/.test(name) && ofThisBuild.includes(name))
  if (own.length === 0 || screen.length !== 1) throw new Error('The built client has a page with scripts, and one chunk for signing in.')
  const chunks = withImports([...own, ...screen])
  const bytes = [...chunks].reduce((sum, name) => sum + gzipSync(readFileSync(path.join(dist, 'assets', name))).length, 0)
  return [
    {
      what: 'JavaScript of the first screen',
      result: `${chunks.size} files, gzip`,
      floor: '',
      value: bytes / 1000,
      budget: 170,
      unit: 'kB',
    },
  ]
}

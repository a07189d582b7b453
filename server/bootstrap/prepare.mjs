// Runs before `npm start`, `npm run dev` and `npm test`, in plain Node with no dependencies: on a fresh clone there are none yet.
import { spawnSync } from 'node:child_process'
import { createHash } from 'node:crypto'
import { accessSync, constants, existsSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { fileURLToPath } from 'node:url'

const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '../..')
const mode = process.argv[2] ?? 'start'
const force = process.argv.includes('--force')
const modes = ['start', 'dev', 'test', 'build']

function say(sentence) {
  process.stdout.write(`${sentence}\n`)
}

function stop(sentence) {
  process.stderr.write(`${sentence}\n`)
  process.exit(1)
}

function run(command, args, environment = {}) {
  const result = spawnSync(command, args, { cwd: root, stdio: 'inherit', env: { ...process.env, ...environment } })
  return result.status === 0
}

function readJson(file) {
  try {
    return JSON.parse(readFileSync(path.join(root, file), 'utf8'))
  } catch {
    return undefined
  }
}

/** npm writes node_modules/.package-lock.json last, so an interrupted install never looks complete. */
function packagesMatchLockFile() {
  const wanted = readJson('package-lock.json')?.packages
  const present = readJson('node_modules/.package-lock.json')?.packages
  if (wanted === undefined || present === undefined) return false
  return Object.entries(wanted).every(([place, entry]) => {
    if (place === '') return true
    const found = present[place]
    if (found === undefined) return entry.optional === true || entry.devOptional === true || entry.peer === true
    return found.version === entry.version
  })
}

function installPackages() {
  if (packagesMatchLockFile()) return
  say('Installing npm packages …')
  // --include=dev: the client is built here, also where NODE_ENV says production.
  if (!run('npm', ['ci', '--include=dev', '--no-audit', '--no-fund'])) stop('npm ci failed; see above.')
}

function findProgram(name) {
  const folders = [...(process.env.PATH ?? '').split(path.delimiter), '/usr/sbin', '/usr/local/sbin', '/sbin']
  return folders.some((folder) => {
    try {
      accessSync(path.join(folder, name), constants.X_OK)
      return true
    } catch {
      return false
    }
  })
}

function hasFonts() {
  return existsSync('/usr/share/fonts/truetype') && readdirSync('/usr/share/fonts/truetype').length > 0
}

function missingDebianPackages() {
  const missing = []
  const needsDatabase = mode === 'test' || !process.env.DATABASE_URL
  if (needsDatabase && !findProgram('mariadbd')) missing.push('mariadb-server-core')
  if (needsDatabase && !findProgram('mariadb-install-db')) missing.push('mariadb-server-core', 'mariadb-client-core')
  if (mode === 'test') {
    if (!findProgram('chromium')) missing.push('chromium')
    if (!hasFonts()) missing.push('fonts-liberation')
    if (!findProgram('soffice')) missing.push('libreoffice-calc-nogui')
    if (!findProgram('pdftotext')) missing.push('poppler-utils')
  }
  return [...new Set(missing)]
}

function installDebianPackages() {
  const missing = missingDebianPackages()
  if (missing.length === 0) return
  const options = ['-o', 'DPkg::Lock::Timeout=120']
  const install = ['install', '-y', '--no-install-recommends', ...missing]
  const isRoot = process.getuid?.() === 0
  const hasSudo = !isRoot && findProgram('sudo') && spawnSync('sudo', ['-n', 'true'], { stdio: 'ignore' }).status === 0
  const byHand = `sudo sh -c 'apt-get update && apt-get ${install.join(' ')}'`
  if (!findProgram('apt-get') || (!isRoot && !hasSudo)) {
    stop(`Quarterload needs ${missing.join(', ')}, and can't install that without root. Run this once, then start again:\n\n  ${byHand}\n`)
  }
  say(`Installing ${missing.join(', ')} …`)
  const apt = (args) =>
    isRoot
      ? run('apt-get', args, { DEBIAN_FRONTEND: 'noninteractive' })
      : run('sudo', ['-n', 'env', 'DEBIAN_FRONTEND=noninteractive', 'apt-get', ...args])
  // A stale package list may still name versions that exist, so a failed update is no reason to stop.
  apt([...options, 'update'])
  apt([...options, ...install])
  const still = missingDebianPackages()
  if (still.length > 0) stop(`Still missing: ${still.join(', ')}. Run this once, then start again:\n\n  ${byHand}\n`)
}

function filesUnder(place) {
  const full = path.join(root, place)
  if (!existsSync(full)) return []
  return readdirSync(full, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && !entry.name.includes('.test.'))
    .map((entry) => path.relative(root, path.join(entry.parentPath, entry.name)))
}

function sourceHash() {
  const single = [
    'index.html',
    'package-lock.json',
    'package.json',
    'tsconfig.json',
    'vite.config.ts',
    'tailwind.config.ts',
    'server/bootstrap/client-plugins.ts',
  ]
  const files = [...filesUnder('src'), ...filesUnder('shared'), ...single.filter((file) => existsSync(path.join(root, file)))].sort()
  const hash = createHash('sha256')
  for (const file of files)
    hash
      .update(file)
      .update('\0')
      .update(readFileSync(path.join(root, file)))
      .update('\0')
  return hash.digest('hex')
}

function buildClient() {
  const stamp = path.join(root, 'dist/.source-hash')
  const hash = sourceHash()
  if (!force && existsSync(stamp) && readFileSync(stamp, 'utf8') === hash) return
  say('Building the client …')
  // A build that is broken off leaves files of two versions: it must not pass for the one before it.
  rmSync(stamp, { force: true })
  // The address printed at the end is what people should read, so the list of chunks stays out.
  if (!run(process.execPath, ['node_modules/vite/bin/vite.js', 'build', '--logLevel', 'warn'], { NODE_ENV: 'production' })) {
    stop('The client could not be built; see above.')
  }
  writeFileSync(stamp, hash)
}

if (!modes.includes(mode)) stop(`Unknown mode "${mode}": use one of ${modes.join(', ')}.`)
installPackages()
if (mode !== 'build') installDebianPackages()
// In test mode the build is one of the checks, run and counted by tests/run.ts.
if (mode === 'start' || mode === 'build') buildClient()

import { spawnSync } from 'node:child_process'
import { chmodSync, existsSync, mkdirSync, readdirSync } from 'node:fs'
import path from 'node:path'

const provider = '/usr/lib/galera/libgalera_smm.so'
const programs = ['/usr/sbin/mariadbd', '/usr/bin/mariadb-install-db', '/usr/bin/rsync', '/usr/bin/lsof', '/usr/bin/dpkg-deb', provider]
const packages = ['galera-4', 'mariadb-server-core', 'mariadb-client-core', 'rsync', 'lsof']

function run(command: string, args: string[], cwd?: string): void {
  const { status, stderr } = spawnSync(command, args, { encoding: 'utf8', cwd, stdio: ['ignore', 'ignore', 'pipe'] })
  if (status !== 0) throw new Error(`${command} ${args.join(' ')} failed:\n${stderr}`)
}

/** Installs what is missing, as root; else throws a sentence with the one command to run. */
function installPackages(): void {
  if (programs.every((file) => existsSync(file))) return
  const args = ['-y', '--no-install-recommends', '-o', 'DPkg::Lock::Timeout=120', 'install', ...packages]
  if (process.getuid?.() !== 0) throw new Error(`Packages are missing. Run: sudo apt-get ${args.join(' ')}`)
  process.stdout.write(`Installing ${packages.join(', ')} …\n`)
  run('apt-get', args)
}

/**
 * The scripts by which a node hands its data to another are packed with the whole server, whose installation would
 * start a service. They are taken out of the package, and nothing is installed.
 */
function transferScripts(directory: string): string {
  const installed = '/usr/bin/wsrep_sst_rsync'
  if (existsSync(installed)) return path.dirname(installed)
  mkdirSync(directory, { recursive: true })
  chmodSync(directory, 0o755)
  run('apt-get', ['-q', 'download', 'mariadb-server'], directory)
  const archive = readdirSync(directory).find((file) => file.endsWith('.deb'))
  if (archive === undefined) throw new Error('apt-get download mariadb-server left no package.')
  run('dpkg-deb', ['-x', path.join(directory, archive), directory])
  return path.join(directory, 'usr/bin')
}

export interface Installed {
  provider: string
  /** Where the transfer scripts are, for the nodes' PATH. */
  scripts: string
}

export function requirePackages(directory: string): Installed {
  installPackages()
  return { provider, scripts: transferScripts(path.join(directory, 'package')) }
}

import { readdirSync, rmSync, statSync } from 'node:fs'
import path from 'node:path'

const DAY = 24 * 3_600_000

/** How long a page that was loaded before an update still finds its own parts on the server. */
export const FORMER_BUILDS_STAY = 90 * DAY

/**
 * Takes away files of builds that nobody can still have open: what is not of this build and was last written over
 * `FORMER_BUILDS_STAY` ago. A file that a build has in common with an older one is written anew by each, so its date is
 * that of the last build it belonged to. `current` holds names within `folder`; returns the names that were removed.
 */
export function pruneFormerBuilds(folder: string, current: ReadonlySet<string>, now: number): string[] {
  const old = readdirSync(folder, { withFileTypes: true })
    .filter((entry) => entry.isFile() && !current.has(entry.name))
    .map((entry) => entry.name)
    .filter((name) => now - statSync(path.join(folder, name)).mtimeMs > FORMER_BUILDS_STAY)
  for (const name of old) rmSync(path.join(folder, name))
  return old
}

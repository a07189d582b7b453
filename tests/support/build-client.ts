import { execFileSync } from 'node:child_process'
import { projectRoot } from '#server/config'

/** The browser is given what people are given: the built client. Nothing happens when it is up to date. */
export function setup(): void {
  execFileSync(process.execPath, ['server/bootstrap/prepare.mjs', 'build'], { cwd: projectRoot, stdio: 'inherit' })
}

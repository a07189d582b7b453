import path from 'node:path'

/** npm runs commands in the project's folder; a path that somebody typed is meant from where they typed it. */
export function fromWhereItWasAsked(given: string): string {
  return path.resolve(process.env['INIT_CWD'] ?? process.cwd(), given)
}

/** Runs a command, and says in a sentence why it failed. */
export async function tell(main: () => Promise<number>): Promise<void> {
  try {
    process.exitCode = await main()
  } catch (error) {
    process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`)
    process.exitCode = 1
  }
}

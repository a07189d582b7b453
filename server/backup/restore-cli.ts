import { parseArgs } from 'node:util'
import { readConfig } from '../config'
import { fromWhereItWasAsked, tell } from './command'
import { restoreBackup } from './restore'
import type { Restored } from './restore'

const usage = 'Use: npm run restore -- SOURCE [--keys FOLDER] [--replace]\n'

function report({ ledgers, attachments, madeAt, aside }: Restored): string {
  return [
    `Restored as of ${madeAt}: ${ledgers} ledgers, each chain and each seal whole; ${attachments} files of attachments.`,
    ...(aside.length === 0 ? [] : [`What was there before was moved, not deleted: ${aside.join(' and ')}.`]),
    'Everybody signs in again. People who left or joined after the backup are as they were before: look through People.',
    'Start with npm start. Devices then send what they still hold and the backup lacks.',
    '',
  ].join('\n')
}

/** `npm run restore -- SOURCE [--keys FOLDER] [--replace]`: checks a backup whole, then puts it in place. */
async function main(): Promise<number> {
  const { positionals, values } = parseArgs({
    allowPositionals: true,
    options: { keys: { type: 'string' }, replace: { type: 'boolean', default: false } },
  })
  const [source, ...more] = positionals
  if (source === undefined || more.length > 0) {
    process.stderr.write(usage)
    return 1
  }
  const restored = await restoreBackup(readConfig(process.env), {
    source: fromWhereItWasAsked(source),
    keys: values.keys === undefined ? undefined : fromWhereItWasAsked(values.keys),
    replace: values.replace,
    now: new Date(),
  })
  process.stdout.write(report(restored))
  return 0
}

await tell(main)

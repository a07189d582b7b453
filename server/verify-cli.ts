import { readFileSync } from 'node:fs'
import { parseArgs } from 'node:util'
import { verificationKeysSchema } from '#shared/api/verification'
import { fingerprintOf } from '#shared/ledger/check-ledger'
import { fingerprintGroups, kindWords, verdictAdvice, verdictTitle } from '#shared/ledger/verdict-words'
import { verifyLedgerFile, type FileCheck } from '#shared/ledger/verify-ledger-file'

const USAGE = `npm run verify -- FILE [--key FINGERPRINT]… [--keys FILE]

FILE   a downloaded ledger file, or - for standard input
--key  a fingerprint that you have from the shop, or its first 16 digits; give it again for each further key
--keys what the shop's server answers at /api/verification/keys, as a file

Ends with 0 when the file is whole, with 1 when it is anything else.
`

function linesOf(check: FileCheck): string[] {
  const lines = [`${verdictTitle(check)}.`, verdictAdvice(check)]
  if ('file' in check) {
    lines.push('', `${check.file.title}. ${check.file.shop}. Written out ${check.file.exportedAt}.`)
    for (const seal of check.seals) {
      lines.push(
        `Entry ${seal.seq}, ${kindWords(seal.kind)}: ${seal.printedName}, ${seal.sealedAt}: ${seal.meaning} Sealed with key ${seal.kid}.`,
      )
    }
    for (const { seq, kind, receivedAt } of check.afterSeal)
      lines.push(`After the seal: entry ${seq}, ${kindWords(kind)}, received ${receivedAt}.`)
  }
  if ('fingerprints' in check) lines.push('', ...check.fingerprints.map((fingerprint) => `Key ${fingerprintGroups(fingerprint)}`))
  return lines
}

function trusted(given: string[], keysFile: string | undefined): string[] | undefined {
  const served = keysFile === undefined ? [] : verificationKeysSchema.parse(JSON.parse(readFileSync(keysFile, 'utf8'))).keys
  const keys = [...given, ...served.map(({ publicKey }) => fingerprintOf(publicKey))]
  return given.length === 0 && keysFile === undefined ? undefined : keys
}

function main(): number {
  const { values, positionals } = parseArgs({
    options: { key: { type: 'string', multiple: true }, keys: { type: 'string' } },
    allowPositionals: true,
  })
  const [file, ...more] = positionals
  if (file === undefined || more.length > 0) {
    process.stderr.write(USAGE)
    return 1
  }
  const bytes = readFileSync(file === '-' ? 0 : file)
  const check = verifyLedgerFile(bytes, { trustedKeys: trusted(values.key ?? [], values.keys) })
  process.stdout.write(`${linesOf(check).join('\n')}\n`)
  return check.verdict === 'whole' ? 0 : 1
}

try {
  process.exitCode = main()
} catch (error) {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`)
  process.exitCode = 1
}

import { verifyLedgerFile, type FileCheck } from '#shared/ledger/verify-ledger-file'

/** A ledger of thousands of entries stays far below; more is no ledger and would only hold the browser up. */
const LARGEST = 64 * 1024 * 1024

/** A file that somebody chose, read on this device. */
export type ChosenFile = { name: string; bytes: Uint8Array } | { name: string; refused: string }

const OTHER_FILES: readonly [start: string, says: string][] = [
  [
    'PK',
    'This is a spreadsheet or an archive. A spreadsheet prints a record but is not sealed: choose the ledger file of the same record.',
  ],
  ['%PDF', 'This is a PDF. It prints a record but is not sealed: choose the ledger file of the same record.'],
  ['\u0089PNG', 'This is a picture. Choose the ledger file of the record.'],
  ['\u00ff\u00d8\u00ff', 'This is a picture. Choose the ledger file of the record.'],
]

/** What kind of file it is instead, when it is no ledger file. */
export function otherFile(bytes: Uint8Array): string | null {
  const start = String.fromCharCode(...bytes.subarray(0, 4))
  if (bytes.length === 0) return 'This file is empty.'
  return OTHER_FILES.find(([begins]) => start.startsWith(begins))?.[1] ?? null
}

/** Reads the bytes of a file without sending them anywhere. */
export async function readFile(file: File): Promise<ChosenFile> {
  if (file.size > LARGEST)
    return { name: file.name, refused: 'This file is larger than 64 MB, and no ledger is. Choose the ledger file of the record.' }
  try {
    return { name: file.name, bytes: new Uint8Array(await file.arrayBuffer()) }
  } catch {
    return { name: file.name, refused: 'This file could not be read. If it lies on a stick or in a cloud, copy it to this device first.' }
  }
}

/** The verdict, with the keys known from elsewhere; `undefined` for none. */
export function checkFile(bytes: Uint8Array, trustedKeys: readonly string[] | undefined): FileCheck {
  return verifyLedgerFile(bytes, { trustedKeys })
}

import type { FileCheck } from './verify-ledger-file'

/** A kind of entry as people read it: "row read". */
export function kindWords(kind: string): string {
  return kind.replaceAll('-', ' ')
}

/** A fingerprint in groups of four, to be compared by eye or read out. */
export function fingerprintGroups(fingerprint: string): string {
  return fingerprint.match(/.{1,4}/g)?.join(' ') ?? ''
}

/** The verdict on a file in a few words: what is so. */
export function verdictTitle(check: FileCheck): string {
  switch (check.verdict) {
    case 'whole':
      return `Whole: ${check.entries} entries, nothing altered`
    case 'not sealed yet':
      return `Not sealed yet: ${check.entries} entries, whole so far`
    case 'altered':
      return `Altered at entry ${check.at}`
    case 'altered outside':
      return 'Altered outside the entries'
    case 'wrong key':
      return 'Wrong key'
    case 'not a ledger file':
      return 'Not a ledger file'
    case 'newer version':
      return 'From a newer version'
  }
}

/** Why, and what to do about it. */
export function verdictAdvice(check: FileCheck): string {
  switch (check.verdict) {
    case 'whole':
      return check.keysKnown
        ? 'Every entry is as it was sealed, and the keys are among those it was compared with.'
        : 'Every entry is as it was sealed. Whose key sealed it is not known here: compare the fingerprint with one that you have from the shop itself.'
    case 'not sealed yet':
      return 'Nobody has signed this test. Until somebody does, only the server’s own signature stands over it.'
    case 'altered':
    case 'altered outside':
      return `${check.why} Don’t rely on it: ask for the file anew from where it was made.`
    case 'wrong key':
      return `${check.why} Whoever made this file does not hold the key it was compared with, or the shop has another: ask the shop for its fingerprints.`
    case 'not a ledger file':
      return 'Choose the file that “Download ledger file” on a record’s page saves: its name ends in .ledger.json.'
    case 'newer version':
      return 'It is written in a way that this version does not know yet. Update, then check it again.'
  }
}

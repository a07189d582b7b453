/** Name of a file made of words that people chose, without what a file name can't hold. */
export function fileName(words: readonly string[], extension: 'xlsx' | 'pdf' | 'ledger.json'): string {
  const clean = words.map((word) =>
    word
      .normalize('NFC')
      .replace(/[\p{Cc}\p{Cf}\\/:*?"<>|]/gu, ' ')
      .replace(/\s+/g, ' ')
      .replace(/^[.\s]+|[.\s]+$/g, ''),
  )
  return `${clean.filter(Boolean).join(' ')}.${extension}`
}

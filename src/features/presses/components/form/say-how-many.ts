/** How many fields need another look, however deep they lie. */
function count(errors: unknown): number {
  if (typeof errors !== 'object' || errors === null) return 0
  if ('message' in errors && typeof errors.message === 'string') return 1
  return Object.entries(errors).reduce((sum, [name, value]) => (name === 'ref' ? sum : sum + count(value)), 0)
}

/** Beside the button of a long form, where the fields themselves are out of sight; null when none is wrong. */
export function sayHowMany(errors: unknown): string | null {
  const wrong = count(errors)
  if (wrong === 0) return null
  return `${wrong === 1 ? 'One field needs' : `${wrong} fields need`} another look. Nothing you typed is lost.`
}

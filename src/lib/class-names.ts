/** Class names that apply, joined. */
export function classNames(...names: (string | false | undefined | null)[]): string {
  return names.filter(Boolean).join(' ')
}

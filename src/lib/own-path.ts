/** A path of this product out of an address someone else may have written; undefined when it leads elsewhere. */
export function ownPath(asked: string | null): string | undefined {
  if (asked === null || !/^\/(?![/\\])/.test(asked)) return undefined
  return asked
}

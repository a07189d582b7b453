import { useDraft } from '../drafts'

/** While the witness holds the lead's tablet: target, load, ram level and line are covered, over a reload too. */
export function useCover(testId: string): [boolean, (covered: boolean) => void] {
  const [{ covered }, change] = useDraft(`${testId}.cover`, { covered: false })
  return [covered, (next) => change({ covered: next })]
}

/** Sentences one under the other, each after a dash. */
export function Dashes({ sentences }: { sentences: readonly string[] }) {
  return (
    <ul>
      {sentences.map((sentence) => (
        <li
          key={sentence}
          className="relative pl-[18px] before:absolute before:top-[11px] before:left-0 before:h-0.5 before:w-2.5 before:bg-ink"
        >
          {sentence}
        </li>
      ))}
    </ul>
  )
}

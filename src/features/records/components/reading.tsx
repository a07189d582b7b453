import { Fragment } from 'react'
import type { ShownReading } from '#shared/proof-test/record-stages'

/** A reading as it counts; what was typed before stays, struck through, with the letter of its correction. */
export function Reading({ reading }: { reading: ShownReading | null }) {
  if (reading === null) return null
  const letters = reading.struck.map(({ letter }) => letter).join('')
  return (
    <span className="whitespace-nowrap">
      {reading.struck.map(({ text, letter }) => (
        <Fragment key={letter}>
          <del className="text-stop-ink decoration-2">{text}</del>{' '}
        </Fragment>
      ))}
      {reading.text}
      {letters !== '' && (
        <sup className="ml-0.5 font-semibold text-stop-ink">
          <span className="sr-only">correction </span>
          {letters}
        </sup>
      )}
    </span>
  )
}

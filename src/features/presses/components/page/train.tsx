import type { PressDescription, Ram } from '#shared/press/model'
import { typedWords } from '#shared/instruments/words'
import { lowestLimit } from '#shared/press/ratings'
import { formatForce } from '#shared/units'
import { Facts } from '../../../../components/ruled-list'
import { trainWords } from '../words'

function ramFacts(ram: Ram): string {
  const area = ram.bore ? `bore ${typedWords(ram.bore)}` : ram.effectiveArea ? `effective area ${typedWords(ram.effectiveArea)}` : ''
  const more = [
    area,
    `rated ${typedWords(ram.ratedCapacity)} at ${typedWords(ram.ratedPressure)}`,
    `stroke ${typedWords(ram.stroke)}`,
    ram.springReturn && `springs pull ${typedWords(ram.springReturn)}`,
    ram.carriedMass && `${typedWords(ram.carriedMass)} ${ram.carriedComesDown ? 'comes down' : 'is lifted'} with it`,
  ]
  return more.filter(Boolean).join(', ')
}

/** Everything the force passes through, with its rating, and the lowest of them. */
export function Train({ description }: { description: PressDescription }) {
  const lowest = lowestLimit(description)
  const parts = description.train.map((part) => {
    const ratings = [part.ratedPressure, part.ratedForce].flatMap((rating) => (rating ? [typedWords(rating)] : []))
    return [trainWords[part.kind], `${part.name}, rated ${ratings.join(' and ')}`] as const
  })
  return (
    <Facts
      facts={[
        ['Rated load', typedWords(description.ratedLoad)],
        ...(lowest ? [['Lowest rating', `${lowest.name}, ${formatForce(lowest.force, description.ratedLoad.unit)}`] as const] : []),
        ...description.rams.map((ram) => [ram.name, ramFacts(ram)] as const),
        ...parts,
      ]}
    />
  )
}

import { lowestLimit } from '#shared/press/ratings'
import type { Opened, SetUpItem } from '#shared/proof-test/entries'
import { formatForce } from '#shared/units'

export { CAUTIONS } from '#shared/cautions'

/** What each point of the set-up says when it is ticked: the whole sentence, so that nobody ticks a word (DOMAIN 4). */
export function setUpSentence(item: SetUpItem, opened: Opened): string {
  const lowest = lowestLimit(opened.press)
  switch (item) {
    case 'behind-shield':
      return 'Pump, release valve and every reading are reached from behind the shield.'
    case 'stack':
      return 'The stack or dummy is solid and short, stands centred under the ram, and its faces are parallel. Nothing in it can shatter.'
    case 'adaptor':
      return 'The threaded adaptor is bottomed on its shoulder.'
    case 'train-rated':
      return lowest
        ? `Tooling and every part of the train are rated. The lowest is ${lowest.name}: ${formatForce(lowest.force, opened.forceUnit)}.`
        : 'Tooling and every part of the train are rated.'
    case 'relief':
      return 'The relief valve is set, and its setting is written below.'
    case 'stroke':
      return 'Under load the ram stands between 10 and 80 % of its stroke.'
    case 'coupler':
      return 'No coupler between ram and gauge can close and trap load.'
    case 'pump-kind':
      return 'It is pumped by hand or, if air over oil, with metered air.'
    case 'people-out':
      return 'Everybody else is out and the cordon is up. Eyes and face are covered, gloves are on.'
    case 'injection':
      return 'All here know: oil under the skin is an emergency, even when it hardly shows. Straight to hospital, no hand near a leak under pressure.'
    case 'stands':
      return 'The indicators stand on stands of their own, not on the frame.'
    case 'gauge-vented':
      return 'The gauge sits on the ram’s side of every valve and coupler. It was vented and reads zero.'
  }
}

import { HELP_TOPICS, type HelpTopic } from '../../../lib/help-topics'
import type { Topic } from '../topic'
import { clearanceTopic } from './clearance'
import { decisionRuleTopic } from './decision-rule'
import { deflectionTopic } from './deflection'
import { gaugeTopic } from './gauge'
import { holdTopic } from './hold'
import { lineTopic } from './line'
import { loadPathTopic } from './load-path'
import { permanentSetTopic } from './permanent-set'
import { ramForceTopic } from './ram-force'
import { softeningTopic } from './softening'
import { storedEnergyTopic } from './stored-energy'
import { uncertaintyTopic } from './uncertainty'
import { unitsTopic } from './units'

const BY_SLUG: Record<HelpTopic, Topic> = {
  'ram-force': ramForceTopic,
  gauge: gaugeTopic,
  uncertainty: uncertaintyTopic,
  deflection: deflectionTopic,
  line: lineTopic,
  softening: softeningTopic,
  hold: holdTopic,
  'permanent-set': permanentSetTopic,
  'decision-rule': decisionRuleTopic,
  'load-path': loadPathTopic,
  'stored-energy': storedEnergyTopic,
  clearance: clearanceTopic,
  units: unitsTopic,
}

/** Every page of help, in the order of the list. */
export const TOPICS: readonly Topic[] = HELP_TOPICS.map((slug) => BY_SLUG[slug])

import { toolingDetailsSchema, type ToolingDetails } from '#shared/tooling'
import { addTooling, retireTooling } from '../../services/tooling'
import { daysBefore, workAt, type Desk } from './desk'
import type { DemoShops } from './demo-people'

/** Invented pieces with invented ratings, for the demo only. */
const TOOLING = {
  bearingPlate: {
    code: 'T-01',
    name: 'Bearing plate, slotted, 40 mm',
    kind: 'plate',
    ratedLoad: { text: '30', unit: 'short-ton' },
    ratingFrom: 'Stamped on its edge',
    fit: 'Lies on the bed, over either hole',
    height: { text: '40', unit: 'mm' },
    remark: '',
  },
  steppedNose: {
    code: 'T-02',
    name: 'Stepped nose for bushings',
    kind: 'nose',
    ratedLoad: { text: '22', unit: 'short-ton' },
    ratingFrom: 'Drawing WB-114, by its maker',
    fit: 'Bore 38 mm over the rod',
    height: { text: '65', unit: 'mm' },
    remark: 'Its grub screw only holds it up. The shoulder carries.',
  },
  veeBlocks: {
    code: 'T-03',
    name: 'Vee-blocks, a pair, 120 mm',
    kind: 'vee-block',
    ratedLoad: { text: '12', unit: 'metric-ton-force' },
    ratingFrom: 'Paint on both, checked against the paper',
    fit: 'On the bed, 60 mm slot',
    height: { text: '90', unit: 'mm' },
    remark: '',
  },
  oldDie: {
    code: 'T-04',
    name: 'Bending die, 90°',
    kind: 'die',
    ratedLoad: { text: '15', unit: 'short-ton' },
    ratingFrom: 'Stamped, from the former owner',
    fit: 'On the bed, two M12',
    height: null,
    remark: 'Hairline crack in the root of the vee, seen after etching.',
  },
} as const satisfies Record<string, ToolingDetails>

export type ToolingKey = keyof typeof TOOLING
export type DemoTooling = Readonly<Record<ToolingKey, string>>

/** Enters the shop's loose tooling; the die that cracked since is out of use. */
export async function enterTooling(desk: Desk, { main, people }: DemoShops): Promise<DemoTooling> {
  const work = await workAt(desk, main, people.lead, daysBefore(desk, 90, '15:30'))
  const ids = {} as Record<ToolingKey, string>
  for (const [key, details] of Object.entries(TOOLING)) {
    ids[key as ToolingKey] = await addTooling(work, toolingDetailsSchema.parse(details))
  }
  const later = await workAt(desk, main, people.secondLead, daysBefore(desk, 44, '09:20'))
  await retireTooling(later, ids.oldDie, true)
  return ids
}

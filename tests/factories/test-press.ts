import type { FrozenInstrument } from '#shared/instruments/model'
import type { Joint, PressDescription } from '#shared/press/model'
import type { MeasuringPoint, Opened } from '#shared/proof-test/entries'
import { SHIPPED_PROTOCOLS, type ProtocolContent } from '#shared/proof-test/protocol'
import { testId } from './ledger-builder'

const person = (index: number): string => testId(0x9, index)
const member = (index: number): string => testId(0x3, index)

/** Ids that tests name; people, places and numbers are invented. */
export const ids = {
  shop: testId(0x1, 1),
  press: testId(0x2, 43),
  test: testId(0x7, 43),
  protocol: testId(0x8, 1),
  lead: person(1),
  pumpHand: person(2),
  witness: person(3),
  ram: testId(0x4, 1),
  gauge: testId(0x5, 2),
  indicators: [testId(0x5, 4), testId(0x5, 5), testId(0x5, 6)],
  middle: testId(0x6, 1),
  left: testId(0x6, 2),
  right: testId(0x6, 3),
} as const

export const names: Record<string, string> = {
  [ids.lead]: 'Marit Sandoval',
  [ids.pumpHand]: 'Pell Navarre',
  [ids.witness]: 'Tomas Achterberg',
}

const members: PressDescription['members'] = [
  { id: member(1), kind: 'head-beam', name: 'Head beam' },
  { id: member(2), kind: 'upright', name: 'Left upright' },
  { id: member(3), kind: 'upright', name: 'Right upright' },
  { id: member(4), kind: 'bed-beam', name: 'Bed' },
  { id: member(5), kind: 'ram-seat', name: 'Ram seat' },
  { id: member(6), kind: 'pin', name: 'Left pin' },
  { id: member(7), kind: 'pin', name: 'Right pin' },
]

function joint(number: number, name: string, kind: Joint['kind'], detail: string, between: [number, number]): Joint {
  return {
    id: testId(0xb, number),
    number,
    name,
    kind,
    detail,
    between: [member(between[0]), member(between[1])],
    makeUp: 'finished',
    madeBy: kind === 'weld' ? 'Pell Navarre' : '',
    filler: kind === 'weld' ? 'E7018, 3.2 mm' : '',
    madeOn: kind === 'weld' ? '2026-09-10' : null,
    place: null,
  }
}

const joints: Joint[] = [
  joint(1, 'Head beam to left upright', 'weld', 'fillet 8 mm, both sides', [1, 2]),
  joint(2, 'Head beam to right upright', 'weld', 'fillet 8 mm, both sides', [1, 3]),
  joint(3, 'Ram seat to head beam', 'weld', 'fillet 8 mm, all round', [5, 1]),
  joint(4, 'Ram in its seat', 'bearing', 'shoulder down', [5, 1]),
  joint(5, 'Left pin in upright', 'pin', '32 mm, hole 4', [6, 2]),
  joint(6, 'Right pin in upright', 'pin', '32 mm, hole 4', [7, 3]),
  joint(7, 'Bed on left pin', 'bearing', 'full width', [4, 6]),
  joint(8, 'Bed on right pin', 'bearing', 'full width', [4, 7]),
]

const press: PressDescription = {
  name: 'Press 2',
  whatFor: 'straightening press',
  kind: 'h-frame',
  dimensions: {
    height: { text: '1830', unit: 'mm' },
    opening: { text: '620', unit: 'mm' },
    throat: null,
    holePitch: { text: '150', unit: 'mm' },
    holes: 7,
  },
  ratedLoad: { text: '12', unit: 'short-ton' },
  members,
  rams: [
    {
      id: ids.ram,
      name: 'Ram',
      bore: { text: '50', unit: 'mm' },
      boreTolerance: null,
      effectiveArea: null,
      stroke: { text: '150', unit: 'mm' },
      ratedCapacity: { text: '15', unit: 'short-ton' },
      ratedPressure: { text: '10000', unit: 'psi' },
      acting: 'single',
      rodDiameter: null,
      springReturn: null,
      carriedMass: null,
      carriedComesDown: true,
    },
  ],
  train: [
    { id: testId(0xc, 1), kind: 'pump', name: 'Hand pump', ratedForce: null, ratedPressure: { text: '10000', unit: 'psi' } },
    { id: testId(0xc, 2), kind: 'hose', name: 'Hose, 1.8 m', ratedForce: null, ratedPressure: { text: '10000', unit: 'psi' } },
    { id: testId(0xc, 3), kind: 'frame', name: 'Frame', ratedForce: { text: '15', unit: 'short-ton' }, ratedPressure: null },
    { id: testId(0xc, 4), kind: 'tooling', name: 'Dummy, 80 mm round', ratedForce: { text: '20', unit: 'short-ton' }, ratedPressure: null },
  ],
}

function indicator(index: number): FrozenInstrument {
  return {
    id: ids.indicators[index] ?? '',
    details: {
      kind: 'indicator',
      code: `I-0${index + 4}`,
      description: 'Dial indicator',
      style: 'dial',
      range: { text: '10', unit: 'mm' },
      increment: { text: '0.01', unit: 'mm' },
      errorLimit: { text: '0.005', unit: 'mm' },
      revolution: { text: '1', unit: 'mm' },
    },
    calibration: {
      calibratedOn: '2025-11-07',
      dueOn: '2026-11-07',
      certificate: `LM-25-11${index + 4}`,
      comparedWith: 'gauge blocks, grade 1',
      result: 'in tolerance',
      uncertainty: null,
    },
  }
}

const instruments: FrozenInstrument[] = [
  {
    id: ids.gauge,
    details: {
      kind: 'gauge',
      code: 'G-02',
      description: 'Dial, 100 mm',
      style: 'dial',
      fullScale: { text: '15000', unit: 'psi' },
      increment: { text: '50', unit: 'psi' },
      accuracy: { standard: 'asme-b40.100', grade: '2A' },
    },
    calibration: {
      calibratedOn: '2025-12-09',
      dueOn: '2026-12-09',
      certificate: 'LM-25-1209',
      comparedWith: 'dead-weight tester DW-3',
      result: 'in tolerance',
      uncertainty: { value: { text: '40', unit: 'psi' }, k: 2 },
    },
  },
  indicator(0),
  indicator(1),
  indicator(2),
]

function point(id: string, letter: string, label: string, instrumentId: string, memberId: string): MeasuringPoint {
  return { id, letter, label, place: '', instrumentId, risesWithLoad: true, memberId }
}

/** What the first entry of a test freezes: a 12 short ton H-frame with a 50 mm ram, and what reads it. */
export function openedPayload(changes: { protocol?: Partial<ProtocolContent>; opened?: Partial<Opened> } = {}): Opened {
  const [shipped] = SHIPPED_PROTOCOLS
  if (shipped === undefined) throw new Error('No protocol is shipped.')
  const content: ProtocolContent = { ...shipped.content, ...changes.protocol }
  return {
    number: 'PT-0043',
    shop: { id: ids.shop, name: 'Hollin Bridge Fabricating' },
    pressId: ids.press,
    pressHeadSeq: 12,
    press,
    joints,
    stoodStillDays: 0,
    instruments,
    forceInstrumentIds: [ids.gauge],
    points: [
      point(ids.middle, 'M', 'Middle', ids.indicators[0], member(4)),
      point(ids.left, 'L', 'Left pin', ids.indicators[1], member(6)),
      point(ids.right, 'R', 'Right pin', ids.indicators[2], member(7)),
    ],
    net: { label: 'bed middle less mean of pins', plus: ids.middle, minus: [ids.left, ids.right] },
    protocol: { id: ids.protocol, name: shipped.name, version: 3, content },
    legs: content.legs.map((leg) => ({ label: leg.label, ramPosition: leg.ramPosition, bedHole: '4' })),
    people: {
      lead: { id: ids.lead, name: 'Marit Sandoval', relation: 'shop lead' },
      pumpHand: { id: ids.pumpHand, name: 'Pell Navarre', relation: 'Hollin Bridge Fabricating' },
      witness: { id: ids.witness, name: 'Tomas Achterberg', relation: 'works next door, no part in the build' },
    },
    forceUnit: 'short-ton',
    pressureUnit: 'psi',
    lengthUnit: 'mm',
    notMeasured: ['Head beam', 'Left upright', 'Right upright'],
    repeats: { id: testId(0x7, 41), number: 'PT-0041' },
    walkDownHours: 12,
    instrumentOverride: null,
    ...changes.opened,
  }
}

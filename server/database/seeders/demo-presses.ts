import { v7 as newId } from 'uuid'
import type { FrameKind, Joint, MakeUp, PressDescription, Ram, TrainPart } from '#shared/press/model'
import { startingFrame } from '#shared/press/starting-joints'
import type { TypedForce, TypedPressure } from '#shared/units'
import { dayOf, daysBefore, type Desk } from './desk'
import type { DemoShops } from './demo-people'
import { BADGER, OX, type Strengths } from './demo-strengths'
import { PressBook } from './press-book'

const shortTons = (text: string): TypedForce => ({ text, unit: 'short-ton' })
const metricTonsForce = (text: string): TypedForce => ({ text, unit: 'metric-ton-force' })
const psi = (text: string): TypedPressure => ({ text, unit: 'psi' })
const bar = (text: string): TypedPressure => ({ text, unit: 'bar' })
const mm = (text: string) => ({ text, unit: 'mm' as const })

interface Marked {
  bore: string
  stroke: string
  capacity: TypedForce
  pressure: TypedPressure
}

const ram = ({ bore, stroke, capacity, pressure }: Marked): Ram => ({
  id: newId(),
  name: 'Ram',
  bore: mm(bore),
  boreTolerance: mm('0.05'),
  effectiveArea: null,
  stroke: mm(stroke),
  ratedCapacity: capacity,
  ratedPressure: pressure,
  acting: 'single',
  rodDiameter: null,
  springReturn: null,
  carriedMass: null,
  carriedComesDown: true,
})

const byPressure = (kind: TrainPart['kind'], name: string, ratedPressure: TypedPressure): TrainPart => ({
  id: newId(),
  kind,
  name,
  ratedForce: null,
  ratedPressure,
})
const byForce = (kind: TrainPart['kind'], name: string, ratedForce: TypedForce): TrainPart => ({
  id: newId(),
  kind,
  name,
  ratedForce,
  ratedPressure: null,
})

const train = (pressure: TypedPressure, frame: TypedForce, stack: TypedForce): TrainPart[] => [
  byPressure('pump', 'Hand pump, two speeds', pressure),
  byPressure('hose', 'Hose, 2 m', pressure),
  byPressure('coupler', 'Screw coupler', pressure),
  byPressure('relief', 'Relief valve at the pump', pressure),
  byForce('frame', 'Frame, as estimated by the shop', frame),
  byForce('tooling', 'Flat nose, 90 mm round', stack),
  byForce('stack', 'Solid stack, two blocks', stack),
]

const DETAILS: Record<Joint['kind'], string> = {
  weld: 'fillet 8 mm, both sides',
  pin: '38 mm bright bar, collared',
  bolt: 'M20, property class 8.8',
  thread: 'bottomed on its shoulder',
  bearing: 'full width',
}

interface Built {
  kind: FrameKind
  name: string
  whatFor: string
  height: string
  opening: string
  throat?: string
  holes?: { pitch: string; count: number }
  ratedLoad: TypedForce
  marked: Marked
  frameRating: TypedForce
  stackRating: TypedForce
  /** How far every joint is made when the press is entered. */
  makeUp: MakeUp
  madeOn: string | null
  /** What it is made of, where somebody measured it for the load path check. */
  strengths?: Strengths
}

/** A press from the list that its kind of frame starts with, with its joints as far made as it was when entered. */
function built(press: Built): { description: PressDescription; joints: Joint[]; lastWorkedOn: string | null } {
  const frame = startingFrame(press.kind, () => newId())
  const { makeUp, madeOn, strengths } = press
  const made = makeUp === 'open' ? null : madeOn
  const joints = frame.joints.map((joint): Joint => ({
    ...joint,
    makeUp,
    detail: DETAILS[joint.kind],
    madeBy: joint.kind === 'weld' && made !== null ? 'Noor Hassett' : '',
    filler: joint.kind === 'weld' ? 'E7018, 3.2 mm' : '',
    madeOn: made,
    strength: strengths?.joint(joint) ?? null,
  }))
  return {
    description: {
      name: press.name,
      whatFor: press.whatFor,
      kind: press.kind,
      dimensions: {
        height: mm(press.height),
        opening: mm(press.opening),
        throat: press.throat === undefined ? null : mm(press.throat),
        holePitch: press.holes ? mm(press.holes.pitch) : null,
        holes: press.holes?.count ?? 0,
      },
      ratedLoad: press.ratedLoad,
      members: frame.members.map((member) => ({ ...member, strength: strengths?.member(member) ?? null })),
      rams: [ram(press.marked)],
      train: train(press.marked.pressure, press.frameRating, press.stackRating),
    },
    joints,
    lastWorkedOn: made,
  }
}

type Registering = (desk: Desk, shops: DemoShops) => Promise<PressBook>

function finishedPress(daysAgo: number, by: 'lead' | 'secondLead', press: Omit<Built, 'makeUp' | 'madeOn'>): Registering {
  return (desk, { main, people }) => {
    const madeOn = dayOf(daysBefore(desk, daysAgo + 4, '12:00'))
    return PressBook.register(desk, main, people[by], daysBefore(desk, daysAgo, '14:25'), built({ ...press, makeUp: 'finished', madeOn }))
  }
}

export const registerFerry = finishedPress(252, 'lead', {
  kind: 'h-frame',
  name: 'Ferry',
  whatFor: 'baling press',
  height: '1950',
  opening: '780',
  holes: { pitch: '140', count: 6 },
  ratedLoad: metricTonsForce('15'),
  marked: { bore: '60', stroke: '200', capacity: metricTonsForce('20'), pressure: bar('700') },
  frameRating: metricTonsForce('18'),
  stackRating: metricTonsForce('25'),
})

export const registerBadger = finishedPress(176, 'secondLead', {
  kind: 'four-post',
  name: 'Badger',
  whatFor: 'forming press',
  height: '2240',
  opening: '540',
  ratedLoad: shortTons('40'),
  marked: { bore: '100', stroke: '160', capacity: shortTons('60'), pressure: psi('10000') },
  strengths: BADGER,
  frameRating: shortTons('48'),
  stackRating: shortTons('60'),
})

export const registerWren = finishedPress(132, 'lead', {
  kind: 'bench',
  name: 'Wren',
  whatFor: 'bushing press',
  height: '820',
  opening: '260',
  ratedLoad: shortTons('5'),
  marked: { bore: '32', stroke: '100', capacity: shortTons('6'), pressure: psi('9500') },
  frameRating: shortTons('6'),
  stackRating: shortTons('10'),
})

export const registerHeron = finishedPress(47, 'secondLead', {
  kind: 'c-frame',
  name: 'Heron',
  whatFor: 'dimpling press',
  height: '1680',
  opening: '310',
  throat: '280',
  ratedLoad: shortTons('10'),
  marked: { bore: '50', stroke: '125', capacity: shortTons('15'), pressure: psi('10000') },
  frameRating: shortTons('12'),
  stackRating: shortTons('20'),
})

export const registerOx = finishedPress(16, 'lead', {
  kind: 'h-frame',
  name: 'Ox',
  whatFor: 'bearing and bushing press',
  height: '1870',
  opening: '640',
  holes: { pitch: '150', count: 7 },
  ratedLoad: shortTons('20'),
  marked: { bore: '65', stroke: '180', capacity: shortTons('25'), pressure: psi('10000') },
  strengths: OX,
  frameRating: shortTons('22'),
  stackRating: shortTons('40'),
})

export const registerLongMeg = finishedPress(9, 'lead', {
  kind: 'h-frame',
  name: 'Long Meg',
  whatFor: 'sliding-ram press',
  height: '2100',
  opening: '700',
  holes: { pitch: '150', count: 8 },
  ratedLoad: shortTons('25'),
  marked: { bore: '75', stroke: '200', capacity: shortTons('30'), pressure: psi('9000') },
  frameRating: shortTons('30'),
  stackRating: shortTons('40'),
})

/**
 * A press in the making: the head, the seat and the feet are welded, one bed stiffener is only tacked, and what
 * was examined early fell back when its neighbour was welded.
 */
export async function buildMule(desk: Desk, { main, people }: DemoShops): Promise<PressBook> {
  const press = built({
    kind: 'h-frame',
    name: 'Mule',
    whatFor: 'gear and pulley press',
    height: '2050',
    opening: '680',
    holes: { pitch: '160', count: 7 },
    ratedLoad: shortTons('30'),
    marked: { bore: '75', stroke: '160', capacity: shortTons('34'), pressure: psi('10000') },
    frameRating: shortTons('32'),
    stackRating: shortTons('40'),
    makeUp: 'open',
    madeOn: null,
  })
  const by = people.secondLead
  const book = await PressBook.register(desk, main, by, daysBefore(desk, 38, '13:50'), press)
  const work = async (name: string, daysAgo: number, clock: string, makeUp: MakeUp = 'finished', how = 'E7018, 3.2 mm, three passes') => {
    const at = daysBefore(desk, daysAgo, clock)
    const payload = { jointId: book.joint(name).id, makeUp, how, workedAt: new Date(at - 20 * 60_000).toISOString(), test: null }
    await book.write({ kind: 'joint-worked', payload }, by, at)
  }
  await work('Head beam to left upright', 24, '15:10')
  await work('Head beam to right upright', 24, '17:35')
  for (const [name, clock] of [
    ['Head beam to left upright', '13:20'],
    ['Head beam to right upright', '13:45'],
  ] as const) {
    const payload = {
      jointId: book.joint(name).id,
      method: 'dye penetrant' as const,
      result: 'accepted' as const,
      remark: 'No indication.',
      test: null,
    }
    await book.write({ kind: 'joint-examined', payload }, by, daysBefore(desk, 22, clock))
  }
  await work('Ram seat to head beam', 15, '16:05')
  await work('Left upright to its foot', 11, '14:40')
  await work('Right upright to its foot', 11, '18:15')
  await work('Ram in its seat', 8, '15:25', 'finished', 'Four M20, drawn up evenly')
  await work('Adaptor on ram rod', 8, '15:50', 'finished', 'Bottomed on its shoulder')
  await work('Left bed pin', 5, '14:30', 'finished', '38 mm bright bar, collared')
  await work('Right bed pin', 5, '14:55', 'finished', '38 mm bright bar, collared')
  await work('Right bed stiffener', 2, '17:20')
  await work('Left bed stiffener', 2, '18:05', 'tacked', 'Four tacks of 20 mm; the rod ran out')
  return book
}

/** The second shop is young: one press, half its joints open. */
export async function buildSecondShopsPress(desk: Desk, { second, people }: DemoShops): Promise<PressBook> {
  const press = built({
    kind: 'bench',
    name: 'Little Weir',
    whatFor: 'seal press',
    height: '760',
    opening: '240',
    ratedLoad: metricTonsForce('4'),
    marked: { bore: '32', stroke: '80', capacity: metricTonsForce('5.5'), pressure: bar('660') },
    frameRating: metricTonsForce('5'),
    stackRating: metricTonsForce('8'),
    makeUp: 'open',
    madeOn: null,
  })
  const book = await PressBook.register(desk, second, people.owner, daysBefore(desk, 13, '16:45'), press)
  for (const [name, clock] of [
    ['Head beam to left rod', '14:10'],
    ['Head beam to right rod', '14:30'],
  ] as const) {
    const at = daysBefore(desk, 6, clock)
    const payload = {
      jointId: book.joint(name).id,
      makeUp: 'finished' as const,
      how: 'M24, locked',
      workedAt: new Date(at).toISOString(),
      test: null,
    }
    await book.write({ kind: 'joint-worked', payload }, people.owner, at)
  }
  return book
}

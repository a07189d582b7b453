import type { Joint, Member } from '#shared/press/model'
import type { Grade } from '#shared/structure/materials'
import type { BOLT_CLASSES, ELECTRODES, JointStrength, MemberStrength } from '#shared/structure/member-data'
import type {
  SECOND_MOMENT_UNITS,
  SECTION_MODULUS_UNITS,
  FLANGE_SLOPES,
  PLATE_PLACES,
  SectionShape,
} from '#shared/structure/section-shapes'
import type { AreaUnit, LengthUnit, PressureUnit } from '#shared/units'
import type { Asked } from '../draft'

/** What is typed about a member's or joint's strength. Each draft holds the fields of every kind, so that nothing typed is lost. */

export interface MaterialDraft {
  grade: Grade | 'custom' | ''
  name: string
  yield: Asked<PressureUnit>
  source: string
}

export interface PlateDraft {
  place: (typeof PLATE_PLACES)[number]
  width: Asked<LengthUnit>
  thickness: Asked<LengthUnit>
}

export type SectionLength =
  | 'height'
  | 'width'
  | 'side'
  | 'wall'
  | 'cornerRadius'
  | 'flangeWidth'
  | 'web'
  | 'flange'
  | 'thickness'
  | 'diameter'
  | 'rootRadius'
  | 'toeRadius'

export type SectionDraft = Record<SectionLength, Asked<LengthUnit>> & {
  shape: SectionShape | ''
  slope: (typeof FLANGE_SLOPES)[number]
  name: string
  area: Asked<AreaUnit>
  secondMoment: { text: string; unit: (typeof SECOND_MOMENT_UNITS)[number] }
  sectionModulus: { text: string; unit: (typeof SECTION_MODULUS_UNITS)[number] }
  shearArea: Asked<AreaUnit>
  sideBySide: string
  plates: PlateDraft[]
}

export interface MemberStrengthDraft {
  role: MemberStrength['role'] | ''
  section: SectionDraft
  material: MaterialDraft
  support: 'both ends' | 'one end'
  span: Asked<LengthUnit>
  ramOffset: Asked<LengthUnit>
  length: Asked<LengthUnit>
  eccentricity: Asked<LengthUnit>
  hole: { diameter: Asked<LengthUnit>; metal: Asked<LengthUnit> }
  loadShare: string
}

export interface PartDraft {
  material: MaterialDraft
  thickness: Asked<LengthUnit>
}

export interface JointStrengthDraft {
  size: { by: 'leg' | 'throat'; value: Asked<LengthUnit> }
  length: Asked<LengthUnit>
  electrode: { grade: (typeof ELECTRODES)[number] | 'custom' | ''; name: string; tensile: Asked<PressureUnit> }
  base: PartDraft
  diameter: Asked<LengthUnit>
  material: MaterialDraft
  shearPlanes: '1' | '2'
  gap: Asked<LengthUnit>
  outer: PartDraft
  inner: PartDraft
  outerEdge: Asked<LengthUnit>
  innerEdge: Asked<LengthUnit>
  thread: { series: 'metric' | 'inch'; diameter: Asked<LengthUnit>; pitch: Asked<LengthUnit>; threadsPerInch: string }
  strength: { class: (typeof BOLT_CLASSES)[number] | 'custom' | ''; name: string; proof: Asked<PressureUnit> }
  count: string
  loaded: 'along' | 'across'
  carriedBy: 'thread' | 'shank'
  tapped: PartDraft & { engagement: Asked<LengthUnit> }
  shoulder: { area: Asked<AreaUnit>; part: PartDraft }
  area: Asked<AreaUnit>
  part: PartDraft
  loadShare: string
}

interface Units {
  length: LengthUnit
}

const lengthIn = ({ length }: Units): Asked<LengthUnit> => ({ text: '', unit: length })
const areaIn = ({ length }: Units): Asked<AreaUnit> => ({ text: '', unit: length === 'in' ? 'in2' : 'mm2' })
const pressureIn = ({ length }: Units): Asked<PressureUnit> => ({ text: '', unit: length === 'in' ? 'psi' : 'MPa' })

const blankMaterial = (units: Units): MaterialDraft => ({ grade: '', name: '', yield: pressureIn(units), source: '' })
const blankPart = (units: Units): PartDraft => ({ material: blankMaterial(units), thickness: lengthIn(units) })

export const blankPlate = (units: Units): PlateDraft => ({ place: 'on top', width: lengthIn(units), thickness: lengthIn(units) })

function blankSection(units: Units): SectionDraft {
  const inch = units.length === 'in'
  return {
    shape: '',
    height: lengthIn(units),
    width: lengthIn(units),
    side: lengthIn(units),
    wall: lengthIn(units),
    cornerRadius: lengthIn(units),
    flangeWidth: lengthIn(units),
    web: lengthIn(units),
    flange: lengthIn(units),
    thickness: lengthIn(units),
    diameter: lengthIn(units),
    rootRadius: lengthIn(units),
    toeRadius: lengthIn(units),
    slope: 'parallel',
    name: '',
    area: areaIn(units),
    secondMoment: { text: '', unit: inch ? 'in4' : 'cm4' },
    sectionModulus: { text: '', unit: inch ? 'in3' : 'cm3' },
    shearArea: areaIn(units),
    sideBySide: '1',
    plates: [],
  }
}

const ROLES: Partial<Record<Member['kind'], MemberStrength['role']>> = { 'head-beam': 'beam', 'bed-beam': 'beam', upright: 'tie' }

/** Nothing but how the force goes through a member of that kind. */
export function blankMemberStrength(kind: Member['kind'], units: Units): MemberStrengthDraft {
  return {
    role: ROLES[kind] ?? '',
    section: blankSection(units),
    material: blankMaterial(units),
    support: 'both ends',
    span: lengthIn(units),
    ramOffset: lengthIn(units),
    length: lengthIn(units),
    eccentricity: lengthIn(units),
    hole: { diameter: lengthIn(units), metal: lengthIn(units) },
    loadShare: '',
  }
}

export function blankJointStrength(units: Units): JointStrengthDraft {
  return {
    size: { by: 'leg', value: lengthIn(units) },
    length: lengthIn(units),
    electrode: { grade: '', name: '', tensile: pressureIn(units) },
    base: blankPart(units),
    diameter: lengthIn(units),
    material: blankMaterial(units),
    shearPlanes: '2',
    gap: lengthIn(units),
    outer: blankPart(units),
    inner: blankPart(units),
    outerEdge: lengthIn(units),
    innerEdge: lengthIn(units),
    thread: { series: units.length === 'in' ? 'inch' : 'metric', diameter: lengthIn(units), pitch: lengthIn(units), threadsPerInch: '' },
    strength: { class: '', name: '', proof: pressureIn(units) },
    count: '1',
    loaded: 'along',
    carriedBy: 'thread',
    tapped: { ...blankPart(units), engagement: lengthIn(units) },
    shoulder: { area: areaIn(units), part: blankPart(units) },
    area: areaIn(units),
    part: blankPart(units),
    loadShare: '',
  }
}

const isRecord = (value: unknown): value is Record<string, unknown> => typeof value === 'object' && value !== null && !Array.isArray(value)

/** What is written down, laid over a blank draft: what isn't there stays blank, numbers become text again. */
function overlay(blank: unknown, stored: unknown): unknown {
  if (stored === null || stored === undefined) return blank
  if (isRecord(blank) && isRecord(stored)) {
    return Object.fromEntries(Object.entries(blank).map(([key, value]) => [key, overlay(value, stored[key])]))
  }
  return typeof blank === 'string' ? String(stored) : stored
}

export const draftOfMemberStrength = (stored: MemberStrength, kind: Member['kind'], units: Units): MemberStrengthDraft =>
  overlay(blankMemberStrength(kind, units), stored) as MemberStrengthDraft

export const draftOfJointStrength = (stored: JointStrength, units: Units): JointStrengthDraft =>
  overlay(blankJointStrength(units), stored) as JointStrengthDraft

export const KIND_OF_STRENGTH: Record<Joint['kind'], JointStrength['kind']> = {
  weld: 'weld',
  pin: 'pin',
  bolt: 'thread',
  thread: 'thread',
  bearing: 'bearing',
}

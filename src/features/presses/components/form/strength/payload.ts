import type { Joint } from '#shared/press/model'
import type { SectionShape } from '#shared/structure/section-shapes'
import { optionalTyped } from '../../../../../lib/draft-resolver'
import {
  KIND_OF_STRENGTH,
  type JointStrengthDraft,
  type MaterialDraft,
  type MemberStrengthDraft,
  type PartDraft,
  type SectionDraft,
  type SectionLength,
} from './draft'

/** What a shape is measured by, in the order it is asked for. */
export const DIMENSIONS: Record<SectionShape, readonly { key: SectionLength; label: string; hint?: string; optional?: true }[]> = {
  'rectangular tube': [
    { key: 'height', label: 'Height', hint: 'In the direction of the force.' },
    { key: 'width', label: 'Width', hint: 'Across the force.' },
    { key: 'wall', label: 'Wall' },
    { key: 'cornerRadius', label: 'Corner radius, outside', hint: 'Left empty, it is taken as twice the wall.', optional: true },
  ],
  'square tube': [
    { key: 'side', label: 'Side' },
    { key: 'wall', label: 'Wall' },
    { key: 'cornerRadius', label: 'Corner radius, outside', hint: 'Left empty, it is taken as twice the wall.', optional: true },
  ],
  channel: [
    { key: 'height', label: 'Height', hint: 'Of the web, in the direction of the force.' },
    { key: 'flangeWidth', label: 'Width of a flange' },
    { key: 'web', label: 'Thickness of the web' },
    { key: 'flange', label: 'Thickness of a flange', hint: 'Half-way out from the web.' },
    { key: 'rootRadius', label: 'Radius at the root', optional: true },
    { key: 'toeRadius', label: 'Radius at the toe', optional: true },
  ],
  angle: [
    { key: 'height', label: 'Leg in the direction of the force' },
    { key: 'width', label: 'Leg across it' },
    { key: 'thickness', label: 'Thickness' },
    { key: 'rootRadius', label: 'Radius at the root', optional: true },
    { key: 'toeRadius', label: 'Radius at the toe', optional: true },
  ],
  flat: [
    { key: 'height', label: 'Height', hint: 'In the direction of the force.' },
    { key: 'width', label: 'Width', hint: 'Across the force.' },
  ],
  'round bar': [{ key: 'diameter', label: 'Diameter' }],
  'round tube': [
    { key: 'diameter', label: 'Outside diameter' },
    { key: 'wall', label: 'Wall' },
  ],
  custom: [{ key: 'thickness', label: 'Thickest piece', hint: 'The yield of a grade depends on it.' }],
}

const countOf = (text: string): number | undefined => (/^\s*\d{1,3}\s*$/.test(text) ? Number(text) : undefined)
const textOrNull = (text: string): string | null => text.trim() || null

/** The section that a draft stands for, unchecked. */
export function sectionOf(section: SectionDraft) {
  const { shape } = section
  if (shape === '') return { shape }
  const lengths = DIMENSIONS[shape].map(({ key, optional }) => [key, optional ? optionalTyped(section[key]) : section[key]] as const)
  const sideBySide = countOf(section.sideBySide)
  const measured = { shape, ...Object.fromEntries(lengths), sideBySide }
  if (shape !== 'custom') return { ...measured, ...(shape === 'channel' ? { slope: section.slope } : {}), plates: section.plates }
  const { name, area, secondMoment, sectionModulus } = section
  return { ...measured, name, area, secondMoment, sectionModulus, shearArea: optionalTyped(section.shearArea) }
}

function materialOf({ grade, name, source, ...rest }: MaterialDraft) {
  return grade === 'custom' ? { grade, name, yield: rest.yield, source } : { grade }
}

const partOf = ({ material, thickness }: PartDraft) => ({ material: materialOf(material), thickness })

/** A part that may be left out: nothing is typed of it. */
const partGiven = ({ material, thickness }: PartDraft): boolean => material.grade !== '' || thickness.text.trim() !== ''
const optionalPart = (part: PartDraft) => (partGiven(part) ? partOf(part) : null)

/** The strength of a member that a draft stands for, unchecked; null when there is none. */
export function memberStrengthOf(draft: MemberStrengthDraft | null | undefined) {
  if (!draft) return null
  const { role, hole } = draft
  const both = {
    role,
    section: sectionOf(draft.section),
    material: materialOf(draft.material),
    hole: hole.diameter.text.trim() === '' && hole.metal.text.trim() === '' ? null : hole,
    loadShare: textOrNull(draft.loadShare),
  }
  if (role === 'tie') return { ...both, length: draft.length, eccentricity: optionalTyped(draft.eccentricity) }
  return { ...both, support: draft.support, span: draft.span, ramOffset: optionalTyped(draft.ramOffset) }
}

function electrodeOf({ grade, name, tensile }: JointStrengthDraft['electrode']) {
  return grade === 'custom' ? { grade, name, tensile } : { grade }
}

function threadOf({ series, diameter, pitch, threadsPerInch }: JointStrengthDraft['thread']) {
  return series === 'metric' ? { series, diameter, pitch } : { series, diameter, threadsPerInch }
}

function threadStrength(draft: JointStrengthDraft) {
  const { tapped, shoulder } = draft
  const { class: boltClass, name, proof } = draft.strength
  const byThread = draft.carriedBy === 'thread'
  return {
    thread: threadOf(draft.thread),
    strength: boltClass === 'custom' ? { class: boltClass, name, proof } : { class: boltClass },
    count: countOf(draft.count),
    loaded: draft.loaded,
    shearPlanes: Number(draft.shearPlanes),
    carriedBy: draft.carriedBy,
    tapped:
      byThread && (partGiven(tapped) || tapped.engagement.text.trim() !== '') ? { ...partOf(tapped), engagement: tapped.engagement } : null,
    shoulder:
      !byThread && (partGiven(shoulder.part) || shoulder.area.text.trim() !== '')
        ? { area: shoulder.area, part: partOf(shoulder.part) }
        : null,
  }
}

/** The strength of a joint that a draft stands for, as the joint is made now, unchecked; null when there is none. */
export function jointStrengthOf(draft: JointStrengthDraft | null | undefined, joint: Joint['kind']) {
  if (!draft) return null
  const kind = KIND_OF_STRENGTH[joint]
  const loadShare = textOrNull(draft.loadShare)
  switch (kind) {
    case 'weld':
      return {
        kind,
        size: draft.size,
        length: draft.length,
        electrode: electrodeOf(draft.electrode),
        base: optionalPart(draft.base),
        loadShare,
      }
    case 'pin':
      return {
        kind,
        diameter: draft.diameter,
        material: materialOf(draft.material),
        shearPlanes: Number(draft.shearPlanes),
        gap: draft.gap,
        outer: partOf(draft.outer),
        inner: partOf(draft.inner),
        outerEdge: optionalTyped(draft.outerEdge),
        innerEdge: optionalTyped(draft.innerEdge),
        loadShare,
      }
    case 'thread':
      return { kind, ...threadStrength(draft), loadShare }
    case 'bearing':
      return { kind, area: draft.area, part: partOf(draft.part), loadShare }
  }
}

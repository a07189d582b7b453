import type { Joint, Member } from '#shared/press/model'
import type { JointStrength, MemberStrength, Part } from '#shared/structure/member-data'
import type { Material } from '#shared/structure/materials'
import type { MemberSection } from '#shared/structure/section-shapes'

/** What two presses of the demo are made of, for the load path check. Invented, in sizes that shops do buy. */
export interface Strengths {
  member: (member: Member) => MemberStrength | null
  joint: (joint: Joint) => JointStrength | null
}

const mm = (text: string) => ({ text, unit: 'mm' as const })
const mm2 = (text: string) => ({ text, unit: 'mm2' as const })
const S355: Material = { grade: 'S355JR' }
const C45: Material = { grade: 'C45' }
const part = (material: Material, thickness: string): Part => ({ material, thickness: mm(thickness) })

const beam = (section: MemberSection, material: Material, span: string): MemberStrength => ({
  role: 'beam',
  section,
  material,
  support: 'both ends',
  span: mm(span),
  ramOffset: null,
  hole: null,
  loadShare: null,
})

const fillet = (leg: string, length: string, base: Part): JointStrength => ({
  kind: 'weld',
  size: { by: 'leg', value: mm(leg) },
  length: mm(length),
  electrode: { grade: 'E70' },
  base,
  loadShare: null,
})

/** Four M20 that hold the ram up in its seat; the force itself presses the ram into the seat. */
const seatBolts: JointStrength = {
  kind: 'thread',
  thread: { series: 'metric', diameter: mm('20'), pitch: mm('2.5') },
  strength: { class: '8.8' },
  count: 4,
  loaded: 'along',
  shearPlanes: 1,
  carriedBy: 'thread',
  tapped: null,
  shoulder: null,
  loadShare: '0',
}

/** An adaptor that bottoms on its shoulder. */
const bottomed = (diameter: string, pitch: string, area: string): JointStrength => ({
  kind: 'thread',
  thread: { series: 'metric', diameter: mm(diameter), pitch: mm(pitch) },
  strength: { class: '8.8' },
  count: 1,
  loaded: 'along',
  shearPlanes: 1,
  carriedBy: 'shank',
  tapped: null,
  shoulder: { area: mm2(area), part: part({ grade: '4140 annealed' }, '40') },
  loadShare: '100',
})

/** Two channels, 180 × 70 × 8 with flanges of 11 mm, back to back. */
const channels: MemberSection = {
  shape: 'channel',
  height: mm('180'),
  flangeWidth: mm('70'),
  web: mm('8'),
  flange: mm('11'),
  slope: '8 percent',
  rootRadius: mm('11'),
  toeRadius: mm('5.5'),
  sideBySide: 2,
  plates: [],
}

/** An H-frame: head and bed of two channels each, uprights of rectangular tube, the bed on two 38 mm pins. */
export const OX: Strengths = {
  member: ({ kind }) => {
    if (kind === 'head-beam' || kind === 'bed-beam') return beam(channels, S355, '1000')
    if (kind !== 'upright') return null
    return {
      role: 'tie',
      section: {
        shape: 'rectangular tube',
        height: mm('100'),
        width: mm('60'),
        wall: mm('6'),
        cornerRadius: null,
        sideBySide: 1,
        plates: [],
      },
      material: S355,
      length: mm('1150'),
      eccentricity: null,
      hole: { diameter: mm('39'), metal: mm('12') },
      loadShare: null,
    }
  },
  joint: ({ name, kind }) => {
    if (name.startsWith('Head beam to')) return fillet('8', '600', part(S355, '8'))
    if (name === 'Ram seat to head beam') return fillet('8', '520', part(S355, '11'))
    if (name === 'Ram in its seat') return seatBolts
    if (name === 'Adaptor on ram rod') return bottomed('30', '2', '1200')
    if (kind !== 'pin') return null
    return {
      kind: 'pin',
      diameter: mm('38'),
      material: C45,
      shearPlanes: 2,
      gap: mm('2'),
      outer: part(S355, '16'),
      inner: part(S355, '12'),
      outerEdge: mm('60'),
      innerEdge: mm('75'),
      loadShare: null,
    }
  },
}

const plate = (height: string): MemberSection => ({ shape: 'flat', height: mm(height), width: mm('600'), sideBySide: 1, plates: [] })

/** Four posts of 70 mm round bar, threaded M64 at their ends, between two thick plates. */
export const BADGER: Strengths = {
  member: ({ kind }) => {
    if (kind === 'head-beam' || kind === 'bed-beam') return beam(plate('70'), S355, '700')
    if (kind !== 'upright') return null
    return {
      role: 'tie',
      section: { shape: 'round bar', diameter: mm('70'), sideBySide: 1, plates: [] },
      material: C45,
      length: mm('1400'),
      eccentricity: null,
      hole: null,
      loadShare: null,
    }
  },
  joint: ({ name, kind }) => {
    if (name === 'Ram in its seat') return seatBolts
    if (name === 'Adaptor on ram rod') return bottomed('42', '3', '2800')
    if (name === 'Ram seat to head plate') return fillet('10', '900', part(S355, '40'))
    if (kind !== 'bolt') return null
    return {
      kind: 'thread',
      thread: { series: 'metric', diameter: mm('64'), pitch: mm('6') },
      strength: { class: 'custom', name: 'post of C45, by its yield', proof: { text: '305', unit: 'MPa' } },
      count: 1,
      loaded: 'along',
      shearPlanes: 1,
      carriedBy: 'thread',
      tapped: null,
      shoulder: null,
      loadShare: null,
    }
  },
}

import { describe, expect, it } from 'vitest'
import { clearedKilonewtons } from '#shared/press/clearance-words'
import { spelled, tagWords, type TagClearance } from './tag-words'

const clearance: TagClearance = {
  load: { text: '11.7', unit: 'short-ton' },
  loadNewton: 104_110,
  gaugePressure: { text: '7650', unit: 'psi' },
  gaugeCode: 'G-02',
  bedHoles: ['4'],
  ramPositions: ['central'],
  tooling: ['T-01 Flat nose'],
  until: '2027-03-15',
  clearedOn: '2026-09-15',
  clearedBy: 'Marit Sandoval',
  number: 'PT-0043',
  staticLoads: 1,
  notMeasured: ['Head beam', 'Ram seat', 'Left upright', 'Right upright', 'Base'],
}
const plain = (text: string) => text.replaceAll(/[\u00a0\u202f]/g, ' ')
const print = (given: Partial<TagClearance> = {}, room: 'short' | 'ample' = 'ample') =>
  plain(
    tagWords({ ...clearance, ...given }, '2026-09-15', room)
      .smallPrint.map(({ lead, rest }) => `${lead} ${rest}`)
      .join('\n'),
  )

describe('the words of a tag', () => {
  it('tells the load in its ton, what that ton is, and in kN', () => {
    const words = tagWords(clearance, null, 'ample')
    expect([words.load, words.unit]).toEqual(['11.7', 'short tons'])
    // 11.7 × 2 000 lbf × 4.4482216152605 N/lbf = 104.088 kN
    expect(plain(words.loadNote)).toBe('of 2 000 lbf each, 104.0 kN in all')
  })

  it('never rounds the load up, and leaves one that was given in kN as it is', () => {
    expect(plain(clearedKilonewtons({ text: '99.98', unit: 'kN' }))).toBe('99.9 kN')
    expect(plain(clearedKilonewtons({ text: '104.1', unit: 'kN' }))).toBe('104.1 kN')
    expect(tagWords({ ...clearance, load: { text: '100', unit: 'kN' } }, null, 'ample').loadNote).toBe('')
  })

  it('lets no ton stand alone', () => {
    for (const unit of ['short-ton', 'long-ton', 'metric-ton-force'] as const) {
      const words = tagWords({ ...clearance, load: { text: '10', unit } }, null, 'ample')
      expect(words.unit).toMatch(/^(short tons|long tons|metric tons\u2011force)$/)
      expect(plain(words.loadNote)).toMatch(/of [12] \d{3} (lbf|kgf) each/)
    }
  })

  it('names where it was proven, with which tooling, and what ends it', () => {
    expect(print()).toContain('Bed hole 4, ram central. No other bed hole was tested.')
    expect(print()).toContain('T-01 Flat nose, or others rated for the load.')
    expect(print({ bedHoles: ['4', '5'], ramPositions: ['far left', 'far right'] })).toContain(
      'Bed holes 4 and 5, ram far left and far right.',
    )
    expect(print()).toContain('Void at once after a repair or modification, an overload or a knock,')
    expect(print()).toContain('after a move or a long stop.')
  })

  it('names every member that was not measured, or how many more where room is short', () => {
    expect(print()).toContain('Not measured: Head beam, Ram seat, Left upright, Right upright and Base.')
    expect(print({}, 'short')).toContain('Not measured: Head beam, Ram seat, Left upright and 2 more: scan the code.')
  })

  it('gives a press that was read by a load cell its load as the limit', () => {
    const words = tagWords({ ...clearance, gaugePressure: null, gaugeCode: 'LC-1' }, null, 'ample')
    expect(plain(`${words.gaugeLabel} ${words.gaugeLimit}`)).toBe('Load cell LC-1 not past 11.7 short tons')
  })

  it('says since when no change was reported, and that there was one when there was', () => {
    expect(tagWords(clearance, '2026-09-15', 'ample').changes).toBe('No change reported since 15 Sep 2026.')
    expect(tagWords(clearance, null, 'ample').changes).toMatch(/^A change was reported since/)
  })

  it('promises nothing', () => {
    const words = tagWords(clearance, '2026-09-15', 'ample')
    const said = `${words.clearedBy} ${words.changes} ${print()}`
    expect(said).not.toMatch(/\bsafe|\bapproved|\byes\b/i)
    expect(words.clearedBy).toBe('Cleared by Marit Sandoval on 15 Sep 2026 after one static load.')
    expect(words.test).toBe('PT-0043')
  })

  it('spells its code in fours', () => expect(spelled('abcdefghjkmnpqrs')).toBe('abcd-efgh-jkmn-pqrs'))
})

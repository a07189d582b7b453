// @vitest-environment jsdom
import { describe, expect, it, vi } from 'vitest'
import { entryDraftSchema } from '#shared/ledger/envelope'
import { deviceId, giveBackDeviceSeq, makeEntry } from './entry'

const ledgerId = '01990000-0000-7000-8000-000000000001'
const other = '01990000-0000-7000-8000-000000000002'
const authorId = '01990000-0000-7000-8000-000000000003'
const make = (ledger = ledgerId) =>
  makeEntry({ ledgerId: ledger, kind: 'observed', payload: { note: 'it creaked' }, authorId, basedOnSeq: 4 })

describe('entries that this device makes', () => {
  it('have the agreed shape', () => {
    expect(entryDraftSchema.safeParse(make()).success).toBe(true)
  })

  it('are counted for each ledger without a gap', () => {
    const first = make()
    const second = make()
    expect(second.deviceSeq).toBe(first.deviceSeq + 1)
    expect(second.deviceId).toBe(first.deviceId)
    expect(second.bootId).toBe(first.bootId)
    expect(second.id).not.toBe(first.id)
    const elsewhere = make(other)
    expect(make(other).deviceSeq).toBe(elsewhere.deviceSeq + 1)
  })

  it('give their number to the next one when they were refused', () => {
    const refused = make()
    giveBackDeviceSeq(refused)
    expect(make().deviceSeq).toBe(refused.deviceSeq)
  })

  it('keep their number when a later one was made meanwhile', () => {
    const first = make()
    const second = make()
    giveBackDeviceSeq(first)
    expect(make().deviceSeq).toBe(second.deviceSeq + 1)
  })

  it('carry the same device and go on counting after a reload', async () => {
    const before = make()
    vi.resetModules()
    const reloaded = await import('./entry')
    expect(reloaded.deviceId()).toBe(deviceId())
    expect(reloaded.bootId).not.toBe(before.bootId)
    expect(reloaded.takeDeviceSeq(ledgerId)).toBe(before.deviceSeq + 1)
  })
})

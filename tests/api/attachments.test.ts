import { randomBytes } from 'node:crypto'
import { rmSync, writeFileSync } from 'node:fs'
import { QueryTypes } from 'sequelize'
import sharp from 'sharp'
import type { Response } from 'supertest'
import { describe, expect, it } from 'vitest'
import { heldAttachmentsSchema } from '#shared/api/attachments'
import { instrumentResponseSchema } from '#shared/api/instruments'
import { problemSchema } from '#shared/api/problem'
import { LARGEST_ATTACHMENT, type Attachment } from '#shared/ledger/envelope'
import { ApiRun, Device, enterPress, post } from '../factories/api-run'
import { fileOf, pdf, picture, type FileToSend } from '../factories/files'
import { fileAddress, fileOnDisk, ledger, nameFiles, observed, putFile } from '../factories/send-files'
import { calibration, enterInstrument, gauge } from '../factories/instruments'
import { openShop, openStaffedShop, type SignedInPerson } from '../factories/people'
import { openedPayload } from '../factories/test-press'
import { testServer } from '../support/api-server'

const codeOf = (response: Response): string => `${response.status} ${problemSchema.parse(response.body).code}`

const held = async (person: SignedInPerson, address: string) =>
  heldAttachmentsSchema.parse((await person.client.get(`${address}/attachments`).expect(200)).body).attachments

const stored = (file: FileToSend) =>
  testServer().context.database.query<{ type: string; size: number }>('SELECT type, size FROM attachments WHERE sha256 = ?', {
    replacements: [file.attachment.sha256],
    type: QueryTypes.SELECT,
  })

describe('the bytes of a file', () => {
  it('come after the entry that names them, and are read back as they were', async () => {
    const run = await ApiRun.open()
    const photo = await picture()
    const by = ledger(run.id)
    expect(codeOf(await putFile(run.staff.lead, by, photo))).toBe('409 not-named-yet')
    await nameFiles(run, [photo])
    expect(codeOf(await run.staff.lead.client.get(fileAddress(by, photo)))).toBe('404 not-here-yet')
    expect(await held(run.staff.lead, `/api/proof-tests/${run.id}`)).toMatchObject([{ sha256: photo.attachment.sha256, present: false }])
    await putFile(run.staff.lead, by, photo).expect(204)
    const read = await run.staff.witness.client.get(fileAddress(by, photo)).expect(200)
    expect((read.body as Buffer).equals(photo.bytes)).toBe(true)
    expect(read.headers).toMatchObject({
      'content-type': 'image/jpeg',
      'content-security-policy': "sandbox; default-src 'none'",
      'x-content-type-options': 'nosniff',
      'cache-control': 'private, max-age=31536000, immutable',
      'content-disposition': "inline; filename*=UTF-8''Joint%207.jpg",
    })
    expect(await held(run.staff.lead, `/api/proof-tests/${run.id}`)).toEqual([
      { ...photo.attachment, seq: run.state.headSeq, present: true, lost: null },
    ])
  })

  it('are kept once, however often and by however many they are sent', async () => {
    const run = await ApiRun.open()
    const photo = await picture('webp')
    await nameFiles(run, [photo])
    await nameFiles(run, [photo], run.witness)
    const by = ledger(run.id)
    await Promise.all([run.staff.lead, run.staff.witness, run.staff.lead].map((person) => putFile(person, by, photo).expect(204)))
    await putFile(run.staff.lead, by, photo).expect(204)
    expect(await stored(photo)).toEqual([{ type: 'image/webp', size: photo.bytes.length }])
  })

  it('come back when the storage lost them under the row that promises them', async () => {
    const run = await ApiRun.open()
    const photo = await picture()
    const by = ledger(run.id)
    await nameFiles(run, [photo])
    await putFile(run.staff.lead, by, photo).expect(204)
    rmSync(fileOnDisk(run.staff.lead.shopId, photo))
    expect(codeOf(await run.staff.lead.client.get(fileAddress(by, photo)))).toBe('404 not-here-yet')
    expect(testServer().loggedErrors.splice(0)).toHaveLength(1)
    await putFile(run.staff.lead, by, photo).expect(204)
    await run.staff.lead.client.get(fileAddress(by, photo)).expect(200)
  })

  it('are never shown when somebody changed them in the storage', async () => {
    const run = await ApiRun.open()
    const photo = await picture()
    await nameFiles(run, [photo])
    await putFile(run.staff.lead, ledger(run.id), photo).expect(204)
    writeFileSync(fileOnDisk(run.staff.lead.shopId, photo), (await picture()).bytes)
    for (const size of ['', '&size=thumb']) {
      expect(codeOf(await run.staff.lead.client.get(fileAddress(ledger(run.id), photo, size)))).toBe('500 altered-file')
      expect(testServer().loggedErrors.splice(0)).toHaveLength(1)
    }
  })
})

describe('what is not what was named', () => {
  it('is refused: other bytes, another length, another type, nothing', async () => {
    const run = await ApiRun.open()
    const [photo, other] = [await picture(), await picture()]
    const longer = { attachment: { ...photo.attachment }, bytes: Buffer.concat([photo.bytes, Buffer.from('x')]) }
    await nameFiles(run, [photo])
    const by = ledger(run.id)
    const { lead } = run.staff
    const flipped = { ...photo, bytes: Buffer.from(photo.bytes) }
    flipped.bytes[1000] = (flipped.bytes[1000] ?? 0) ^ 1
    expect(codeOf(await putFile(lead, by, flipped))).toBe('422 wrong-bytes')
    expect(codeOf(await putFile(lead, by, { ...photo, bytes: other.bytes }))).toBe('422 wrong-bytes')
    expect(codeOf(await putFile(lead, by, longer))).toBe('422 wrong-bytes')
    expect(codeOf(await putFile(lead, by, photo, 'image/png'))).toBe('422 wrong-bytes')
    expect(codeOf(await putFile(lead, by, photo, 'application/json'))).toMatch(/^4(00 malformed-json|22 wrong-bytes)$/)
    expect(codeOf(await lead.client.put(fileAddress(by, photo)).set('Content-Type', 'image/jpeg'))).toBe('422 wrong-bytes')
    expect(await stored(photo)).toEqual([])
  })

  it.each<[string, Buffer, Attachment['type']]>([
    ['a page of script named as a photo', Buffer.from('<!doctype html><script>alert(1)</script>'), 'image/jpeg'],
    ['a drawing with script named as a picture', Buffer.from('<svg xmlns="http://www.w3.org/2000/svg"><script/></svg>'), 'image/png'],
    ['a page of script named as a document', Buffer.from('<html>%PDF-1.4</html>'), 'application/pdf'],
    ['noise', randomBytes(4000), 'image/webp'],
    ['a document named as a photo', pdf().bytes, 'image/jpeg'],
  ])('is refused by what its bytes are: %s', async (_what, bytes, type) => {
    const run = await ApiRun.open()
    const lie = fileOf(bytes, type)
    await nameFiles(run, [lie])
    expect(codeOf(await putFile(run.staff.lead, ledger(run.id), lie))).toBe('422 wrong-bytes')
    expect(await stored(lie)).toEqual([])
  })

  it('is absent for the one who named it so, also when another entry brought the same bytes under their real type', async () => {
    const run = await ApiRun.open()
    const photo = await picture('png')
    await nameFiles(run, [photo])
    await putFile(run.staff.lead, ledger(run.id), photo).expect(204)
    const second = await ApiRun.open({ staff: run.staff })
    const lie = { ...photo, attachment: { ...photo.attachment, type: 'application/pdf' as const } }
    await nameFiles(second, [lie])
    expect(codeOf(await second.staff.lead.client.get(fileAddress(ledger(second.id), lie)))).toBe('404 not-here-yet')
    expect(codeOf(await putFile(second.staff.lead, ledger(second.id), lie))).toBe('422 wrong-bytes')
  })

  it('can be neither named nor sent above 12 MB', async () => {
    const run = await ApiRun.open()
    const huge = fileOf(Buffer.concat([pdf().bytes, randomBytes(LARGEST_ATTACHMENT)]), 'application/pdf')
    const draft = { ...run.lead.draft(observed), attachments: [huge.attachment] }
    await post(run.staff.lead, run.path, [run.lead.draft(observed)])
    await run.staff.lead.client.post(run.path, { sentAt: new Date().toISOString(), entries: [draft] }).expect(422)
    const small = fileOf(pdf().bytes, 'application/pdf')
    await nameFiles(run, [small])
    expect(codeOf(await putFile(run.staff.lead, ledger(run.id), { ...small, bytes: huge.bytes }))).toBe('413 too-large')
  })
})

describe('who may', () => {
  it('send the files of a test: its people, as long as their facts land; not the crew, not another shop', async () => {
    const run = await ApiRun.open()
    const photo = await picture()
    await nameFiles(run, [photo])
    const by = ledger(run.id)
    const { lead, witness, crew, owner } = run.staff
    const stranger = await openShop()
    expect(codeOf(await putFile(crew, by, photo))).toBe('403 forbidden')
    expect(codeOf(await putFile(stranger, by, photo))).toBe('404 not-found')
    expect(codeOf(await stranger.client.get(fileAddress(by, photo)))).toBe('404 not-found')
    expect(codeOf(await stranger.client.get(`/api/proof-tests/${run.id}/attachments`))).toBe('404 not-found')
    await owner.client.delete(`/api/people/${witness.userId}?shop=${owner.shopId}`)
    await putFile(witness, by, photo).expect(204)
    await witness.client.get(fileAddress(by, photo)).expect(200)
    await crew.client.get(fileAddress(by, photo)).expect(200)
    await putFile(lead, by, photo).expect(204)
  })

  it('send the files of a press: whoever may make the entry that names them', async () => {
    const staff = await openStaffedShop()
    const pressId = await enterPress(staff.lead)
    const [knock, weld] = [await picture(), await picture('png')]
    const lead = new Device(staff.lead, pressId)
    const state = { kind: 'changed', payload: { change: 'knock', jointIds: [], why: 'The forklift touched the column.' } }
    const change = { ...new Device(staff.crew, pressId).draft(state), attachments: [knock.attachment] }
    await post(staff.crew, `/api/presses/${pressId}/entries`, [change])
    const jointId = openedPayload().joints[0]?.id ?? ''
    const looked = { jointId, method: 'visual', result: 'accepted', remark: '', test: null }
    const described = { kind: 'joint-examined', payload: looked }
    await post(staff.lead, `/api/presses/${pressId}/entries`, [{ ...lead.draft(described), attachments: [weld.attachment] }])
    const by = ledger(pressId)
    await putFile(staff.crew, by, knock).expect(204)
    expect(codeOf(await putFile(staff.crew, by, weld))).toBe('403 forbidden')
    await putFile(staff.lead, by, weld).expect(204)
    const stranger = await openShop()
    expect(codeOf(await putFile(stranger, by, knock))).toBe('404 not-found')
    expect(codeOf(await stranger.client.get(fileAddress(by, knock)))).toBe('404 not-found')
    expect(await held(staff.crew, `/api/presses/${pressId}`)).toEqual([
      { ...knock.attachment, seq: 2, present: true, lost: null },
      { ...weld.attachment, seq: 3, present: true, lost: null },
    ])
    await staff.lead.client.get(`/api/proof-tests/${pressId}/attachments`).expect(404)
  })

  it('nobody who is not signed in, nor from another site', async () => {
    const run = await ApiRun.open()
    const photo = await picture()
    await nameFiles(run, [photo])
    const by = ledger(run.id)
    const elsewhere = run.staff.lead.client
      .put(fileAddress(by, photo))
      .set('Sec-Fetch-Site', 'cross-site')
      .set('Origin', 'https://elsewhere.example')
    expect(codeOf(await elsewhere.set('Content-Type', 'image/jpeg').send(photo.bytes))).toBe('403 cross-origin')
    await run.staff.lead.client.delete('/api/session')
    expect(codeOf(await putFile(run.staff.lead, by, photo))).toBe('401 not-signed-in')
    expect(codeOf(await run.staff.lead.client.get(fileAddress(by, photo)))).toBe('401 not-signed-in')
  })

  it('see one shop’s bytes through no other shop’s ledger', async () => {
    const [mine, theirs] = [await ApiRun.open(), await ApiRun.open()]
    const photo = await picture()
    await nameFiles(mine, [photo])
    await putFile(mine.staff.lead, ledger(mine.id), photo).expect(204)
    await nameFiles(theirs, [photo])
    expect(codeOf(await theirs.staff.lead.client.get(fileAddress(ledger(theirs.id), photo)))).toBe('404 not-here-yet')
  })

  it('name what it belongs to, once, by a hash', async () => {
    const run = await ApiRun.open()
    const photo = await picture()
    await nameFiles(run, [photo])
    const { client } = run.staff.lead
    await client.get(`/api/attachments/${photo.attachment.sha256}`).expect(422)
    await client.get(fileAddress(ledger(run.id), photo, `&calibration=${run.id}`)).expect(422)
    await client.get(`/api/attachments/..%2f..%2fsecrets?${ledger(run.id)}`).expect(404)
    expect(codeOf(await client.get(fileAddress(ledger(run.id), await picture())))).toBe('404 not-found')
  })
})

describe('smaller pictures', () => {
  it('are upright JPEGs of at most 320 and 1600 px, without what the camera wrote', async () => {
    const run = await ApiRun.open()
    const drawn = await picture('jpeg', { width: 2400, height: 1200 })
    // Orientation 6: the camera was held upright (Exif 2.3, tag 0x0112).
    const photo = fileOf(await sharp(drawn.bytes).withMetadata({ orientation: 6 }).toBuffer(), 'image/jpeg', 'Crack "at" toe/7.jpeg')
    await nameFiles(run, [photo])
    await putFile(run.staff.lead, ledger(run.id), photo).expect(204)
    for (const [size, height] of [
      ['thumb', 320],
      ['page', 1600],
    ] as const) {
      for (const _time of ['made', 'read again']) {
        const response = await run.staff.lead.client.get(fileAddress(ledger(run.id), photo, `&size=${size}`)).expect(200)
        expect(response.headers['content-type']).toBe('image/jpeg')
        const { format, width, height: high, orientation, exif } = await sharp(response.body as Buffer).metadata()
        expect({ format, width, high, orientation, exif }).toEqual({
          format: 'jpeg',
          width: height / 2,
          high: height,
          orientation: undefined,
          exif: undefined,
        })
        expect(response.headers['content-disposition']).toBe("inline; filename*=UTF-8''Crack%20%22at%22%20toe_7.jpg")
      }
    }
  })

  it('are never larger than the photo was', async () => {
    const run = await ApiRun.open()
    const photo = await picture('webp', { width: 100, height: 60 })
    await nameFiles(run, [photo])
    await putFile(run.staff.lead, ledger(run.id), photo).expect(204)
    const response = await run.staff.lead.client.get(fileAddress(ledger(run.id), photo, '&size=page')).expect(200)
    expect(await sharp(response.body as Buffer).metadata()).toMatchObject({ format: 'jpeg', width: 100, height: 60 })
  })

  it('are refused where none can be made, and the file itself is still there', async () => {
    const run = await ApiRun.open()
    const whole = await picture()
    const broken = fileOf(whole.bytes.subarray(0, 300), 'image/jpeg')
    // Sixty million points in a few kilobytes: opened, it would take 180 MB.
    const blank = sharp({ create: { width: 10_000, height: 6_000, channels: 3, background: '#000' } })
    const bomb = fileOf(await blank.png({ compressionLevel: 9 }).toBuffer(), 'image/png')
    const document = pdf()
    await nameFiles(run, [broken, bomb, document])
    const { lead } = run.staff
    for (const file of [broken, bomb, document]) await putFile(lead, ledger(run.id), file).expect(204)
    for (const file of [broken, bomb]) {
      expect(codeOf(await lead.client.get(fileAddress(ledger(run.id), file, '&size=thumb')))).toBe('422 no-picture')
      await lead.client.get(fileAddress(ledger(run.id), file)).expect(200)
    }
    expect(codeOf(await lead.client.get(fileAddress(ledger(run.id), document, '&size=thumb')))).toBe('404 no-picture')
    const read = await lead.client.get(fileAddress(ledger(run.id), document)).expect(200)
    expect(read.headers['content-type']).toBe('application/pdf')
  }, 60_000)
})

describe('signing', () => {
  it('waits for every photo that the test names', async () => {
    const run = await ApiRun.open()
    const photo = await picture()
    await run.driveTo('sign')
    await nameFiles(run, [photo])
    const refused = await run.sign('lead')
    expect(codeOf(refused)).toBe('409 refused')
    expect(problemSchema.parse(refused.body)).toMatchObject({ rules: ['R53'] })
    expect(problemSchema.parse(refused.body).detail).toContain('1 of 1 photos and documents is not on the server yet')
    await putFile(run.staff.lead, ledger(run.id), photo).expect(204)
    await run.sign('lead').expect(201)
  })

  it('goes on without one that lead or witness declares lost, which stays in the record', async () => {
    const run = await ApiRun.open()
    const photo = await picture()
    await run.driveTo('sign')
    await nameFiles(run, [photo])
    const why = 'The tablet fell into the pit.'
    const lost = { kind: 'attachment-lost', payload: { sha256: photo.attachment.sha256, why } } as const
    expect(await run.send(run.lead, lost)).toMatchObject({ outcome: 'kept', entry: { irregular: [] } })
    await run.sign('lead').expect(201)
    expect(await held(run.staff.crew, `/api/proof-tests/${run.id}`)).toMatchObject([
      { sha256: photo.attachment.sha256, present: false, lost: { why, by: run.staff.lead.name } },
    ])
  })

  it('by the witness waits too, for what was named since the lead signed', async () => {
    const run = await ApiRun.open()
    await run.driveTo('sign')
    await run.sign('lead').expect(201)
    const photo = await picture()
    await nameFiles(run, [photo])
    await run.refresh()
    expect(problemSchema.parse((await run.sign('witness')).body)).toMatchObject({ rules: ['R53'] })
    const lost = { kind: 'attachment-lost', payload: { sha256: photo.attachment.sha256, why: 'Never taken.' } } as const
    expect(await run.send(run.witness, lost)).toMatchObject({ outcome: 'kept', entry: { irregular: [] } })
    await run.sign('witness').expect(201)
  })
})

describe('a certificate', () => {
  const enter = async () => {
    const staff = await openStaffedShop()
    const { instrument } = await enterInstrument(staff.lead, gauge())
    const certificate = pdf('Certificate C-4471')
    const address = `/api/instruments/${instrument.id}/calibrations`
    const body = { ...calibration(), certificateFile: certificate.attachment }
    const [entered] = instrumentResponseSchema.parse((await staff.lead.client.post(address, body).expect(201)).body).calibrations
    if (!entered) throw new Error('The calibration was entered.')
    return { staff, instrumentId: instrument.id, certificate, entered, by: `calibration=${entered.id}` }
  }

  it('is named with its calibration, sent after it, and read by the whole shop', async () => {
    const { staff, instrumentId, certificate, entered, by } = await enter()
    expect(entered.certificateFile).toEqual({ ...certificate.attachment, present: false })
    // What a test freezes of a calibration is what it was before.
    expect(entered.calibration).toEqual(calibration())
    expect(codeOf(await putFile(staff.crew, by, certificate))).toBe('403 forbidden')
    expect(codeOf(await putFile(staff.lead, by, pdf('Another')))).toBe('409 not-named-yet')
    expect(codeOf(await putFile(await openShop(), by, certificate))).toBe('404 not-found')
    await putFile(staff.lead, by, certificate).expect(204)
    const read = await staff.crew.client.get(fileAddress(by, certificate)).buffer(true).expect(200)
    expect(read.headers['content-disposition']).toContain("filename*=UTF-8''Certificate%20C-4471.pdf")
    expect(codeOf(await (await openShop()).client.get(fileAddress(by, certificate)))).toBe('404 not-found')
    expect(read.headers['content-disposition']).toMatch(/^inline;/)
    const { calibrations } = instrumentResponseSchema.parse((await staff.lead.client.get(`/api/instruments/${instrumentId}`)).body)
    expect(calibrations[0]?.certificateFile).toEqual({ ...certificate.attachment, present: true })
  })

  it('is not asked for, and a calibration without one says so', async () => {
    const staff = await openStaffedShop()
    const { calibrations } = await enterInstrument(staff.lead, gauge(), [calibration()])
    expect(calibrations[0]?.certificateFile).toBeNull()
    expect(codeOf(await putFile(staff.lead, `calibration=${calibrations[0]?.id}`, pdf()))).toBe('409 not-named-yet')
  })
})

import { rmSync, writeFileSync } from 'node:fs'
import ExcelJS from 'exceljs'
import sharp from 'sharp'
import { describe, expect, it } from 'vitest'
import { ApiRun } from '../factories/api-run'
import { pdf, picture } from '../factories/files'
import { fileOnDisk, ledger, nameFiles, putFile } from '../factories/send-files'
import { testServer } from '../support/api-server'

function binary(response: NodeJS.ReadableStream, done: (error: Error | null, body: Buffer) => void): void {
  const chunks: Buffer[] = []
  response.on('data', (chunk: Buffer) => chunks.push(chunk))
  response.on('end', () => done(null, Buffer.concat(chunks)))
}

describe('the record’s workbook', () => {
  const workbookOf = async (run: ApiRun): Promise<ExcelJS.Workbook> => {
    const response = await run.staff.lead.client
      .get(`/api/proof-tests/${run.id}/record.xlsx`)
      .buffer(true)
      .parse(binary as never)
      .expect(200)
    const workbook = new ExcelJS.Workbook()
    await workbook.xlsx.load(response.body as ArrayBuffer)
    return workbook
  }
  const rowsOf = (workbook: ExcelJS.Workbook): string[][] => {
    const rows: string[][] = []
    workbook.getWorksheet('Photos')?.eachRow((row, number) => {
      if (number > 4) rows.push(Array.from({ length: 8 }, (_, column) => row.getCell(column + 1).text))
    })
    return rows
  }

  it('has every photo with what became of it, and the picture', async () => {
    const run = await ApiRun.open()
    const [photo, gone, missing, document] = [await picture('webp', { width: 1000, height: 500 }), await picture(), await picture(), pdf()]
    await nameFiles(run, [photo, gone])
    await nameFiles(run, [photo, missing, document], run.witness)
    for (const file of [photo, document]) await putFile(run.staff.lead, ledger(run.id), file).expect(204)
    const payload = { sha256: gone.attachment.sha256, why: 'The tablet fell into the pit.' }
    await run.send(run.lead, { kind: 'attachment-lost', payload })
    const workbook = await workbookOf(run)
    const rows = rowsOf(workbook)
    expect(rows.map(([number, seq, says, fileName, type]) => [number, seq, says, fileName, type])).toEqual([
      ['1', '2', 'See the photo.', 'Joint 7.webp', 'image/webp'],
      ['2', '2', 'See the photo.', 'Joint 7.jpeg', 'image/jpeg'],
      ['3', '3', 'See the photo.', 'Joint 7.webp', 'image/webp'],
      ['4', '3', 'See the photo.', 'Joint 7.jpeg', 'image/jpeg'],
      ['5', '3', 'See the photo.', 'Certificate.pdf', 'application/pdf'],
    ])
    expect(rows.map((row) => row[6])).toEqual([
      'On the server',
      expect.stringMatching(/^Declared lost by Lena Vogt, .* UTC: The tablet fell into the pit\.$/),
      'On the server',
      'Not on the server',
      'On the server',
    ])
    expect(rows.map((row) => row[7])).toEqual([photo, gone, photo, missing, document].map(({ attachment }) => attachment.sha256))
    // Named twice, it stands on the sheet twice and is in the file once.
    const images = workbook.getWorksheet('Photos')?.getImages() ?? []
    expect(images.map(({ range }) => range.tl.nativeRow)).toEqual([4, 6])
    expect(new Set(images.map(({ imageId }) => imageId)).size).toBe(1)
    const embedded = workbook.getImage(Number(images[0]?.imageId)).buffer
    expect(await sharp(Buffer.from(embedded as ArrayBuffer)).metadata()).toMatchObject({ format: 'jpeg', width: 800, height: 400 })
  })

  it('shows the first sixty and names the rest', async () => {
    const run = await ApiRun.open()
    const photos = await Promise.all(Array.from({ length: 62 }, () => picture('jpeg', { width: 8, height: 6 })))
    for (let from = 0; from < photos.length; from += 20) await nameFiles(run, photos.slice(from, from + 20))
    for (const photo of photos) await putFile(run.staff.lead, ledger(run.id), photo).expect(204)
    const workbook = await workbookOf(run)
    expect(rowsOf(workbook)).toHaveLength(62)
    const images = workbook.getWorksheet('Photos')?.getImages() ?? []
    expect(images.map(({ range }) => range.tl.nativeRow)).toEqual(Array.from({ length: 60 }, (_, index) => 4 + index))
  }, 60_000)

  it('prints on when a photo was lost or changed in the storage, and says which', async () => {
    const run = await ApiRun.open()
    const [altered, vanished] = [await picture(), await picture('png')]
    await nameFiles(run, [altered, vanished])
    for (const file of [altered, vanished]) await putFile(run.staff.lead, ledger(run.id), file).expect(204)
    writeFileSync(fileOnDisk(run.staff.lead.shopId, altered), 'other bytes')
    rmSync(fileOnDisk(run.staff.lead.shopId, vanished))
    const workbook = await workbookOf(run)
    expect(testServer().loggedErrors.splice(0)).toHaveLength(2)
    expect(rowsOf(workbook).map((row) => row[6])).toEqual(['Altered after it was kept: not shown', 'Not on the server'])
    expect(workbook.getWorksheet('Photos')?.getImages()).toEqual([])
  })
})

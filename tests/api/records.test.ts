import ExcelJS from 'exceljs'
import type { Response } from 'supertest'
import { describe, expect, it } from 'vitest'
import { problemSchema } from '#shared/api/problem'
import { ApiRun } from '../factories/api-run'
import { openShop } from '../factories/people'
import { readPdf } from '../support/poppler'

const paperAddress = (id: string, paper = 'a4') => `/api/proof-tests/${id}/record.pdf?paper=${paper}`

const address = (id: string) => `/api/proof-tests/${id}/record.xlsx` as const

function binary(response: NodeJS.ReadableStream, done: (error: Error | null, body: Buffer) => void): void {
  const chunks: Buffer[] = []
  response.on('data', (chunk: Buffer) => chunks.push(chunk))
  response.on('end', () => done(null, Buffer.concat(chunks)))
}

async function workbookOf(response: Response): Promise<ExcelJS.Workbook> {
  const workbook = new ExcelJS.Workbook()
  await workbook.xlsx.load(response.body as ArrayBuffer)
  return workbook
}

describe('the record as a spreadsheet', () => {
  it('is a file named after test and press, with the readings as they were sent', async () => {
    const run = await ApiRun.open()
    await run.driveTo('release')
    const request = run.staff.witness.client.get(address(run.id))
    const response = await request
      .buffer(true)
      .parse(binary as never)
      .expect(200)
    expect(response.headers['content-type']).toContain('spreadsheetml.sheet')
    expect(response.headers['content-disposition']).toBe(`attachment; filename="${run.number} Press 2.xlsx"`)
    const workbook = await workbookOf(response)
    const summary = workbook.getWorksheet('Summary')
    expect(summary?.getCell('A2').text).toBe(`${run.number}, Press 2`)
    expect(workbook.getWorksheet('Ledger')?.getCell(4 + run.state.headSeq, 8).value).toBe(run.state.headHash)
  })

  it('carries signatures and seals once it is countersigned', async () => {
    const run = await ApiRun.open()
    await run.driveTo('sign')
    await run.sign('lead').expect(201)
    await run.refresh()
    await run.sign('witness').expect(201)
    const response = await run.staff.owner.client
      .get(address(run.id))
      .buffer(true)
      .parse(binary as never)
      .expect(200)
    const words: string[] = []
    ;(await workbookOf(response)).getWorksheet('People and signatures')?.eachRow((row) => row.eachCell((cell) => words.push(cell.text)))
    expect(words).toContain('I was present and read the gauge myself.')
    expect(words.filter((word) => word.startsWith('Seal over entry'))).toHaveLength(2)
  })

  it('is refused to the crew, and unknown to other shops', async () => {
    const run = await ApiRun.open()
    const refused = await run.staff.crew.client.get(address(run.id)).expect(403)
    expect(problemSchema.parse(refused.body).code).toBe('forbidden')
    const stranger = await openShop()
    await stranger.client.get(address(run.id)).expect(404)
    await stranger.client.get(address('01994a00-0007-7000-8000-00000000ffff')).expect(404)
  })
})

describe('the record on paper', () => {
  it('is a file named after test and press, the same bytes each time, on the paper that was asked for', async () => {
    const run = await ApiRun.open()
    await run.driveTo('release')
    const ask = (paper: string) =>
      run.staff.witness.client
        .get(paperAddress(run.id, paper))
        .set('host', 'press.example')
        .buffer(true)
        .parse(binary as never)
    const [first, again, letter] = [await ask('a4').expect(200), await ask('a4').expect(200), await ask('letter').expect(200)]
    expect(first.headers['content-type']).toBe('application/pdf')
    expect(first.headers['content-disposition']).toBe(`attachment; filename="${run.number} Press 2.pdf"`)
    const bytes = first.body as Buffer
    expect(bytes.equals(again.body as Buffer)).toBe(true)
    const [a4, other] = [await readPdf(bytes), await readPdf(letter.body as Buffer)]
    expect(a4.info['Title']).toBe(`Record of ${run.number}, Press 2`)
    expect(a4.words).toContain('Under way. Nothing is concluded')
    expect(a4.info['Page size']).toContain('A4')
    expect(other.info['Page size']).toContain('letter')
  })

  it('leads to the page of this server that checks ledger files', async () => {
    const run = await ApiRun.open()
    const response = await run.staff.owner.client
      .get(paperAddress(run.id))
      .set('host', 'press.example')
      .buffer(true)
      .parse(binary as never)
      .expect(200)
    expect((await readPdf(response.body as Buffer)).words).toContain('Open http://press.example/check')
  })

  it('is refused to the crew, unknown to other shops, and on no other paper', async () => {
    const run = await ApiRun.open()
    const refused = await run.staff.crew.client.get(paperAddress(run.id)).expect(403)
    expect(problemSchema.parse(refused.body).code).toBe('forbidden')
    const stranger = await openShop()
    await stranger.client.get(paperAddress(run.id)).expect(404)
    const odd = await run.staff.owner.client.get(paperAddress(run.id, 'a3')).expect(422)
    expect(problemSchema.parse(odd.body).fields).toHaveProperty('paper')
  })
})

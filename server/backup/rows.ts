import { createHash } from 'node:crypto'
import { createReadStream } from 'node:fs'
import path from 'node:path'
import { pipeline } from 'node:stream'
import { Readable } from 'node:stream'
import { createGunzip, createGzip } from 'node:zlib'
import type { Connection } from 'mariadb'
import { z } from 'zod'
import { writeNewFile } from './files'
import { DamagedSet } from './manifest'
import type { SetFile, SetTable } from './manifest'
import { selectOf } from './tables'
import type { Table } from './tables'

/** Each value as MariaDB writes it: nothing goes through a number of JavaScript's or its clock. */
export type Row = (string | null)[]

const rowSchema = z.array(z.string().nullable())

/** Rows of a table in order of its key. */
export async function* readTable(connection: Connection, table: Table): AsyncGenerator<Row> {
  const rows = connection.queryStream({ sql: selectOf(table), rowsAsArray: true, typeCast: (column) => column.string() })
  for await (const row of rows as AsyncIterable<Row>) yield [...row]
}

function lineOf(row: Row): Buffer {
  return Buffer.from(`${JSON.stringify(row)}\n`, 'utf8')
}

/** Counts and hashes lines on their way. */
class Content {
  rows = 0
  private readonly hash = createHash('sha256')

  take(line: Uint8Array): void {
    this.rows += 1
    this.hash.update(line)
  }

  digest(): { rows: number; content: string } {
    return { rows: this.rows, content: this.hash.digest('hex') }
  }
}

/** Writes a table as compressed lines of JSON, one a row; `look` sees each row once. */
export async function writeTable(
  connection: Connection,
  table: Table,
  folder: string,
  look: (row: Row) => void,
): Promise<{ table: SetTable; file: SetFile }> {
  const content = new Content()
  async function* written() {
    for await (const row of readTable(connection, table)) {
      look(row)
      const line = lineOf(row)
      content.take(line)
      yield line
    }
  }
  const file = `tables/${table.name}.jsonl.gz`
  const gzip = createGzip()
  // A failure ends the compressed stream, and comes out where that is read.
  pipeline(Readable.from(written()), gzip, () => undefined)
  const kept = await writeNewFile(path.join(folder, file), gzip as AsyncIterable<Uint8Array>)
  return { table: { name: table.name, columns: table.columns, file, ...content.digest() }, file: { path: file, ...kept } }
}

/** What a table in a database comes to, to be compared with what the set says. */
export async function contentOf(connection: Connection, table: Table): Promise<{ rows: number; content: string }> {
  const content = new Content()
  for await (const row of readTable(connection, table)) content.take(lineOf(row))
  return content.digest()
}

/** Split at line feeds only: a text inside a row may hold any other separator. */
async function* linesOf(chunks: AsyncIterable<Buffer>): AsyncGenerator<Buffer> {
  let rest: Buffer = Buffer.alloc(0)
  for await (const chunk of chunks) {
    let from = 0
    const text = rest.length === 0 ? chunk : Buffer.concat([rest, chunk])
    for (let at = text.indexOf(10); at !== -1; at = text.indexOf(10, from)) {
      yield text.subarray(from, at + 1)
      from = at + 1
    }
    rest = text.subarray(from)
  }
  if (rest.length > 0) yield rest
}

/** The rows of a table in a set, in order; refuses what is not a row of it, and at the end what is not all of them. */
export async function* rowsInSet(folder: string, table: SetTable): AsyncGenerator<Row> {
  const content = new Content()
  const gunzip = createGunzip()
  // Here too the failure comes out where the stream is read.
  pipeline(createReadStream(path.join(folder, table.file)), gunzip, () => undefined)
  try {
    for await (const line of linesOf(gunzip as AsyncIterable<Buffer>)) {
      content.take(line)
      const row = rowSchema.length(table.columns.length).safeParse(JSON.parse(line.toString('utf8')))
      if (!row.success) throw new DamagedSet(`${table.file} is damaged at line ${content.rows}.`)
      yield row.data
    }
  } catch (error) {
    if (error instanceof DamagedSet) throw error
    throw new DamagedSet(`${table.file} is damaged after line ${content.rows}: ${error instanceof Error ? error.message : String(error)}.`)
  }
  const { rows, content: hash } = content.digest()
  if (rows !== table.rows) throw new DamagedSet(`${table.file} holds ${rows} rows, the manifest says ${table.rows}.`)
  if (hash !== table.content) throw new DamagedSet(`${table.file} holds other rows than the manifest describes.`)
}

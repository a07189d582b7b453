import { readFile } from 'node:fs/promises'
import path from 'node:path'
import { z } from 'zod'

/** Raised when a set written by this program could not be read by an older one. */
export const SET_FORMAT = 1
export const MANIFEST = 'manifest.json'
export const KEYS_FOLDER = 'keys'
export const ATTACHMENTS_FOLDER = 'attachments'

const sha256Schema = z.string().regex(/^[0-9a-f]{64}$/)
const nameSchema = z.string().regex(/^[a-z][a-z0-9_]{0,62}$/)

/** Stays inside the set: no way up, no absolute path. */
const pathSchema = z
  .string()
  .regex(/^[\w.-]+(\/[\w.-]+)*$/)
  .refine((file) => !file.split('/').includes('..'))

const fileSchema = z.object({ path: pathSchema, size: z.int().nonnegative(), sha256: sha256Schema })

const tableSchema = z.object({
  name: nameSchema,
  /** With the data type as MariaDB names it. Values are written as MariaDB writes them; of binary ones, the bytes in hexadecimal. */
  columns: z.array(z.object({ name: nameSchema, type: z.string() })).min(1),
  rows: z.int().nonnegative(),
  file: pathSchema,
  /** SHA-256 of the lines before they were compressed: what the restored table must read back as. */
  content: sha256Schema,
})

const manifestSchema = z.object({
  format: z.literal(SET_FORMAT),
  program: z.literal('quarterload'),
  version: z.string(),
  madeAt: z.iso.datetime(),
  database: z.string(),
  /** What the schema of the tables is, by the migrations that had run. */
  migrations: z.array(z.string()).min(1),
  /** Parents before those that refer to them. */
  tables: z.array(tableSchema),
  ledgers: z.array(z.object({ id: z.string(), subject: z.string(), headSeq: z.int().nonnegative(), headHash: sha256Schema })),
  /** Whether the keys lie in this set or were put apart from it. */
  keys: z.enum(['inside', 'apart']),
  /** By their paths in the folder of keys. */
  keyFiles: z.array(fileSchema),
  files: z.array(fileSchema),
})

export type Manifest = z.infer<typeof manifestSchema>
export type SetFile = z.infer<typeof fileSchema>
export type SetTable = z.infer<typeof tableSchema>

/** What is wrong with a set, as a sentence for whoever wants to restore it. */
export class DamagedSet extends Error {}

/** Reads a set's manifest. Refuses one that is missing, cannot be read, or was made by a later program. */
export async function readManifest(folder: string): Promise<Manifest> {
  let text: string
  try {
    text = await readFile(path.join(folder, MANIFEST), 'utf8')
  } catch {
    throw new DamagedSet(`There is no ${MANIFEST} in ${folder}: this is not a whole backup.`)
  }
  let json: unknown
  try {
    json = JSON.parse(text)
  } catch {
    throw new DamagedSet(`${MANIFEST} in ${folder} is damaged: it cannot be read.`)
  }
  const format = z.object({ format: z.int() }).safeParse(json)
  if (format.success && format.data.format > SET_FORMAT) {
    throw new DamagedSet('This backup was made by a newer Quarterload. Update this one, then restore.')
  }
  const parsed = manifestSchema.safeParse(json)
  if (!parsed.success) {
    const [issue] = parsed.error.issues
    throw new DamagedSet(`${MANIFEST} in ${folder} is damaged at “${issue?.path.join('.') ?? ''}”.`)
  }
  return parsed.data
}

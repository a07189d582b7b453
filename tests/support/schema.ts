import { connect } from '#server/database/connection'

/** A schema that no other worker uses; made if it isn't there. Returns its address. */
export async function schemaFor(databaseUrl: string, name: string): Promise<string> {
  const schema = `quarterload_${name}`
  const database = connect(databaseUrl, { poolSize: 1 })
  try {
    await database.query(`CREATE DATABASE IF NOT EXISTS ${schema} CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci`)
  } finally {
    await database.close()
  }
  const url = new URL(databaseUrl)
  url.pathname = `/${schema}`
  return url.href
}

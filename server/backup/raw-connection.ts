import type { Connection } from 'mariadb'
import type { Sequelize } from 'sequelize'

/** A connection to itself for as long as `work` runs, for streams and for exact text: without what the models do to values. */
export async function withRawConnection<T>(database: Sequelize, work: (connection: Connection) => Promise<T>): Promise<T> {
  const connection = (await database.connectionManager.getConnection({ type: 'write', useMaster: true })) as Connection
  try {
    // A slow disk at this end must not make the server give up on a long table.
    await connection.query('SET SESSION net_write_timeout = 3600, net_read_timeout = 3600')
    return await work(connection)
  } finally {
    await connection.rollback().catch(() => connection.destroy())
    database.connectionManager.releaseConnection(connection)
  }
}

/** Everything read until the transaction ends is of one moment; nobody is kept waiting. */
export async function beginSnapshot(connection: Connection): Promise<void> {
  await connection.query('SET TRANSACTION ISOLATION LEVEL REPEATABLE READ')
  await connection.query('START TRANSACTION WITH CONSISTENT SNAPSHOT, READ ONLY')
}

export async function rowsFrom<Row>(connection: Connection, sql: string, values: unknown[] = []): Promise<Row[]> {
  const rows = await connection.query<Row[]>(sql, values)
  return rows.map((row) => ({ ...row }))
}

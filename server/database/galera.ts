import type { Connection } from 'mariadb'

const UNKNOWN_VARIABLE = 1193

/**
 * Bit 1: SELECT (FOR UPDATE too), SHOW and START TRANSACTION wait until this node has applied what the cluster had
 * committed, so that a person who reads at one server what was just written at another finds it. Writes need no bit
 * of their own: two transactions that touch the same row or key are certified against each other, and the later one is
 * taken back (1213) and runs again.
 */
const CAUSAL_READS = 1

/**
 * A node that hands its whole data to another holds up COMMIT meanwhile, and whoever waits for a row that such a COMMIT
 * holds, holds up the node: they give way after this, and run again.
 */
const LOCK_WAIT_SECONDS = 5

class NodeNotReady extends Error {
  /** As the node itself answers statements: "WSREP has not yet prepared node for application use". */
  readonly errno = 1047
  override readonly name = 'NodeNotReady'
}

/** Whether the server of this connection is a node of a Galera cluster. */
export async function isClusterNode(connection: Pick<Connection, 'query'>): Promise<boolean> {
  try {
    const answer: unknown = await connection.query({ sql: 'SELECT @@GLOBAL.wsrep_on AS wsrepOn', metaAsArray: false })
    const [row] = answer as { wsrepOn: number | bigint }[]
    return Number(row?.wsrepOn) === 1
  } catch (error) {
    if (error instanceof Error && 'errno' in error && error.errno === UNKNOWN_VARIABLE) return false
    throw error
  }
}

/**
 * On a node of a cluster: throws unless it is ready, in the primary part and in step, and makes the connection's reads
 * causal. On any other MariaDB nothing is done.
 */
export async function joinCluster(connection: Connection): Promise<void> {
  if (!(await isClusterNode(connection))) return
  const answer: unknown = await connection.query({
    sql: "SHOW GLOBAL STATUS WHERE Variable_name IN ('wsrep_ready', 'wsrep_cluster_status', 'wsrep_local_state_comment')",
    metaAsArray: false,
    rowsAsArray: true,
  })
  const status = new Map(answer as [string, string][])
  const state = status.get('wsrep_local_state_comment') ?? ''
  // A donor serves as before while it hands its data to a node that comes back.
  const isFit = status.get('wsrep_ready') === 'ON' && status.get('wsrep_cluster_status') === 'Primary' && /^(Synced|Donor)/.test(state)
  if (!isFit) throw new NodeNotReady(`This node of the database cluster is not ready: ${state || 'unknown state'}.`)
  await connection.query(`SET SESSION wsrep_sync_wait = ${CAUSAL_READS}, innodb_lock_wait_timeout = ${LOCK_WAIT_SECONDS}`)
}

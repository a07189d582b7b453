import { QueryTypes } from 'sequelize'
import type { Sequelize } from 'sequelize'

/** An entry with its long texts, and the request that carries a batch of them. */
const smallestPacket = 16 * 1024 * 1024

/** The server's own settings, by name; one that this server doesn't know is missing. */
export type Settings = ReadonlyMap<string, string>

const named = [
  'innodb_flush_log_at_trx_commit',
  'innodb_doublewrite',
  'innodb_force_recovery',
  'log_bin',
  'sync_binlog',
  'binlog_format',
  'sql_mode',
  'character_set_connection',
  'max_allowed_packet',
  'read_only',
  'wsrep_on',
  'innodb_autoinc_lock_mode',
] as const

type Name = (typeof named)[number]

interface Wanted {
  setting: Name
  /** As the server's configuration file would have it. */
  want: string
  why: string
  isMet(value: string, all: Settings): boolean
}

const isOn = (value: string | undefined): boolean => value === 'ON' || value === '1'

const wanted: Wanted[] = [
  {
    setting: 'innodb_flush_log_at_trx_commit',
    want: '1',
    why: 'else a power cut loses entries that were shown as kept',
    isMet: (value) => value === '1',
  },
  {
    setting: 'innodb_doublewrite',
    want: 'ON',
    why: 'else a power cut can leave a page half written',
    isMet: (value) => isOn(value),
  },
  {
    setting: 'sync_binlog',
    want: '1',
    why: 'else the binary log falls behind what was committed, and a replica or a restore lacks it',
    isMet: (value, all) => value === '1' || !isOn(all.get('log_bin')),
  },
  {
    setting: 'binlog_format',
    want: 'ROW',
    why: 'transactions here are READ COMMITTED, which statements in the binary log do not allow',
    isMet: (value, all) => value !== 'STATEMENT' || !(isOn(all.get('log_bin')) || isOn(all.get('wsrep_on'))),
  },
  {
    setting: 'innodb_force_recovery',
    want: '0',
    why: 'a server that is being repaired is not to be written to',
    isMet: (value) => value === '0',
  },
  {
    setting: 'innodb_autoinc_lock_mode',
    want: '2',
    why: 'a cluster needs it',
    isMet: (value, all) => value === '2' || !isOn(all.get('wsrep_on')),
  },
  {
    setting: 'sql_mode',
    want: 'STRICT_TRANS_TABLES',
    why: 'else a value that does not fit is cut short without a word',
    isMet: (value) => /\bSTRICT_(TRANS|ALL)_TABLES\b/.test(value),
  },
  {
    setting: 'max_allowed_packet',
    want: '16M',
    why: 'a batch of entries must fit into one statement',
    isMet: (value) => Number(value) >= smallestPacket,
  },
  {
    setting: 'read_only',
    want: 'OFF',
    why: 'entries are written to it',
    isMet: (value) => !isOn(value),
  },
  {
    setting: 'character_set_connection',
    want: 'utf8mb4',
    why: 'else names and remarks lose letters',
    isMet: (value) => value === 'utf8mb4',
  },
]

/** A sentence for each setting under which something shown as kept could be lost or changed; none when all is well. */
export function unfitSettings(settings: Settings): string[] {
  return wanted.flatMap(({ setting, want, why, isMet }) => {
    const value = settings.get(setting)
    if (value !== undefined && isMet(value, settings)) return []
    const has = value === undefined ? 'is not known there' : `is ${value === '' ? 'empty' : value} there`
    return [`${setting} ${has}: set ${setting} = ${want} in the [mariadbd] section of its configuration and restart it; ${why}.`]
  })
}

/** The settings as they hold for a connection of this program. */
export async function readSettings(database: Sequelize): Promise<Settings> {
  const rows = await database.query<{ Variable_name: string; Value: string }>('SHOW VARIABLES WHERE Variable_name IN (?)', {
    replacements: [[...named]],
    type: QueryTypes.SELECT,
  })
  return new Map(rows.map((row) => [row.Variable_name, row.Value]))
}

/**
 * Throws, naming each setting and how to set it, when the database could lose or change what it has said it keeps.
 * `isRelaxed` is for tests, which give durability up on purpose.
 */
export async function requireDurable(database: Sequelize, { isRelaxed }: { isRelaxed: boolean }): Promise<void> {
  if (isRelaxed) return
  const unfit = unfitSettings(await readSettings(database))
  if (unfit.length === 0) return
  throw new Error(['The database is not set up to keep what it is given:', ...unfit.map((sentence) => `  ${sentence}`)].join('\n'))
}

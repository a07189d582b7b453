import { describe, expect, it } from 'vitest'
import { unfitSettings } from './durability'

const durable = new Map([
  ['innodb_flush_log_at_trx_commit', '1'],
  ['innodb_doublewrite', 'ON'],
  ['innodb_force_recovery', '0'],
  ['log_bin', 'OFF'],
  ['sync_binlog', '0'],
  ['binlog_format', 'MIXED'],
  ['sql_mode', 'STRICT_TRANS_TABLES,NO_ENGINE_SUBSTITUTION'],
  ['character_set_connection', 'utf8mb4'],
  ['max_allowed_packet', '16777216'],
  ['read_only', 'OFF'],
  ['wsrep_on', 'OFF'],
  ['innodb_autoinc_lock_mode', '1'],
])

const withChanges = (...changes: [string, string][]) => unfitSettings(new Map([...durable, ...changes]))

describe('the settings of the database', () => {
  it('are in order as Debian ships them, with no binary log', () => {
    expect(unfitSettings(durable)).toEqual([])
  })

  it.each([
    ['innodb_flush_log_at_trx_commit', '2', /innodb_flush_log_at_trx_commit is 2 there: set innodb_flush_log_at_trx_commit = 1/],
    ['innodb_doublewrite', 'OFF', /set innodb_doublewrite = ON/],
    ['innodb_force_recovery', '1', /set innodb_force_recovery = 0/],
    ['sql_mode', '', /sql_mode is empty there: set sql_mode = STRICT_TRANS_TABLES/],
    ['character_set_connection', 'latin1', /set character_set_connection = utf8mb4/],
    ['max_allowed_packet', '1048576', /set max_allowed_packet = 16M/],
    ['read_only', 'ON', /set read_only = OFF/],
  ])('are refused when %s is %s, in a sentence that says how to set it', (setting, value, sentence) => {
    const sentences = withChanges([setting, value])
    expect(sentences).toHaveLength(1)
    expect(sentences[0]).toMatch(sentence)
  })

  it('ask for a binary log that is flushed and by rows, where there is one', () => {
    expect(withChanges(['log_bin', 'ON'])).toEqual([expect.stringMatching(/set sync_binlog = 1/)])
    expect(withChanges(['log_bin', 'ON'], ['sync_binlog', '1'], ['binlog_format', 'STATEMENT'])).toEqual([
      expect.stringMatching(/set binlog_format = ROW/),
    ])
  })

  it('ask of the nodes of a cluster what a cluster needs', () => {
    expect(withChanges(['wsrep_on', 'ON'], ['binlog_format', 'ROW'])).toEqual([expect.stringMatching(/set innodb_autoinc_lock_mode = 2/)])
  })

  it('are refused when the server does not know one of them', () => {
    const without = new Map(durable)
    without.delete('innodb_doublewrite')
    expect(unfitSettings(without)).toEqual([expect.stringMatching(/innodb_doublewrite is not known there/)])
  })
})

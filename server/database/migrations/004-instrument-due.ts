import type { Migration } from './migration'

/** When the calibration in force falls due, kept beside the instrument so that the register can be read in that order. */
export const instrumentDue: Migration = {
  name: '004-instrument-due',
  async up(database) {
    await database.query(
      'ALTER TABLE instruments ADD COLUMN IF NOT EXISTS due_on DATE NULL, ADD KEY IF NOT EXISTS instruments_due (shop_id, due_on, id)',
    )
    await database.query(
      `UPDATE instruments SET due_on = (
         SELECT due_on FROM calibrations
         WHERE calibrations.shop_id = instruments.shop_id AND calibrations.instrument_id = instruments.id
         ORDER BY calibrated_on DESC, created_at DESC, id DESC LIMIT 1)`,
    )
  },
  async down(database) {
    await database.query('ALTER TABLE instruments DROP KEY instruments_due, DROP COLUMN due_on')
  },
}

import { hash, id, tableOptions, word, type Migration } from './migration'

/** Photos and documents whose bytes are kept, by what they are; and the file of a calibration's certificate. */
export const attachments: Migration = {
  name: '005-attachments',
  async up(database) {
    await database.query(
      `CREATE TABLE IF NOT EXISTS attachments (
        shop_id ${id} NOT NULL,
        sha256 ${hash} NOT NULL,
        type ${word(40)} NOT NULL,
        size INT NOT NULL,
        stored_at DATETIME(3) NOT NULL,
        PRIMARY KEY (shop_id, sha256),
        CONSTRAINT attachments_shop_fk FOREIGN KEY (shop_id) REFERENCES shops (id)
      ) ${tableOptions}`,
    )
    // No foreign key to attachments: a file is named first and its bytes come after.
    await database.query(
      `ALTER TABLE calibrations
         ADD COLUMN IF NOT EXISTS file_sha256 ${hash} NULL,
         ADD COLUMN IF NOT EXISTS file_type ${word(40)} NULL,
         ADD COLUMN IF NOT EXISTS file_size INT NULL,
         ADD COLUMN IF NOT EXISTS file_name VARCHAR(120) NULL`,
    )
  },
  async down(database) {
    await database.query(
      'ALTER TABLE calibrations DROP COLUMN file_sha256, DROP COLUMN file_type, DROP COLUMN file_size, DROP COLUMN file_name',
    )
    await database.query('DROP TABLE IF EXISTS attachments')
  },
}

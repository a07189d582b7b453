import { id, tableOptions, tables, word } from './migration'

export const instrumentsAndProtocols = tables(
  '003-instruments-and-protocols',
  [
    `CREATE TABLE instruments (
      id ${id} NOT NULL,
      shop_id ${id} NOT NULL,
      code VARCHAR(40) NOT NULL,
      kind ${word(20)} NOT NULL,
      description VARCHAR(200) NOT NULL,
      details JSON NOT NULL,
      retired_at DATETIME(3) NULL,
      created_at DATETIME(3) NOT NULL,
      PRIMARY KEY (id),
      UNIQUE KEY instruments_shop (shop_id, id),
      UNIQUE KEY instruments_code (shop_id, code),
      KEY instruments_code_order (shop_id, code, id),
      KEY instruments_kind (shop_id, kind, id),
      CONSTRAINT instruments_shop_fk FOREIGN KEY (shop_id) REFERENCES shops (id),
      CONSTRAINT instruments_kind CHECK (kind IN ('gauge', 'load-cell', 'indicator'))
    ) ${tableOptions}`,
    `CREATE TABLE calibrations (
      id ${id} NOT NULL,
      shop_id ${id} NOT NULL,
      instrument_id ${id} NOT NULL,
      calibrated_on DATE NOT NULL,
      due_on DATE NOT NULL,
      certificate VARCHAR(120) NOT NULL,
      compared_with VARCHAR(200) NOT NULL,
      result ${word(30)} NOT NULL,
      details JSON NOT NULL,
      created_by ${id} NOT NULL,
      created_at DATETIME(3) NOT NULL,
      PRIMARY KEY (id),
      UNIQUE KEY calibrations_shop (shop_id, id),
      KEY calibrations_instrument (shop_id, instrument_id, calibrated_on, id),
      KEY calibrations_due (shop_id, due_on, id),
      CONSTRAINT calibrations_instrument_fk FOREIGN KEY (shop_id, instrument_id) REFERENCES instruments (shop_id, id),
      CONSTRAINT calibrations_created_by_fk FOREIGN KEY (created_by) REFERENCES users (id)
    ) ${tableOptions}`,
    `CREATE TABLE protocols (
      id ${id} NOT NULL,
      shop_id ${id} NOT NULL,
      name VARCHAR(120) NOT NULL,
      current_version INT NOT NULL,
      archived_at DATETIME(3) NULL,
      created_at DATETIME(3) NOT NULL,
      PRIMARY KEY (id),
      UNIQUE KEY protocols_shop (shop_id, id),
      KEY protocols_name (shop_id, name, id),
      CONSTRAINT protocols_shop_fk FOREIGN KEY (shop_id) REFERENCES shops (id)
    ) ${tableOptions}`,
    `CREATE TABLE protocol_versions (
      shop_id ${id} NOT NULL,
      protocol_id ${id} NOT NULL,
      version INT NOT NULL,
      content JSON NOT NULL,
      created_by ${id} NOT NULL,
      created_at DATETIME(3) NOT NULL,
      PRIMARY KEY (protocol_id, version),
      KEY protocol_versions_protocol (shop_id, protocol_id, version),
      CONSTRAINT protocol_versions_protocol_fk FOREIGN KEY (shop_id, protocol_id) REFERENCES protocols (shop_id, id),
      CONSTRAINT protocol_versions_created_by_fk FOREIGN KEY (created_by) REFERENCES users (id)
    ) ${tableOptions}`,
  ],
  ['instruments', 'calibrations', 'protocols', 'protocol_versions'],
)

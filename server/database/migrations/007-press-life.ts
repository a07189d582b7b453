import { hash, id, tableOptions, tables, word } from './migration'

/** Loose tooling with its own rating, the public codes of tags, and the addresses that calendar programs follow. */
export const pressLife = tables(
  '007-press-life',
  [
    `CREATE TABLE tooling (
      id ${id} NOT NULL,
      shop_id ${id} NOT NULL,
      code VARCHAR(40) NOT NULL,
      name VARCHAR(120) NOT NULL,
      details JSON NOT NULL,
      retired_at DATETIME(3) NULL,
      created_at DATETIME(3) NOT NULL,
      PRIMARY KEY (id),
      UNIQUE KEY tooling_shop (shop_id, id),
      UNIQUE KEY tooling_code (shop_id, code),
      KEY tooling_code_order (shop_id, code, id),
      CONSTRAINT tooling_shop_fk FOREIGN KEY (shop_id) REFERENCES shops (id)
    ) ${tableOptions}`,
    `CREATE TABLE tags (
      code ${word(16)} NOT NULL,
      shop_id ${id} NOT NULL,
      press_id ${id} NOT NULL,
      created_at DATETIME(3) NOT NULL,
      PRIMARY KEY (code),
      UNIQUE KEY tags_press (shop_id, press_id),
      CONSTRAINT tags_press_fk FOREIGN KEY (shop_id, press_id) REFERENCES ledgers (shop_id, id)
    ) ${tableOptions}`,
    `CREATE TABLE calendar_feeds (
      shop_id ${id} NOT NULL,
      user_id ${id} NOT NULL,
      token_hash ${hash} NOT NULL,
      created_at DATETIME(3) NOT NULL,
      PRIMARY KEY (shop_id, user_id),
      UNIQUE KEY calendar_feeds_token (token_hash),
      CONSTRAINT calendar_feeds_shop_fk FOREIGN KEY (shop_id) REFERENCES shops (id),
      CONSTRAINT calendar_feeds_user_fk FOREIGN KEY (user_id) REFERENCES users (id)
    ) ${tableOptions}`,
  ],
  ['tooling', 'tags', 'calendar_feeds'],
)

import { hash, id, tableOptions, tables, word } from './migration'

export const people = tables(
  '001-people',
  [
    `CREATE TABLE shops (
      id ${id} NOT NULL,
      name VARCHAR(120) NOT NULL,
      force_unit ${word(20)} NOT NULL,
      pressure_unit ${word(20)} NOT NULL,
      length_unit ${word(20)} NOT NULL,
      build_pause_days INT NOT NULL DEFAULT 30,
      walk_down_hours INT NOT NULL DEFAULT 12,
      created_at DATETIME(3) NOT NULL,
      PRIMARY KEY (id)
    ) ${tableOptions}`,
    `CREATE TABLE users (
      id ${id} NOT NULL,
      email VARCHAR(254) NOT NULL,
      name VARCHAR(120) NOT NULL,
      password_hash ${word(100)} NOT NULL,
      created_at DATETIME(3) NOT NULL,
      PRIMARY KEY (id),
      UNIQUE KEY users_email (email)
    ) ${tableOptions}`,
    `CREATE TABLE memberships (
      shop_id ${id} NOT NULL,
      user_id ${id} NOT NULL,
      role ${word(10)} NOT NULL,
      created_at DATETIME(3) NOT NULL,
      ended_at DATETIME(3) NULL,
      PRIMARY KEY (shop_id, user_id),
      KEY memberships_user (user_id),
      CONSTRAINT memberships_shop_fk FOREIGN KEY (shop_id) REFERENCES shops (id),
      CONSTRAINT memberships_user_fk FOREIGN KEY (user_id) REFERENCES users (id),
      CONSTRAINT memberships_role CHECK (role IN ('owner', 'lead', 'witness', 'crew'))
    ) ${tableOptions}`,
    `CREATE TABLE sessions (
      id ${id} NOT NULL,
      user_id ${id} NOT NULL,
      user_agent VARCHAR(200) NOT NULL,
      created_at DATETIME(3) NOT NULL,
      last_seen_at DATETIME(3) NOT NULL,
      expires_at DATETIME(3) NOT NULL,
      ended_at DATETIME(3) NULL,
      PRIMARY KEY (id),
      KEY sessions_user (user_id),
      CONSTRAINT sessions_user_fk FOREIGN KEY (user_id) REFERENCES users (id)
    ) ${tableOptions}`,
    `CREATE TABLE sign_in_attempts (
      id BIGINT NOT NULL AUTO_INCREMENT,
      account_key ${hash} NOT NULL,
      address ${word(64)} NOT NULL,
      attempted_at DATETIME(3) NOT NULL,
      PRIMARY KEY (id),
      KEY sign_in_attempts_account (account_key, attempted_at),
      KEY sign_in_attempts_address (address, attempted_at),
      KEY sign_in_attempts_time (attempted_at)
    ) ${tableOptions}`,
  ],
  ['shops', 'users', 'memberships', 'sessions', 'sign_in_attempts'],
)

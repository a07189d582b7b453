import { hash, id, tableOptions, tables, word } from './migration'

/** Letters to be sent, invitations, guests of one test, forgotten passwords, and jobs that one of several servers does. */
export const mailAndInvitations = tables(
  '008-mail-and-invitations',
  [
    // Letters about an account that belongs to several shops have none; nobody but the mail server reads them.
    `CREATE TABLE mail_messages (
      id ${id} NOT NULL,
      shop_id ${id} NULL,
      business_key ${word(190)} NOT NULL,
      kind ${word(40)} NOT NULL,
      user_id ${id} NULL,
      recipient VARCHAR(254) NOT NULL,
      subject VARCHAR(200) NOT NULL,
      text TEXT NOT NULL,
      html MEDIUMTEXT NOT NULL,
      secret ${word(64)} NULL,
      message_id ${word(200)} NULL,
      state ${word(10)} NOT NULL,
      attempts INT NOT NULL DEFAULT 0,
      lease_holder ${id} NULL,
      lease_until DATETIME(3) NULL,
      next_at DATETIME(3) NOT NULL,
      last_error VARCHAR(500) NULL,
      created_at DATETIME(3) NOT NULL,
      sent_at DATETIME(3) NULL,
      PRIMARY KEY (id),
      UNIQUE KEY mail_messages_business_key (business_key),
      KEY mail_messages_waiting (state, next_at),
      KEY mail_messages_order (shop_id, created_at, id),
      CONSTRAINT mail_messages_shop_fk FOREIGN KEY (shop_id) REFERENCES shops (id),
      CONSTRAINT mail_messages_user_fk FOREIGN KEY (user_id) REFERENCES users (id),
      CONSTRAINT mail_messages_state CHECK (state IN ('queued', 'sending', 'sent', 'dead'))
    ) ${tableOptions}`,
    `CREATE TABLE invitations (
      id ${id} NOT NULL,
      shop_id ${id} NOT NULL,
      kind ${word(10)} NOT NULL,
      email VARCHAR(254) NOT NULL,
      role ${word(10)} NULL,
      press_id ${id} NULL,
      token_hash ${hash} NOT NULL,
      invited_by ${id} NOT NULL,
      created_at DATETIME(3) NOT NULL,
      expires_at DATETIME(3) NOT NULL,
      accepted_at DATETIME(3) NULL,
      accepted_by ${id} NULL,
      revoked_at DATETIME(3) NULL,
      PRIMARY KEY (id),
      UNIQUE KEY invitations_shop (shop_id, id),
      UNIQUE KEY invitations_token (token_hash),
      KEY invitations_order (shop_id, created_at, id),
      CONSTRAINT invitations_shop_fk FOREIGN KEY (shop_id) REFERENCES shops (id),
      CONSTRAINT invitations_press_fk FOREIGN KEY (shop_id, press_id) REFERENCES ledgers (shop_id, id),
      CONSTRAINT invitations_by_fk FOREIGN KEY (invited_by) REFERENCES users (id),
      CONSTRAINT invitations_accepted_fk FOREIGN KEY (accepted_by) REFERENCES users (id),
      CONSTRAINT invitations_kind CHECK (
        (kind = 'member' AND role IN ('owner', 'lead', 'witness', 'crew') AND press_id IS NULL)
        OR (kind = 'witness' AND role IS NULL AND press_id IS NOT NULL)
      )
    ) ${tableOptions}`,
    `CREATE TABLE test_guests (
      id ${id} NOT NULL,
      shop_id ${id} NOT NULL,
      invitation_id ${id} NOT NULL,
      user_id ${id} NOT NULL,
      press_id ${id} NOT NULL,
      proof_test_id ${id} NULL,
      created_at DATETIME(3) NOT NULL,
      ended_at DATETIME(3) NULL,
      PRIMARY KEY (id),
      UNIQUE KEY test_guests_invitation (shop_id, invitation_id),
      UNIQUE KEY test_guests_test (shop_id, proof_test_id, user_id),
      KEY test_guests_user (user_id, shop_id),
      CONSTRAINT test_guests_invitation_fk FOREIGN KEY (shop_id, invitation_id) REFERENCES invitations (shop_id, id),
      CONSTRAINT test_guests_press_fk FOREIGN KEY (shop_id, press_id) REFERENCES ledgers (shop_id, id),
      CONSTRAINT test_guests_proof_test_fk FOREIGN KEY (shop_id, proof_test_id) REFERENCES ledgers (shop_id, id),
      CONSTRAINT test_guests_user_fk FOREIGN KEY (user_id) REFERENCES users (id)
    ) ${tableOptions}`,
    `CREATE TABLE password_resets (
      id ${id} NOT NULL,
      user_id ${id} NOT NULL,
      token_hash ${hash} NOT NULL,
      created_at DATETIME(3) NOT NULL,
      expires_at DATETIME(3) NOT NULL,
      used_at DATETIME(3) NULL,
      PRIMARY KEY (id),
      UNIQUE KEY password_resets_token (token_hash),
      KEY password_resets_user (user_id, created_at),
      CONSTRAINT password_resets_user_fk FOREIGN KEY (user_id) REFERENCES users (id)
    ) ${tableOptions}`,
    `CREATE TABLE jobs (
      name ${word(60)} NOT NULL,
      done_for DATE NULL,
      lease_holder ${id} NULL,
      lease_until DATETIME(3) NULL,
      PRIMARY KEY (name)
    ) ${tableOptions}`,
  ],
  ['mail_messages', 'invitations', 'test_guests', 'password_resets', 'jobs'],
)

import type { Sequelize } from 'sequelize'
import { ActiveTest, initActiveTest } from './active-test'
import { Attachment, initAttachment } from './attachment'
import { Calibration, initCalibration } from './calibration'
import { CalendarFeed, initCalendarFeed } from './calendar-feed'
import { Instrument, initInstrument } from './instrument'
import { Invitation, initInvitation } from './invitation'
import { Ledger, initLedger } from './ledger'
import { LedgerEntry, initLedgerEntry } from './ledger-entry'
import { MailMessage, initMailMessage } from './mail-message'
import { Membership, initMembership } from './membership'
import { PasswordReset, initPasswordReset } from './password-reset'
import { Press, initPress } from './press'
import { ProofTest, initProofTest } from './proof-test'
import { Protocol, initProtocol } from './protocol'
import { ProtocolVersion, initProtocolVersion } from './protocol-version'
import { Seal, initSeal } from './seal'
import { Session, initSession } from './session'
import { Shop, initShop } from './shop'
import { Tag, initTag } from './tag'
import { TestGuest, initTestGuest } from './test-guest'
import { Tooling, initTooling } from './tooling'
import { User, initUser } from './user'

export {
  ActiveTest,
  Attachment,
  CalendarFeed,
  Calibration,
  Instrument,
  Invitation,
  Ledger,
  LedgerEntry,
  MailMessage,
  Membership,
  PasswordReset,
  Press,
  ProofTest,
  Protocol,
  ProtocolVersion,
  Seal,
  Session,
  Shop,
  Tag,
  TestGuest,
  Tooling,
  User,
}

/** Binds every model to one connection. Relations are joined in queries, where they are seen. */
export function initModels(sequelize: Sequelize): void {
  initActiveTest(sequelize)
  initAttachment(sequelize)
  initCalendarFeed(sequelize)
  initCalibration(sequelize)
  initInstrument(sequelize)
  initInvitation(sequelize)
  initLedger(sequelize)
  initLedgerEntry(sequelize)
  initMailMessage(sequelize)
  initMembership(sequelize)
  initPasswordReset(sequelize)
  initPress(sequelize)
  initProofTest(sequelize)
  initProtocol(sequelize)
  initProtocolVersion(sequelize)
  initSeal(sequelize)
  initSession(sequelize)
  initShop(sequelize)
  initTag(sequelize)
  initTestGuest(sequelize)
  initTooling(sequelize)
  initUser(sequelize)
}

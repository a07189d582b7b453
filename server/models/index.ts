import type { Sequelize } from 'sequelize'
import { ActiveTest, initActiveTest } from './active-test'
import { Attachment, initAttachment } from './attachment'
import { Calibration, initCalibration } from './calibration'
import { CalendarFeed, initCalendarFeed } from './calendar-feed'
import { Instrument, initInstrument } from './instrument'
import { Ledger, initLedger } from './ledger'
import { LedgerEntry, initLedgerEntry } from './ledger-entry'
import { Membership, initMembership } from './membership'
import { Press, initPress } from './press'
import { ProofTest, initProofTest } from './proof-test'
import { Protocol, initProtocol } from './protocol'
import { ProtocolVersion, initProtocolVersion } from './protocol-version'
import { Seal, initSeal } from './seal'
import { Session, initSession } from './session'
import { Shop, initShop } from './shop'
import { Tag, initTag } from './tag'
import { Tooling, initTooling } from './tooling'
import { User, initUser } from './user'

export {
  ActiveTest,
  Attachment,
  CalendarFeed,
  Calibration,
  Instrument,
  Ledger,
  LedgerEntry,
  Membership,
  Press,
  ProofTest,
  Protocol,
  ProtocolVersion,
  Seal,
  Session,
  Shop,
  Tag,
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
  initLedger(sequelize)
  initLedgerEntry(sequelize)
  initMembership(sequelize)
  initPress(sequelize)
  initProofTest(sequelize)
  initProtocol(sequelize)
  initProtocolVersion(sequelize)
  initSeal(sequelize)
  initSession(sequelize)
  initShop(sequelize)
  initTag(sequelize)
  initTooling(sequelize)
  initUser(sequelize)
}

import type { Sequelize } from 'sequelize'
import { ActiveTest, initActiveTest } from './active-test'
import { Attachment, initAttachment } from './attachment'
import { Calibration, initCalibration } from './calibration'
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
import { User, initUser } from './user'

export {
  ActiveTest,
  Attachment,
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
  User,
}

/** Binds every model to one connection. Relations are joined in queries, where they are seen. */
export function initModels(sequelize: Sequelize): void {
  initActiveTest(sequelize)
  initAttachment(sequelize)
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
  initUser(sequelize)
}

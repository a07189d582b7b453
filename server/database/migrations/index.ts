import { people } from './001-people'
import { ledgers } from './002-ledgers'
import { instrumentsAndProtocols } from './003-instruments-and-protocols'
import { instrumentDue } from './004-instrument-due'
import { attachments } from './005-attachments'
import { pressLife } from './007-press-life'
import { mailAndInvitations } from './008-mail-and-invitations'
import type { Migration } from './migration'

/** In the order they run. */
export const migrations: Migration[] = [people, ledgers, instrumentsAndProtocols, instrumentDue, attachments, pressLife, mailAndInvitations]

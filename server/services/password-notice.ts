import { passwordChanged } from '../mail/account-letters'
import { queueMail, type Queueing } from '../mail/queue'
import { onlyShopOf } from '../mail/recipients'

/** Tells the account's address that its password was changed, in the transaction that changes it. */
export async function tellOfPassword(
  queueing: Queueing,
  person: { id: string; name: string; email: string },
  changeId: string,
  how: 'changed' | 'reset',
): Promise<void> {
  await queueMail(queueing, {
    kind: 'password-changed',
    shopId: await onlyShopOf(person.id, queueing.transaction),
    key: changeId,
    to: { userId: person.id, email: person.email },
    letter: passwordChanged(person.name, queueing.now, how),
  })
}

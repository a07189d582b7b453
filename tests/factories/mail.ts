import { mailListSchema, mailResponseSchema, type MailKind, type MailResponse } from '#shared/api/mail'
import type { SignedInPerson } from './people'

/** The letters of a shop as its owner reads them, the newest first. */
export async function lettersOf(owner: SignedInPerson, kind?: MailKind): Promise<MailResponse['mail'][]> {
  const { mail } = mailListSchema.parse((await owner.client.get(`/api/mail?shop=${owner.shopId}`).expect(200)).body)
  const wanted = mail.filter((one) => kind === undefined || one.kind === kind)
  return Promise.all(
    wanted.map(async ({ id }) => mailResponseSchema.parse((await owner.client.get(`/api/mail/${id}`).expect(200)).body).mail),
  )
}

/** The secret of the link in a letter. */
export function tokenIn(letter: { text: string } | undefined): string {
  const found = /\/(?:invitation|new-password)\/([\w-]{43})/.exec(letter?.text ?? '')?.[1]
  if (found === undefined) throw new Error(`No link in this letter:\n${letter?.text ?? 'there is none'}`)
  return found
}

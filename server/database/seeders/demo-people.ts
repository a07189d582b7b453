import { addPersonRequestSchema } from '#shared/api/people'
import type { Role } from '#shared/policy'
import type { AppContext } from '../../context'
import { User } from '../../models'
import { accountFor, addPerson } from '../../services/people'
import { comparePassword } from '../../services/passwords'
import { foundShop } from '../../services/shops'
import { daysBefore, workAt, type Desk } from './desk'

/** Everybody of the demo has this one: it is printed at the start, and hashed once. */
export const DEMO_PASSWORD = 'quarter by quarter'

export interface DemoSignIn {
  name: string
  email: string
  password: string
  /** "lead of Saltmarsh Lane Metalworks". */
  role: string
}

const SHOPS = { main: 'Saltmarsh Lane Metalworks', second: 'Upper Weir Repairs' } as const

interface DemoPerson {
  name: string
  email: string
  main: Role
  second?: Role
}

/** Invented people; the addresses can't belong to anybody (RFC 2606). */
const PEOPLE = {
  owner: { name: 'Ottilie Brask', email: 'ottilie@saltmarsh.example', main: 'owner', second: 'owner' },
  lead: { name: 'Dessa Mallory', email: 'dessa@saltmarsh.example', main: 'lead' },
  secondLead: { name: 'Ruben Ashby', email: 'ruben@saltmarsh.example', main: 'lead' },
  witness: { name: 'Ines Calloway', email: 'ines@saltmarsh.example', main: 'witness', second: 'witness' },
  secondWitness: { name: 'Gil Farrow', email: 'gil@saltmarsh.example', main: 'witness' },
  crew: { name: 'Noor Hassett', email: 'noor@saltmarsh.example', main: 'crew' },
} as const satisfies Record<string, DemoPerson>

export type PersonKey = keyof typeof PEOPLE
export const nameOf = (key: PersonKey): string => PEOPLE[key].name

export interface DemoShops {
  main: string
  second: string
  people: Readonly<Record<PersonKey, string>>
}

const keys = Object.keys(PEOPLE) as PersonKey[]
const rolesOf = (person: DemoPerson): { shop: keyof typeof SHOPS; role: Role }[] => [
  { shop: 'main', role: person.main },
  ...(person.second ? [{ shop: 'second' as const, role: person.second }] : []),
]

/** Opens both shops and adds everybody to them. */
export async function foundDemoShops(desk: Desk, passwordHash: string): Promise<DemoShops> {
  const { transaction } = desk
  const founding = { transaction, now: new Date(daysBefore(desk, 420, '13:05')) }
  const owner = await accountFor(founding, PEOPLE.owner, passwordHash)
  const main = await foundShop(founding, owner.id, { shopName: SHOPS.main, forceUnit: 'short-ton', pressureUnit: 'psi', lengthUnit: 'mm' })
  const later = { transaction, now: new Date(daysBefore(desk, 88, '15:40')) }
  const second = await foundShop(later, owner.id, {
    shopName: SHOPS.second,
    forceUnit: 'metric-ton-force',
    pressureUnit: 'bar',
    lengthUnit: 'mm',
  })
  const people = { owner: owner.id } as Record<PersonKey, string>
  const ids = { main, second }
  const dayOfAdding = { main: 419, second: 87 }
  for (const key of keys) {
    if (key === 'owner') continue
    const { name, email } = PEOPLE[key]
    for (const { shop, role } of rolesOf(PEOPLE[key])) {
      const { password: _password, ...person } = addPersonRequestSchema.parse({ name, email, role, password: DEMO_PASSWORD })
      const work = await workAt(desk, ids[shop], owner.id, daysBefore(desk, dayOfAdding[shop], '13:20'))
      people[key] = (await addPerson(work, person, passwordHash)).user.id
    }
  }
  return { main, second, people }
}

/** Those of the demo who can still sign in with the printed password: nothing is said that no longer holds. */
export async function standingSignIns({ config }: Pick<AppContext, 'config'>): Promise<DemoSignIn[]> {
  const users = await User.findAll({
    where: { email: keys.map((key) => PEOPLE[key].email) },
    attributes: ['email', 'passwordHash'],
    raw: true,
  })
  const open = new Map<string, boolean>()
  for (const hash of new Set(users.map((user) => user.passwordHash))) {
    open.set(hash, await comparePassword(DEMO_PASSWORD, hash, config.bcryptCost))
  }
  return keys.flatMap((key): DemoSignIn[] => {
    const person = PEOPLE[key]
    const hash = users.find((user) => user.email === person.email)?.passwordHash
    if (hash === undefined || open.get(hash) !== true) return []
    const role = rolesOf(person)
      .map((one) => `${one.role} of ${SHOPS[one.shop]}`)
      .join(', ')
    return [{ name: person.name, email: person.email, password: DEMO_PASSWORD, role }]
  })
}

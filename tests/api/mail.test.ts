import { randomUUID } from 'node:crypto'
import { QueryTypes } from 'sequelize'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { onceToday } from '#server/jobs/daily'
import { openDelivery, type Delivery } from '#server/mail/delivery'
import { writeLetter } from '#server/mail/letter'
import { queueMail } from '#server/mail/queue'
import { MOST_ATTEMPTS, sendDueMail, waitAfter } from '#server/mail/worker'
import { MailMessage } from '#server/models/index'
import { tellWhatIsDue } from '#server/services/due-notices'
import { calibration, enterInstrument, gauge } from '../factories/instruments'
import { lettersOf } from '../factories/mail'
import { openShop, type SignedInPerson } from '../factories/people'
import { testServer } from '../support/api-server'
import { startMailServer, type MailServer } from '../support/mail-server'

const origin = 'https://press.example'
const letter = {
  subject: 'Zürich: “Old Bess” – cleared',
  blocks: [
    { say: 'Grüße. Load 5 < 6 & more.' },
    { facts: [['Record', 'PT-0001']] as const },
    { go: 'Look', to: '/invitation', secret: true },
  ],
  why: 'It came because of a test.',
}

async function queued(owner: SignedInPerson, key: string = randomUUID(), secret?: string): Promise<void> {
  const { database, now } = testServer().context
  await database.transaction((transaction) =>
    queueMail(
      { database, transaction, now: now() },
      { kind: 'invitation', shopId: owner.shopId, key, to: { userId: null, email: owner.email }, letter, secret },
    ),
  )
}

const rowsOf = (owner: SignedInPerson) => MailMessage.findAll({ where: { shopId: owner.shopId }, order: ['createdAt'], raw: true })
const work = (delivery: Delivery) => sendDueMail(testServer().context, delivery, origin)

let mailServer: MailServer
const deliveries: Record<'tray' | 'SMTP', () => Delivery> = {
  tray: () => openDelivery({ mail: undefined }),
  SMTP: () => openDelivery({ mail: { url: mailServer.url, from: 'Quarterload <press@shop.example>' } }),
}

beforeAll(async () => {
  mailServer = await startMailServer()
})
afterAll(() => mailServer.close())
beforeEach(async () => {
  mailServer.mood = 'take'
  mailServer.received.length = 0
  // What other tests of this worker queued.
  await MailMessage.update({ state: 'sent' }, { where: { state: ['queued', 'sending'] } })
})

describe.each(['tray', 'SMTP'] as const)('letters by %s', (way) => {
  it('are queued with what causes them, or not at all', async () => {
    const owner = await openShop()
    const { database, now } = testServer().context
    const failing = database.transaction(async (transaction) => {
      const to = { userId: null, email: owner.email }
      await queueMail({ database, transaction, now: now() }, { kind: 'invitation', shopId: owner.shopId, key: 'never', to, letter })
      throw new Error('The act failed.')
    })
    await expect(failing).rejects.toThrow('The act failed.')
    expect(await rowsOf(owner)).toEqual([])
  })

  it('are sent once, and kept under a Message-ID', async () => {
    const owner = await openShop()
    const delivery = deliveries[way]()
    await queued(owner)
    expect(await work(delivery)).toBe(1)
    expect(await work(delivery)).toBe(0)
    const [kept] = await rowsOf(owner)
    expect(kept).toMatchObject({ state: 'sent', attempts: 1, lastError: null })
    expect(kept?.messageId).toBe(`<${kept?.id}@${delivery.domain}>`)
    delivery.close()
  })

  it('say the same in text and HTML, with whole addresses', async () => {
    const owner = await openShop()
    const delivery = deliveries[way]()
    await queued(owner, randomUUID(), 'the-secret-of-the-link')
    await work(delivery)
    const [shown] = await lettersOf(owner)
    const sent = way === 'tray' ? `${shown?.text}${shown?.html}` : (mailServer.received[0]?.raw ?? '')
    const unfolded = sent.replace(/=\r?\n/g, '').replace(/=3D/g, '=')
    expect(unfolded.match(/\/invitation\/the-secret-of-the-link/g)?.length).toBeGreaterThanOrEqual(2)
    expect(unfolded).toContain('PT-0001')
    if (way === 'SMTP') {
      expect(unfolded).toContain(`${origin}/invitation/`)
      expect(unfolded).toMatch(/^Auto-Submitted: auto-generated/m)
      expect(unfolded).toMatch(/^From: Quarterload <press@shop.example>/m)
      expect(mailServer.received[0]?.to).toEqual([owner.email])
    }
    expect(unfolded).not.toMatch(/<img|<script|src=/i)
    delivery.close()
  })

  it('of one thing to one person are one, however often it is queued', async () => {
    const owner = await openShop()
    const key = randomUUID()
    for (let count = 0; count < 3; count += 1) await queued(owner, key)
    const delivery = deliveries[way]()
    expect(await work(delivery)).toBe(1)
    delivery.close()
  })

  it('are shared by several servers, none sent twice and none left', async () => {
    const owner = await openShop()
    for (let count = 0; count < 24; count += 1) await queued(owner)
    const servers = [deliveries[way](), deliveries[way](), deliveries[way]()]
    const counts = await Promise.all(servers.map(work))
    expect(counts.reduce((sum, count) => sum + count, 0)).toBe(24)
    const rows = await rowsOf(owner)
    expect(rows.every((row) => row.state === 'sent' && row.attempts === 1)).toBe(true)
    if (way === 'SMTP') expect(new Set(mailServer.received.map(({ messageId }) => messageId)).size).toBe(24)
    for (const server of servers) server.close()
  })

  it('whose server was not heard of again are sent by another once the lease is over, under the same Message-ID', async () => {
    const owner = await openShop()
    await queued(owner)
    const lost: Delivery = { ...deliveries[way](), deliver: () => new Promise(() => undefined) }
    void work(lost)
    await expect.poll(async () => (await rowsOf(owner))[0]?.state).toBe('sending')
    const [before] = await rowsOf(owner)
    const delivery = deliveries[way]()
    expect(await work(delivery)).toBe(0)
    testServer().moveClock(testServer().context.config.mailLeaseMilliseconds + 1000)
    expect(await work(delivery)).toBe(1)
    const [after] = await rowsOf(owner)
    expect(after).toMatchObject({ state: 'sent', attempts: 2, messageId: before?.messageId })
    delivery.close()
    lost.close()
  })
})

describe('a mail server', () => {
  it('that is away is tried again, later and later, until the letter is given up; the owner has it tried once more', async () => {
    const owner = await openShop()
    const delivery = deliveries.SMTP()
    mailServer.mood = 'refuse for now'
    await queued(owner)
    for (let attempt = 1; attempt <= MOST_ATTEMPTS; attempt += 1) {
      expect(await work(delivery)).toBe(1)
      expect(await work(delivery)).toBe(0)
      testServer().moveClock(3 * 3_600_000)
    }
    const [dead] = await lettersOf(owner)
    expect(dead).toMatchObject({ state: 'dead', attempts: MOST_ATTEMPTS })
    expect(dead?.lastError).toMatch(/Come back later/)
    mailServer.mood = 'take'
    expect(await work(delivery)).toBe(0)
    await owner.client.post(`/api/mail/${dead?.id}/retry`).expect(200)
    expect(await work(delivery)).toBe(1)
    expect((await lettersOf(owner))[0]).toMatchObject({ state: 'sent', messageId: dead?.messageId })
    await owner.client.post(`/api/mail/${dead?.id}/retry`).expect(409)
    delivery.close()
  })

  it('that refuses an address for good is not asked again', async () => {
    const owner = await openShop()
    const delivery = deliveries.SMTP()
    mailServer.mood = 'refuse for good'
    await queued(owner)
    await work(delivery)
    expect((await lettersOf(owner))[0]).toMatchObject({ state: 'dead', attempts: 1 })
    delivery.close()
  })

  it('has the link; afterwards it is nowhere here', async () => {
    const owner = await openShop()
    const delivery = deliveries.SMTP()
    await queued(owner, randomUUID(), 'the-secret-of-the-link')
    await work(delivery)
    const { database } = testServer().context
    const rows = await database.query('SELECT * FROM mail_messages WHERE shop_id = ?', {
      replacements: [owner.shopId],
      type: QueryTypes.SELECT,
    })
    expect(JSON.stringify(rows)).not.toContain('the-secret-of-the-link')
    delivery.close()
  })
})

describe('a letter', () => {
  it('waits longer after each try, never quite the same', () => {
    const waits = [1, 2, 3, 4, 5, 6, 7].map((attempts) => waitAfter(attempts, 0.5))
    expect(waits).toEqual([...waits].sort((a, b) => a - b))
    expect(waitAfter(3, 0)).toBeLessThan(waitAfter(3, 1))
  })

  it('takes no header, tag or link from what somebody typed', () => {
    const { subject, text, html } = writeLetter({
      subject: 'Bess\r\nBcc: all@shop.example',
      blocks: [{ say: '<a href="https://elsewhere.example">x</a>\u0001\u0002' }],
      why: '<script>1</script>',
    })
    expect(subject).toBe('Bess Bcc: all@shop.example')
    expect(html).not.toMatch(/<a |<script/)
    expect(`${text}${html}`).not.toMatch(/[\u0001\u0002]/)
  })
})

describe('what falls due', () => {
  it('is told once to owner and leads when it is near, and once when it is over', async () => {
    const owner = await openShop()
    const day = (offset: number) => new Date(Date.now() + offset * 86_400_000).toISOString().slice(0, 10)
    const { instrument } = await enterInstrument(owner, gauge({ code: 'G-77' }), [calibration({ calibratedOn: day(-345), dueOn: day(20) })])
    const { context } = testServer()
    for (let count = 0; count < 2; count += 1) await tellWhatIsDue(context, day(0))
    const soon = await lettersOf(owner, 'due-soon')
    expect(soon.map(({ subject, to }) => [subject.slice(0, 24), to])).toEqual([['G-77: calibration is due', owner.email]])
    expect(soon[0]?.text).toContain(`/instruments/${instrument.id}`)
    for (const offset of [21, 22, 30]) await tellWhatIsDue(context, day(offset))
    expect((await lettersOf(owner, 'overdue')).map(({ subject }) => subject)).toEqual(['G-77: calibration is overdue'])
    expect((await lettersOf(owner, 'due-soon')).length).toBe(1)
  })

  it('is looked for by one of several servers, once a day, and again by another when that one fails', async () => {
    const { context } = testServer()
    const name = `test ${randomUUID()}`.slice(0, 40)
    const days: string[] = []
    await expect(onceToday(context, name, () => Promise.reject(new Error('Lost on the way.')))).rejects.toThrow('Lost on the way.')
    const took = await Promise.all(
      [1, 2, 3].map(() =>
        onceToday(context, name, (day) => {
          days.push(day)
          return Promise.resolve()
        }),
      ),
    )
    expect(took.filter(Boolean).length).toBe(1)
    expect(days.length).toBe(1)
    testServer().moveClock(86_400_000)
    expect(await onceToday(context, name, () => Promise.resolve())).toBe(true)
  })
})

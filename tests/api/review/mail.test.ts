import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { startFakeMail, type FakeMail } from '../../../fakes/mail/startFakeMail'
import { queueMessage } from '../../../server/db/commands/queueMessage'
import { RETRY_AFTER_S, sendWaitingMessages } from '../../../server/db/commands/sendWaitingMessages'
import { reviewOrganisation } from '../../../server/db/commands/reviewOrganisation'
import { newId } from '../../../server/utils/newId'
import { createMailer, type Mailer } from '../../../server/utils/mailer'
import { addItem, addSurvey, emailOf, inventHome, openDatabase } from './inventHome'

let opened: Awaited<ReturnType<typeof openDatabase>>
let mail: FakeMail
let mailer: Mailer

beforeAll(async () => {
  opened = await openDatabase()
  mail = await startFakeMail()
})
// A mailer of its own for each test: a kept connection would not meet a server that only hangs at the greeting.
beforeEach(() => {
  mailer = createMailer(mail.smtpUrl, 'Lathkey <post@lathkey.example>', { connectionTimeout: 1_000, greetingTimeout: 1_000, socketTimeout: 1_000 })
})
afterEach(async () => {
  mailer.close()
  mail.setMode('accept')
  mail.clear()
  delete process.env.LATHKEY_CLOCK_OFFSET_MS
  await opened.db.updateTable('message').set({ state: 'sent' }).where('state', '=', 'queued').execute()
})
afterAll(async () => {
  await mail.close()
  await opened.drop()
})

const passSeconds = (seconds: number) => { process.env.LATHKEY_CLOCK_OFFSET_MS = String(Number(process.env.LATHKEY_CLOCK_OFFSET_MS ?? 0) + seconds * 1000) }
const rowOf = (id: string) => opened.db.selectFrom('message').selectAll().where('id', '=', id).executeTakeFirstOrThrow()

async function queue(toAddress = `${newId()}@plumbline.example`, userId: string | null = null) {
  const id = await opened.db.transaction().execute(trx => queueMessage(trx, {
    organisationId: null, userId, kind: 'invitation', mailClass: 'account', toAddress, dedupeKey: newId(),
    content: { subject: 'Come and see', heading: 'You are invited', paragraphs: ['Żółć, naïve façade.'], footer: ['You get this because somebody invited you.'] },
  }))
  return { id: id!, toAddress }
}

describe('sending what waits', () => {
  it('delivers text and HTML from our address with a stable id, once', async () => {
    const { id, toAddress } = await queue()
    expect(await sendWaitingMessages(opened.db, mailer)).toEqual({ sent: 1, delayed: 0, failed: 0 })
    expect(await sendWaitingMessages(opened.db, mailer)).toEqual({ sent: 0, delayed: 0, failed: 0 })
    const [message, ...more] = mail.messagesTo(toAddress)
    expect(more).toEqual([])
    expect(message).toMatchObject({ subject: 'Come and see', from: expect.stringContaining('post@lathkey.example') })
    expect(message!.text).toContain('Żółć, naïve façade.')
    expect(message!.html).toContain('Żółć, naïve façade.')
    expect(message!.headers.find(header => header.name === 'message-id')?.value).toBe(`<${id}@lathkey.example>`)
    expect(await rowOf(id)).toMatchObject({ state: 'sent', attempts: 1, lastError: null, sentAt: expect.any(String) })
  })

  it('writes one message for one cause, however often it is queued', async () => {
    const dedupeKey = newId()
    const once = () => opened.db.transaction().execute(trx => queueMessage(trx, {
      organisationId: null, userId: null, kind: 'digest', mailClass: 'habit', toAddress: 'twice@plumbline.example', dedupeKey,
      content: { subject: 'One', heading: 'One', paragraphs: [], footer: [] },
    }))
    const ids = await Promise.all([once(), once(), once()])
    expect(ids.filter(id => id !== undefined)).toHaveLength(1)
  })

  it('takes nothing along from a transaction that is rolled back', async () => {
    const before = await opened.db.selectFrom('message').select('id').execute()
    await expect(opened.db.transaction().execute(async (trx) => {
      await queueMessage(trx, { organisationId: null, userId: null, kind: 'digest', mailClass: 'habit', toAddress: 'never@plumbline.example', dedupeKey: newId(), content: { subject: 'Never', heading: 'Never', paragraphs: [], footer: [] } })
      throw new Error('the cause was refused')
    })).rejects.toThrow('the cause was refused')
    expect(await opened.db.selectFrom('message').select('id').execute()).toEqual(before)
  })

  it('tries again later when the mail server refuses for now, and loses nothing', async () => {
    mail.setMode('refuse')
    const { id, toAddress } = await queue()
    expect(await sendWaitingMessages(opened.db, mailer)).toEqual({ sent: 0, delayed: 1, failed: 0 })
    expect(await rowOf(id)).toMatchObject({ state: 'queued', attempts: 1, lastError: expect.stringMatching(/\d{3}/) })
    mail.setMode('accept')
    expect(await sendWaitingMessages(opened.db, mailer)).toEqual({ sent: 0, delayed: 0, failed: 0 })
    passSeconds(RETRY_AFTER_S[0] + 1)
    expect(await sendWaitingMessages(opened.db, mailer)).toEqual({ sent: 1, delayed: 0, failed: 0 })
    expect(mail.messagesTo(toAddress)).toHaveLength(1)
  })

  it.each(['hang', 'drop'] as const)('keeps the message when the mail server does this: %s', async (mode) => {
    mail.setMode(mode)
    const { id, toAddress } = await queue()
    expect(await sendWaitingMessages(opened.db, mailer)).toMatchObject({ sent: 0, failed: 0 })
    expect(await rowOf(id)).toMatchObject({ state: 'queued' })
    mail.setMode('accept')
    passSeconds(RETRY_AFTER_S[0] + 1)
    expect(await sendWaitingMessages(opened.db, mailer)).toMatchObject({ sent: 1 })
    // What was cut off after its last byte comes again with the same id, so that a mailbox can tell it is one.
    const ids = mail.messagesTo(toAddress).map(message => message.headers.find(header => header.name === 'message-id')?.value)
    expect(new Set(ids)).toEqual(new Set([`<${id}@lathkey.example>`]))
  })

  it('gives up on an address that is refused for good, says why, and remembers it until mail is taken again', async () => {
    const home = await inventHome(opened.db)
    const toAddress = await emailOf(opened.db, home.owner)
    mail.setMode('bounce')
    const { id } = await queue(toAddress, home.owner)
    expect(await sendWaitingMessages(opened.db, mailer)).toEqual({ sent: 0, delayed: 0, failed: 1 })
    expect(await rowOf(id)).toMatchObject({ state: 'failed', lastError: expect.stringContaining('550') })
    const refusedAt = async () => (await opened.db.selectFrom('appUser').select('mailRefusedAt').where('id', '=', home.owner).executeTakeFirstOrThrow()).mailRefusedAt
    expect(await refusedAt()).toEqual(expect.any(String))
    mail.setMode('accept')
    await queue(toAddress, home.owner)
    await sendWaitingMessages(opened.db, mailer)
    expect(await refusedAt()).toBeNull()
  })

  it('has failed after the last try of a day and a quarter, with the reason', async () => {
    mail.setMode('refuse')
    const { id } = await queue()
    for (let n = 0; n <= RETRY_AFTER_S.length; n += 1) {
      await sendWaitingMessages(opened.db, mailer)
      passSeconds((RETRY_AFTER_S[n] ?? 0) + 1)
    }
    expect(await rowOf(id)).toMatchObject({ state: 'failed', attempts: RETRY_AFTER_S.length + 1, lastError: expect.any(String) })
  })

  it('sends each message once when several servers send together', async () => {
    const queued = await Promise.all(Array.from({ length: 12 }, () => queue()))
    const counts = await Promise.all([1, 2, 3].map(() => sendWaitingMessages(opened.db, mailer)))
    expect(counts.reduce((sum, count) => sum + count.sent, 0)).toBe(12)
    for (const { toAddress } of queued) expect(mail.messagesTo(toAddress)).toHaveLength(1)
  })
})

describe('the digest in the mailbox', () => {
  it('reaches each person exactly once though the review ran twice and the mail server was away', async () => {
    const home = await inventHome(opened.db)
    await addSurvey(opened.db, home)
    await addItem(opened.db, home, 4000)
    mail.setMode('refuse')
    await reviewOrganisation(opened.db, home.organisationId)
    await sendWaitingMessages(opened.db, mailer)
    mail.setMode('accept')
    await reviewOrganisation(opened.db, home.organisationId, { askedBy: home.owner })
    for (let n = 0; n < 3; n += 1) {
      passSeconds(RETRY_AFTER_S[1] + 1)
      await sendWaitingMessages(opened.db, mailer)
    }
    for (const person of [home.owner, home.manager]) {
      const digests = mail.messagesTo(await emailOf(opened.db, person)).filter(message => /need/.test(message.subject))
      expect(digests).toHaveLength(1)
      expect(digests[0]!.html).toContain('Attic near its rating')
      expect(Buffer.byteLength(digests[0]!.html)).toBeLessThan(100_000)
    }
    expect(mail.messagesTo(await emailOf(opened.db, home.tenant))).toEqual([])
  })
})

import { mkdtempSync, rmSync } from 'node:fs'
import { createServer } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { createTransport } from 'nodemailer'
import { afterEach, beforeEach, expect, test } from 'vitest'
import { startFakeMail, type FakeMail } from '../../fakes/mail/startFakeMail'

let mail: FakeMail
beforeEach(async () => {
  mail = await startFakeMail()
})
afterEach(() => mail.close())

const letter = {
  from: 'Lathkey <post@lathkey.example>', to: 'tess@tenants.example', subject: 'Prüfung: "½ in" <b>bold</b>',
  text: 'Read it at https://lathkey.example/marks/7?a=1&b=2.', html: '<p>Read <a href="https://lathkey.example/marks/7">it</a></p>',
}

function send(changes: object = {}, timeoutMs = 2_000) {
  const { hostname, port } = new URL(mail.smtpUrl)
  const transport = createTransport({ host: hostname, port: Number(port), connectionTimeout: timeoutMs, greetingTimeout: timeoutMs, socketTimeout: timeoutMs })
  return transport.sendMail({ ...letter, ...changes }).finally(() => transport.close())
}

test('a message arrives whole: envelope, subject, both parts, headers', async () => {
  const sent = await send({ headers: { 'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click' }, attachments: [{ filename: 'plan.txt', content: 'attic' }] })
  expect(sent.response).toMatch(/^250/)
  expect(mail.messages()).toHaveLength(1)
  expect(mail.messages()[0]).toMatchObject({
    sender: 'post@lathkey.example', recipients: ['tess@tenants.example'], acknowledged: true, subject: letter.subject,
    attachments: [{ filename: 'plan.txt', contentType: 'text/plain', sizeBytes: 5 }],
  })
  const [message] = mail.messages()
  expect(message?.text.trim()).toBe(letter.text)
  expect(message?.html).toContain('href="https://lathkey.example/marks/7"')
  expect(message?.headers).toContainEqual({ name: 'list-unsubscribe-post', value: 'List-Unsubscribe=One-Click' })
})

test('what was sent can be waited for by address and subject', async () => {
  const waiting = mail.waitForMessage('TESS@tenants.example', { subject: /second/ })
  await send({ subject: 'the first' })
  await send({ subject: 'the second' })
  expect((await waiting).subject).toBe('the second')
  await expect(mail.waitForMessage('nobody@tenants.example', { timeoutMs: 60 })).rejects.toThrow('No mail to nobody@tenants.example')
})

test('refuse: the server turns everybody away for now', async () => {
  mail.setMode('refuse')
  await expect(send()).rejects.toMatchObject({ responseCode: 421 })
  expect(mail.messages()).toEqual([])
})

test('refuse and bounce can be meant for one address among several', async () => {
  mail.setMode('refuse', { recipients: ['Tess@tenants.example'] })
  await expect(send()).rejects.toMatchObject({ responseCode: 451 })
  mail.setMode('bounce', { recipients: ['tess@tenants.example'] })
  await expect(send()).rejects.toMatchObject({ responseCode: 550 })
  const { accepted, rejected } = await send({ to: ['tess@tenants.example', 'omar@owners.example'] })
  expect([accepted, rejected]).toEqual([['omar@owners.example'], ['tess@tenants.example']])
})

test('bounce: no mailbox exists', async () => {
  mail.setMode('bounce')
  await expect(send()).rejects.toMatchObject({ responseCode: 550 })
})

test('hang: the line opens and nothing is said, until the sender gives up', async () => {
  mail.setMode('hang')
  await expect(send({}, 200)).rejects.toMatchObject({ code: 'ETIMEDOUT' })
  expect(mail.messages()).toEqual([])
})

test('drop: the message is there, and the sender cannot know', async () => {
  mail.setMode('drop')
  await expect(send()).rejects.toThrow()
  expect(mail.messages()).toMatchObject([{ acknowledged: false, subject: letter.subject }])
})

test('slow: the answer comes late, and the mode ends when set back', async () => {
  mail.setMode('slow', { slowMs: 120 })
  const startedAt = performance.now()
  await send()
  expect(performance.now() - startedAt).toBeGreaterThan(330)
  mail.setMode('accept')
  await send()
  expect(mail.messages()).toHaveLength(2)
})

test('closing frees both ports, also with a sender left hanging', async () => {
  mail.setMode('hang')
  const hanging = send({}, 5_000).catch(() => 'given up')
  await new Promise(resolve => setTimeout(resolve, 50))
  await mail.close()
  expect(await hanging).toBe('given up')
  const port = Number(new URL(mail.smtpUrl).port)
  const server = createServer()
  await new Promise<void>((resolve, reject) => server.once('error', reject).listen(port, '127.0.0.1', resolve))
  await new Promise(resolve => server.close(resolve))
  mail = await startFakeMail()
})

test('with a folder, mail survives a restart and stays in order', async () => {
  const folder = mkdtempSync(join(tmpdir(), 'lathkey-mail-'))
  try {
    await mail.close()
    mail = await startFakeMail({ folder })
    await send({ subject: 'one' })
    await mail.close()
    mail = await startFakeMail({ folder })
    await send({ subject: 'two' })
    expect(mail.messages().map(({ id, subject }) => `${id} ${subject}`)).toEqual(['000001 one', '000002 two'])
    mail.clear()
    await mail.close()
    mail = await startFakeMail({ folder })
    expect(mail.messages()).toEqual([])
  }
  finally {
    rmSync(folder, { recursive: true, force: true })
  }
})

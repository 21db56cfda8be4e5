import { createTransport } from 'nodemailer'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { startFakeMail, type FakeMail } from '../../fakes/mail/startFakeMail'

let mail: FakeMail
beforeAll(async () => {
  mail = await startFakeMail()
  const transport = createTransport(mail.smtpUrl)
  await transport.sendMail({
    from: 'post@lathkey.example', to: 'tess@tenants.example', subject: 'A <script>alert(1)</script> mark',
    text: 'Go to https://lathkey.example/marks/7?a=1&b=2.', html: '<p>Hello <script>parent.alert(1)</script></p>',
  })
  await transport.sendMail({ from: 'post@lathkey.example', to: 'omar@owners.example', subject: 'For Omar', text: 'Plain only' })
  transport.close()
})
afterAll(() => mail.close())

async function read(path: string) {
  const answer = await fetch(mail.inboxUrl + path)
  return { status: answer.status, policy: answer.headers.get('content-security-policy') ?? '', type: answer.headers.get('content-type') ?? '', text: await answer.text() }
}

test('the list shows every message, newest first, and what was typed into a subject stays text', async () => {
  const { status, text, policy } = await read('/')
  expect(status).toBe(200)
  expect(text.indexOf('For Omar')).toBeGreaterThan(0)
  expect(text.indexOf('For Omar')).toBeLessThan(text.indexOf('A &lt;script&gt;'))
  expect(text).not.toContain('<script')
  expect(policy).toContain('default-src \'none\'')
})

test('the list can be narrowed to one recipient', async () => {
  const { text } = await read('/?to=Tess@tenants.example')
  expect(text).toContain('/mail/000001')
  expect(text).not.toContain('For Omar')
})

test('a message shows its text with working links, and its HTML in a frame without scripts', async () => {
  const { text } = await read('/mail/000001')
  expect(text).toContain('href="https://lathkey.example/marks/7?a=1&amp;b=2"')
  expect(text).toMatch(/<iframe[^>]*sandbox="allow-popups allow-popups-to-escape-sandbox"/)
  expect(text).not.toContain('parent.alert')
  const framed = await read('/mail/000001/html')
  expect(framed.policy).toMatch(/sandbox allow-popups/)
  expect(framed.policy).not.toContain('script-src')
})

test('a message without HTML says nothing about a frame', async () => {
  expect((await read('/mail/000002')).text).not.toContain('<iframe')
})

test('the raw form is plain text, never a page', async () => {
  const { type, text } = await read('/mail/000001/raw')
  expect(type).toMatch(/^text\/plain/)
  expect(text).toMatch(/^From: post@lathkey\.example/m)
})

test('programs read the same as JSON', async () => {
  expect(JSON.parse((await read('/messages?to=omar@owners.example')).text)).toMatchObject([{ id: '000002', subject: 'For Omar' }])
})

test('the face the product ships is there; anything else is not', async () => {
  expect((await fetch(`${mail.inboxUrl}/font/400`)).headers.get('content-type')).toBe('font/woff2')
  expect((await read('/font/../../etc/passwd')).status).toBe(404)
  expect((await read('/mail/999999')).status).toBe(404)
})

test('the mode is set and read over HTTP; nonsense is refused', async () => {
  const put = (body: unknown) => fetch(`${mail.inboxUrl}/mode`, { method: 'PUT', body: JSON.stringify(body) })
  expect((await put({ mode: 'bounce', recipients: ['A@x.example'] })).status).toBe(200)
  expect(JSON.parse((await read('/mode')).text)).toEqual({ mode: 'bounce', slowMs: 3000, recipients: ['a@x.example'] })
  expect((await read('/')).text).toContain('Trouble on purpose')
  expect((await put({ mode: 'explode' })).status).toBe(422)
  expect((await put({ mode: 'slow', slowMs: -1 })).status).toBe(422)
  expect((await put({ mode: 'accept' })).status).toBe(200)
})

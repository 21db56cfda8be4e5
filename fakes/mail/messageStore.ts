import { mkdirSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { simpleParser, type AddressObject } from 'mailparser'

export interface FakeMessage {
  id: string
  receivedAt: string
  /** From the envelope, which decides who gets it; the header may differ. */
  sender: string
  recipients: string[]
  /** False when the connection was cut before the answer: the sender cannot know that it arrived. */
  acknowledged: boolean
  from: string
  to: string
  subject: string
  text: string
  html: string
  headers: { name: string, value: string }[]
  attachments: { filename: string, contentType: string, sizeBytes: number }[]
  raw: string
}

interface Envelope { id: string, receivedAt: string, sender: string, recipients: string[], acknowledged: boolean }

const kept = 1_000

const addressText = (address: AddressObject | AddressObject[] | undefined) =>
  [address ?? []].flat().map(part => part.text).join(', ')

async function parse(envelope: Envelope, raw: Buffer): Promise<FakeMessage> {
  const mail = await simpleParser(raw, { skipTextToHtml: true, skipHtmlToText: true, skipImageLinks: true })
  return {
    ...envelope,
    from: addressText(mail.from),
    to: addressText(mail.to),
    subject: mail.subject ?? '',
    text: mail.text ?? '',
    html: mail.html || '',
    headers: mail.headerLines.map(({ key, line }) => ({ name: key, value: line.slice(key.length + 1).replace(/\r?\n[ \t]+/g, ' ').trim() })),
    attachments: mail.attachments.map(({ filename, contentType, size }) => ({ filename: filename ?? '', contentType, sizeBytes: size })),
    raw: raw.toString('latin1'),
  }
}

/** Newest last. With a folder the mail survives a restart: one .eml and one .json each. */
export async function openMessageStore(folder?: string) {
  const messages: FakeMessage[] = []
  if (folder) {
    mkdirSync(folder, { recursive: true })
    for (const name of readdirSync(folder).filter(name => name.endsWith('.json')).sort()) {
      const envelope = JSON.parse(readFileSync(join(folder, name), 'utf8')) as Envelope
      messages.push(await parse(envelope, readFileSync(join(folder, `${envelope.id}.eml`))))
    }
  }
  let last = Number(messages.at(-1)?.id ?? 0)

  function forget(message: FakeMessage) {
    if (!folder) return
    rmSync(join(folder, `${message.id}.json`), { force: true })
    rmSync(join(folder, `${message.id}.eml`), { force: true })
  }

  return {
    messages: () => [...messages],
    find: (id: string) => messages.find(message => message.id === id),
    async add(raw: Buffer, sender: string, recipients: string[], acknowledged: boolean) {
      last += 1
      const envelope = { id: String(last).padStart(6, '0'), receivedAt: new Date().toISOString(), sender, recipients, acknowledged }
      if (folder) {
        writeFileSync(join(folder, `${envelope.id}.eml`), raw)
        writeFileSync(join(folder, `${envelope.id}.json`), JSON.stringify(envelope))
      }
      messages.push(await parse(envelope, raw))
      while (messages.length > kept) forget(messages.shift() as FakeMessage)
    },
    clear() {
      for (const message of messages.splice(0)) forget(message)
    },
  }
}

export type MessageStore = Awaited<ReturnType<typeof openMessageStore>>

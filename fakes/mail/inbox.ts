import { readFileSync } from 'node:fs'
import { createServer, type IncomingMessage, type ServerResponse } from 'node:http'
import { createRequire } from 'node:module'
import type { AddressInfo } from 'node:net'
import { json } from 'node:stream/consumers'
import { readBehaviour, type MailBehaviour } from './behaviour'
import { framedHtml, listPage, messagePage, missingPage } from './inboxPage'
import type { FakeMessage, MessageStore } from './messageStore'

interface Control { store: MessageStore, behaviour: () => MailBehaviour, behave: (next: MailBehaviour) => void }

const ownPages = 'default-src \'none\'; style-src \'unsafe-inline\'; font-src \'self\'; frame-src \'self\'; img-src data:'
const mailPages = 'default-src \'none\'; style-src \'unsafe-inline\'; img-src data:; sandbox allow-popups allow-popups-to-escape-sandbox'

function send(response: ServerResponse, status: number, type: string, body: string | Buffer, policy = ownPages) {
  response.writeHead(status, {
    'content-type': type, 'content-security-policy': policy, 'x-content-type-options': 'nosniff', 'cache-control': 'no-store', 'referrer-policy': 'no-referrer',
  })
  response.end(body)
}

const html = 'text/html; charset=utf-8'
const sendJson = (response: ServerResponse, status: number, body: unknown) => send(response, status, 'application/json', JSON.stringify(body))

function fontFile(weight: string) {
  return readFileSync(createRequire(import.meta.url).resolve(`@fontsource/nunito-sans/files/nunito-sans-latin-${weight}-normal.woff2`))
}

function sendMessage(response: ServerResponse, message: FakeMessage | undefined, form: string | undefined) {
  if (!message) return send(response, 404, html, missingPage())
  if (form === 'raw') return send(response, 200, 'text/plain; charset=latin1', Buffer.from(message.raw, 'latin1'))
  if (form === 'html') return send(response, 200, html, framedHtml(message), mailPages)
  if (form === 'json') return sendJson(response, 200, message)
  send(response, 200, html, messagePage(message))
}

async function setBehaviour(request: IncomingMessage, response: ServerResponse, { behave }: Control) {
  const next = readBehaviour(await json(request).catch(() => undefined))
  if (!next) return sendJson(response, 422, { message: 'Send { "mode": "accept" | "refuse" | "bounce" | "hang" | "drop" | "slow", "slowMs"?: number, "recipients"?: string[] }.' })
  behave(next)
  sendJson(response, 200, next)
}

async function handle(request: IncomingMessage, response: ServerResponse, control: Control) {
  const url = new URL(request.url ?? '/', 'http://inbox.example')
  const [, first = '', id = '', form] = url.pathname.split('/')
  const what = `${request.method} ${first}`
  const recipient = url.searchParams.get('to')?.toLowerCase() ?? ''
  const wanted = control.store.messages().filter(message => !recipient || message.recipients.some(address => address.toLowerCase() === recipient))
  if (what === 'GET ') return send(response, 200, html, listPage(wanted, control.behaviour(), recipient))
  if (what === 'GET mail') return sendMessage(response, control.store.find(id), form)
  if (what === 'GET font' && (id === '400' || id === '800')) return send(response, 200, 'font/woff2', fontFile(id))
  if (what === 'GET messages') return sendJson(response, 200, wanted)
  if (what === 'DELETE messages') {
    control.store.clear()
    return sendJson(response, 200, [])
  }
  if (what === 'GET mode') return sendJson(response, 200, control.behaviour())
  if (what === 'PUT mode') return setBehaviour(request, response, control)
  send(response, 404, html, missingPage())
}

/** The inbox for a person, and the same for a program: /messages and /mode. */
export async function listenForReaders(port: number, control: Control) {
  const server = createServer((request, response) => {
    handle(request, response, control).catch((error: Error) => sendJson(response, 500, { message: error.message }))
  })
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject)
    server.listen(port, '127.0.0.1', resolve)
  })
  return {
    url: `http://127.0.0.1:${(server.address() as AddressInfo).port}`,
    close: () => new Promise<void>((resolve) => {
      server.close(() => resolve())
      server.closeAllConnections()
    }),
  }
}

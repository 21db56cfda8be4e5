import { randomBytes } from 'node:crypto'
import { connect } from '../../server/db/connect'
import { newestLink } from './people'
import { databaseAt } from './server'

export interface Answer<T> { status: number, headers: Headers, body: T }

export interface ClientOptions { headers?: Record<string, string> }

/** One browser's worth of requests: keeps cookies, and states its origin as browsers do. */
export interface Client {
  url: string
  get: <T = unknown>(path: string, options?: ClientOptions) => Promise<Answer<T>>
  post: <T = unknown>(path: string, body?: unknown, options?: ClientOptions) => Promise<Answer<T>>
  put: <T = unknown>(path: string, body?: unknown, options?: ClientOptions) => Promise<Answer<T>>
  patch: <T = unknown>(path: string, body?: unknown, options?: ClientOptions) => Promise<Answer<T>>
  remove: <T = unknown>(path: string, body?: unknown, options?: ClientOptions) => Promise<Answer<T>>
  /** For whatever the others do not say: redirects are not followed, the body is yours to read. */
  send: (path: string, init?: RequestInit) => Promise<Response>
  cookies: () => { name: string, value: string }[]
  forgetCookies: () => void
}

function keepCookies(jar: Map<string, string>, headers: Headers) {
  for (const line of headers.getSetCookie()) {
    const [pair = '', ...attributes] = line.split(';').map(part => part.trim())
    const name = pair.slice(0, pair.indexOf('='))
    const value = pair.slice(pair.indexOf('=') + 1)
    const isOver = attributes.some((attribute) => {
      const [key = '', detail = ''] = attribute.split('=')
      if (key.toLowerCase() === 'max-age') return Number(detail) <= 0
      return key.toLowerCase() === 'expires' && Date.parse(detail) <= Date.now()
    })
    if (isOver || value === '') jar.delete(name)
    else jar.set(name, value)
  }
}

async function readBody(response: Response): Promise<unknown> {
  const text = await response.text()
  return response.headers.get('content-type')?.includes('json') && text !== '' ? JSON.parse(text) : text
}

function bodyOf(body: unknown): { body?: BodyInit, headers: Record<string, string> } {
  if (body === undefined) return { headers: {} }
  if (body instanceof FormData || body instanceof Blob || typeof body === 'string') return { body, headers: {} }
  return { body: JSON.stringify(body), headers: { 'content-type': 'application/json' } }
}

export function createClient(url: string): Client {
  const jar = new Map<string, string>()

  async function send(path: string, init: RequestInit = {}) {
    const headers = new Headers(init.headers)
    if (jar.size > 0 && !headers.has('cookie')) headers.set('cookie', [...jar].map(([name, value]) => `${name}=${value}`).join('; '))
    if (!['GET', 'HEAD'].includes(init.method ?? 'GET') && !headers.has('origin')) headers.set('origin', url)
    const response = await fetch(new URL(path, url), { redirect: 'manual', ...init, headers })
    keepCookies(jar, response.headers)
    return response
  }

  const calling = (method: string) => async <T>(path: string, content?: unknown, { headers = {} }: ClientOptions = {}): Promise<Answer<T>> => {
    const { body, headers: described } = bodyOf(content)
    const response = await send(path, { method, body, headers: { accept: 'application/json', ...described, ...headers } })
    return { status: response.status, headers: response.headers, body: await readBody(response) as T }
  }

  return {
    url,
    get: (path, options) => calling('GET')(path, undefined, options),
    post: calling('POST'),
    put: calling('PUT'),
    patch: calling('PATCH'),
    remove: calling('DELETE'),
    send,
    cookies: () => [...jar].map(([name, value]) => ({ name, value })),
    forgetCookies: () => jar.clear(),
  }
}

export interface NewOwner { organisationName: string, name: string, email: string, password: string }

export function inventOwner(details: Partial<NewOwner> = {}): NewOwner {
  const mark = randomBytes(4).toString('hex')
  return {
    organisationName: `Plumbline Homes ${mark}`, name: 'Oona Invented', email: `oona-${mark}@plumbline.example`,
    password: `nine quiet rafters ${mark}`, ...details,
  }
}

function insist(answer: Answer<unknown>, what: string) {
  if (answer.status >= 200 && answer.status < 300) return
  throw new Error(`${what} answered ${answer.status}: ${JSON.stringify(answer.body)}`)
}

/** A new organisation with its owner, signed in. */
export async function signUp(url: string, details: Partial<NewOwner> = {}): Promise<{ client: Client, owner: NewOwner }> {
  const client = createClient(url)
  const owner = inventOwner(details)
  await begin(client, owner)
  return { client, owner }
}

/** Asks for the mailed link and follows it; the client is signed in to the new organisation afterwards. */
export async function begin(client: Client, { organisationName, name, email, password }: NewOwner): Promise<void> {
  insist(await client.post('/api/auth/sign-up', { organisationName, name, email }), 'Sign-up')
  insist(await client.post(`/api/auth/beginnings/${await mailedToken(client.url, email)}`, { password }), 'Beginning')
}

async function mailedToken(url: string, email: string): Promise<string> {
  const database = databaseAt.get(url)
  if (!database) throw new Error(`No server of this run is at ${url}.`)
  const connection = connect(database.adminUrl, { max: 1 })
  try { return await newestLink(connection, email.trim().toLowerCase(), 'begin') }
  finally { await connection.close() }
}

export async function signIn(url: string, { email, password }: { email: string, password: string }): Promise<Client> {
  const client = createClient(url)
  insist(await client.post('/api/auth/sign-in', { email, password }), 'Sign-in')
  return client
}

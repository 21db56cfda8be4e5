import { randomBytes } from 'node:crypto'
import { connect, type Connection } from '../../server/db/connect'
import type { Role } from '../../shared/types/people'
import { createClient, type Client } from './client'
import type { TestServer } from './server'

/** What every refused request answers. */
export interface Refusal { statusCode: number, message: string, data: { code: string, fields?: Record<string, string>, theirs?: Record<string, unknown> } }

/** A look at the rows, past the program. */
export const lookInto = (server: TestServer): Connection => connect(server.database.adminUrl, { max: 2 })

export const inventAddress = (name: string) => `${name}-${randomBytes(4).toString('hex')}@plumbline.example`

/** The token of the newest link to `page` that was mailed to this address. */
export async function newestLink({ db }: Connection, address: string, page: 'invitation' | 'reset-password' | 'begin'): Promise<string> {
  const row = await db.selectFrom('message').select('textBody').where('toAddress', '=', address)
    .where('textBody', 'like', `%/${page}/%`).orderBy('createdAt', 'desc').orderBy('id', 'desc').executeTakeFirstOrThrow()
  const token = new RegExp(`/${page}/([\\w-]+)`).exec(row.textBody)?.[1]
  if (!token) throw new Error(`The mail to ${address} has no link.`)
  return token
}

export interface MadeHome { propertyId: string, unitId: string }

export async function makeHome(owner: Client, name = 'Number 4'): Promise<MadeHome> {
  const property = await owner.post<{ id: string }>('/api/properties', { name: 'Invented Row' })
  const unit = await owner.post<{ id: string }>(`/api/properties/${property.body.id}/units`, { name })
  if (unit.status >= 300) throw new Error(`Making a home answered ${unit.status}: ${JSON.stringify(unit.body)}`)
  return { propertyId: property.body.id, unitId: unit.body.id }
}

export interface Invited { email: string, name: string, password: string, client: Client }

/** Invites a new person and accepts as them: a signed-in client with that role. */
export async function bringIn(server: TestServer, connection: Connection, owner: Client, role: Role, terms: Record<string, unknown> = {}): Promise<Invited> {
  const email = inventAddress(role)
  const sent = await owner.post('/api/invitations', { email, role, ...terms })
  if (sent.status !== 201) throw new Error(`Inviting answered ${sent.status}: ${JSON.stringify(sent.body)}`)
  const person = { email, name: `Invented ${role}`, password: 'eleven dry gutters' }
  const client = createClient(server.url)
  const token = await newestLink(connection, email, 'invitation')
  const accepted = await client.post(`/api/auth/invitations/${token}`, { name: person.name, password: person.password })
  if (accepted.status !== 200) throw new Error(`Accepting answered ${accepted.status}: ${JSON.stringify(accepted.body)}`)
  return { ...person, client }
}

export const tenantTerms = (unitId: string, days: { startsOn?: string, endsOn?: string | null } = {}) =>
  ({ unitId, tenantName: 'Invented tenant', startsOn: '2020-01-01', endsOn: null, ...days })

import { connect, type Db } from '../../../server/db/connect'
import { makePasswordHash } from '../../../server/utils/passwords'
import { createClient, signIn, type Client } from '../../support/client'
import { startServer, type TestServer } from '../../support/server'
import { emailOf, inventHome, inventPerson, type InventedHome } from './inventHome'

const password = 'nine quiet rafters in a row'
const passwordHash = makePasswordHash(password)

export interface OpenHome extends InventedHome {
  owner: string
  trades: string
  as: { owner: Client, manager: Client, tenant: Client, trades: Client, otherTenant: Client, stranger: Client, nobody: Client }
}

export interface OpenServer { server: TestServer, db: Db, openHome: () => Promise<OpenHome>, close: () => Promise<void> }

/** The built server with a way into its database, and homes whose people are signed in. */
export async function openServer(env: Record<string, string> = {}): Promise<OpenServer> {
  const server = await startServer({ env })
  const { db, close } = connect(server.database.appUrl, { max: 4 })
  const enter = async (userId: string) => {
    await db.updateTable('appUser').set({ passwordHash: await passwordHash }).where('id', '=', userId).execute()
    return signIn(server.url, { email: await emailOf(db, userId), password })
  }
  return {
    server, db,
    openHome: async () => {
      const home = await inventHome(db)
      const elsewhere = await inventHome(db)
      const trades = await inventPerson(db, home.organisationId, 'trades', 'Tor')
      // Lives in no home of this organisation: known here, but nothing is theirs.
      const other = await inventPerson(db, home.organisationId, 'tenant', 'Olga')
      const [owner, manager, tenant, tradesClient, otherTenant, stranger] = await Promise.all([home.owner, home.manager, home.tenant, trades, other, elsewhere.owner].map(enter))
      return { ...home, trades, as: { owner: owner!, manager: manager!, tenant: tenant!, trades: tradesClient!, otherTenant: otherTenant!, stranger: stranger!, nobody: createClient(server.url) } }
    },
    close: async () => {
      await close()
      await server.stop()
    },
  }
}

export interface Refusal { message: string, data: { code: string, fields?: Record<string, string>, [more: string]: unknown } }

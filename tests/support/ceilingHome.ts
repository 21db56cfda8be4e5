import { randomBytes } from 'node:crypto'
import sharp from 'sharp'
import { connect, type Connection, type Db } from '../../server/db/connect'
import { addUser } from '../../server/db/commands/addPerson'
import { makePasswordHash } from '../../server/utils/passwords'
import { nowInstant, dayIn } from '../../server/utils/clock'
import { newId } from '../../server/utils/newId'
import type { Role } from '../../shared/types/people'
import { addDays } from '../../shared/utils/days'
import { createClient, signIn, signUp, type Client } from './client'
import type { TestServer } from './server'

/** An invented home with people around it: two rooms, an attic, a tenant, and a second unit next door with its own. */
export interface CeilingHome {
  db: Db
  organisationId: string
  propertyId: string
  unitId: string
  otherUnitId: string
  bedroomId: string
  hallId: string
  otherRoomId: string
  atticId: string
  owner: Client
  ownerEmail: string
  tenant: Client
  tenantId: string
  neighbour: Client
  engineer: Client
  trades: Client
  /** An owner of an organisation that has nothing to do with it. */
  stranger: Client
  nobody: Client
  today: string
  close: () => Promise<void>
}

const password = 'nine quiet rafters over us'
let passwordHash: Promise<string> | undefined

async function plantPerson(db: Db, organisationId: string, role: Role, name: string) {
  const email = `${name.toLowerCase()}-${randomBytes(4).toString('hex')}@plumbline.example`
  const user = await db.transaction().execute(async trx => addUser(trx, { email, name: `${name} Invented`, passwordHash: await (passwordHash ??= makePasswordHash(password)) }))
  await db.insertInto('membership').values({ id: newId(), organisationId, userId: user.id, role, createdAt: nowInstant() }).execute()
  return { id: user.id, email }
}

async function plantTenancy(db: Db, organisationId: string, unitId: string, userId: string, startsOn: string) {
  const tenancyId = newId()
  await db.insertInto('tenancy').values({ id: tenancyId, organisationId, unitId, tenantName: 'Invented', startsOn, createdAt: nowInstant() }).execute()
  await db.insertInto('tenancyPerson').values({ tenancyId, organisationId, userId }).execute()
}

async function plantUnit(db: Db, organisationId: string, propertyId: string, name: string, rooms: string[]) {
  const unitId = newId()
  await db.insertInto('unit').values({ id: unitId, organisationId, propertyId, name, createdAt: nowInstant() }).execute()
  const roomIds: string[] = []
  for (const [sort, room] of rooms.entries()) {
    roomIds.push(newId())
    await db.insertInto('room').values({ id: roomIds.at(-1)!, organisationId, unitId, name: room, lengthFt: 12, widthFt: 10, sort, createdAt: nowInstant() }).execute()
  }
  return { unitId, roomIds }
}

export async function plantCeilingHome(server: TestServer): Promise<CeilingHome> {
  const connection: Connection = connect(server.database.appUrl, { max: 2 })
  const { db } = connection
  const { client: owner, owner: { email: ownerEmail } } = await signUp(server.url)
  const { client: stranger } = await signUp(server.url)
  const { organisationId } = await db.selectFrom('membership as m').innerJoin('appUser as u', 'u.id', 'm.userId').select('m.organisationId').where('u.email', '=', ownerEmail).executeTakeFirstOrThrow()
  // One zone for everybody, so that 'today' is the same day in the tests and on the server.
  await db.updateTable('organisation').set({ timeZone: 'UTC' }).where('id', '=', organisationId).execute()
  const propertyId = newId()
  await db.insertInto('property').values({ id: propertyId, organisationId, name: 'Invented Row', yearBuilt: 1961, createdAt: nowInstant() }).execute()
  const here = await plantUnit(db, organisationId, propertyId, 'Flat 1', ['Bedroom', 'Hall'])
  const next = await plantUnit(db, organisationId, propertyId, 'Flat 2', ['Kitchen'])
  const atticId = newId()
  await db.insertInto('attic').values({ id: atticId, organisationId, unitId: here.unitId, name: 'Main attic', createdAt: nowInstant() }).execute()
  const today = dayIn('UTC')
  const tenant = await plantPerson(db, organisationId, 'tenant', 'Tessa')
  const neighbour = await plantPerson(db, organisationId, 'tenant', 'Nils')
  const engineer = await plantPerson(db, organisationId, 'engineer', 'Edda')
  const trades = await plantPerson(db, organisationId, 'trades', 'Toma')
  await plantTenancy(db, organisationId, here.unitId, tenant.id, addDays(today, -400))
  await plantTenancy(db, organisationId, next.unitId, neighbour.id, addDays(today, -400))
  await db.insertInto('unitAccess').values({ id: newId(), organisationId, unitId: here.unitId, userId: engineer.id, createdAt: nowInstant() }).execute()
  const enter = ({ email }: { email: string }) => signIn(server.url, { email, password })
  return {
    db, organisationId, propertyId, unitId: here.unitId, otherUnitId: next.unitId, bedroomId: here.roomIds[0]!, hallId: here.roomIds[1]!, otherRoomId: next.roomIds[0]!, atticId,
    owner, ownerEmail, stranger, tenant: await enter(tenant), tenantId: tenant.id, neighbour: await enter(neighbour), engineer: await enter(engineer), trades: await enter(trades),
    nobody: createClient(server.url), today, close: connection.close,
  }
}

/** A drawn crack; `seed` makes its bytes differ from any other's. */
export function drawnPhoto(seed = 0, widthPx = 640, heightPx = 480): Promise<Buffer> {
  const svg = `<svg xmlns="http://www.w3.org/2000/svg" width="${widthPx}" height="${heightPx}"><rect width="100%" height="100%" fill="#e8e2d4"/><path d="M20 ${40 + seed % 400} L${widthPx / 2} ${90 + seed % 300} L${widthPx - 20} 60" stroke="#333" stroke-width="${2 + seed % 5}" fill="none"/></svg>`
  return sharp(Buffer.from(svg)).jpeg().toBuffer()
}

export function photoForm(bytes: Uint8Array, { name = 'ceiling.jpg', type = 'image/jpeg', view }: { name?: string, type?: string, view?: string } = {}): FormData {
  const form = new FormData()
  form.set('photo', new File([new Uint8Array(bytes)], name, { type }))
  if (view) form.set('view', view)
  return form
}

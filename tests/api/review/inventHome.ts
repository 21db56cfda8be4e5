import type { AtticSurvey, JoistField } from '../../../shared/types/attic'
import type { Role } from '../../../shared/types/people'
import { connect, type Connection, type Db } from '../../../server/db/connect'
import { now, nowInstant } from '../../../server/utils/clock'
import { newId } from '../../../server/utils/newId'
import { cloneDatabase, type TestDatabase } from '../../support/database'

/** An organisation of our own invention, written straight into the tables: what a command finds when it starts. */
export interface InventedHome {
  organisationId: string
  propertyId: string
  unitId: string
  roomId: string
  atticId: string
  owner: string
  manager: string
  tenant: string
}

export async function openDatabase(): Promise<Connection & { database: TestDatabase, drop: () => Promise<void> }> {
  const database = await cloneDatabase()
  const connection = connect(database.appUrl, { max: 6 })
  return { ...connection, database, drop: async () => {
    await connection.close()
    await database.drop()
  } }
}

export const today = (offsetDays = 0) => new Date(now().getTime() + offsetDays * 86_400_000).toISOString().slice(0, 10)

export async function inventPerson(db: Db, organisationId: string, role: Role, name: string): Promise<string> {
  const id = newId()
  const at = nowInstant()
  await db.insertInto('appUser').values({ id, email: `${name.toLowerCase()}-${id.slice(-8)}@plumbline.example`, name, passwordHash: 'none', createdAt: at }).execute()
  await db.insertInto('membership').values({ id: newId(), organisationId, userId: id, role, createdAt: at }).execute()
  return id
}

export const emailOf = async (db: Db, userId: string) => (await db.selectFrom('appUser').select('email').where('id', '=', userId).executeTakeFirstOrThrow()).email

export async function inventHome(db: Db): Promise<InventedHome> {
  const at = nowInstant()
  const [organisationId, propertyId, unitId, roomId, atticId, tenancyId] = Array.from({ length: 6 }, newId) as [string, string, string, string, string, string]
  await db.insertInto('organisation').values({ id: organisationId, name: 'Plumbline Homes', timeZone: 'UTC', createdAt: at }).execute()
  const owner = await inventPerson(db, organisationId, 'owner', 'Oona')
  const manager = await inventPerson(db, organisationId, 'manager', 'Milo')
  const tenant = await inventPerson(db, organisationId, 'tenant', 'Tess')
  await db.insertInto('property').values({ id: propertyId, organisationId, name: '4 Alder Row', yearBuilt: 1962, createdAt: at }).execute()
  await db.insertInto('unit').values({ id: unitId, organisationId, propertyId, name: 'Upstairs', createdAt: at }).execute()
  await db.insertInto('room').values({ id: roomId, organisationId, unitId, name: 'Bedroom', createdAt: at }).execute()
  await db.insertInto('attic').values({ id: atticId, organisationId, unitId, name: 'Loft', inventoryConfirmedOn: today(), createdAt: at }).execute()
  await db.insertInto('tenancy').values({ id: tenancyId, organisationId, unitId, tenantName: 'Tess', startsOn: today(-200), endsOn: null, createdAt: at }).execute()
  await db.insertInto('tenancyPerson').values({ tenancyId, organisationId, userId: tenant }).execute()
  return { organisationId, propertyId, unitId, roomId, atticId, owner, manager, tenant }
}

const joists: JoistField = {
  name: 'Main', species: 'Douglas fir-larch', grade: 'No.2', size: '2x8', breadthIn: null, depthIn: null, spacingIn: 16, spanFt: 12, joistCount: 16,
  bearingLengthIn: 3.5, topEdgeBraced: true, installedBeforeJune2013: null, preJune2013StampProven: false, notches: [], holes: [], strongbacks: [],
}

/** Sound rafters and joists, high enough and with a large enough opening for limited storage: 20 psf by the code's class. */
export const soundSurvey = (changes: Partial<AtticSurvey> = {}): AtticSurvey => ({
  surveyedOn: today(-10), framing: 'rafters-and-joists', access: 'pull-down-ladder', openingWidthIn: 24, openingLengthIn: 54, clearHeightIn: 60, habitable: false,
  ceilingFinish: 'gypsum-half-inch', insulation: { material: 'fiberglass', depthIn: 3 }, deck: 'full', conditions: [], joistFields: [joists], ...changes,
})

export async function addSurvey(db: Db, home: InventedHome, answers: AtticSurvey = soundSurvey()) {
  await db.insertInto('atticSurvey').values({
    id: newId(), organisationId: home.organisationId, unitId: home.unitId, atticId: home.atticId, surveyedOn: answers.surveyedOn, answers: JSON.stringify(answers),
    ratedPsf: 0, onHold: false, basis: 'class', surveyedBy: home.owner, createdAt: nowInstant(),
  }).execute()
}

/** A pile along the first bearing wall unless told otherwise. */
export async function addItem(db: Db, home: InventedHome, typicalLb: number, place: { xFt?: number, yFt?: number, lengthFt?: number, widthFt?: number } = {}) {
  const id = newId()
  await db.insertInto('atticItem').values({
    id, organisationId: home.organisationId, unitId: home.unitId, atticId: home.atticId, name: 'Invented boxes', lowLb: typicalLb, typicalLb, highLb: typicalLb, weightSource: 'weighed',
    xFt: 0, yFt: 0, lengthFt: 12, widthFt: 20, ...place, placedOn: today(), heightFt: null, catalogueKey: null, createdAt: nowInstant(),
  }).execute()
  return id
}

export async function addMark(db: Db, home: InventedHome, changes: { kind?: 'crack' | 'nail-pops' | 'sag' | 'stain', createdDaysAgo?: number } = {}) {
  const id = newId()
  const createdAt = new Date(now().getTime() - (changes.createdDaysAgo ?? 0) * 86_400_000).toISOString()
  const { lastNumber: number } = await db.updateTable('organisation').set(eb => ({ lastNumber: eb('lastNumber', '+', 1) })).where('id', '=', home.organisationId).returning('lastNumber').executeTakeFirstOrThrow()
  await db.insertInto('mark').values({
    id, organisationId: home.organisationId, unitId: home.unitId, roomId: home.roomId, atticId: home.atticId, number, kind: changes.kind ?? 'crack', label: 'Crack by the door',
    pinX: 0.5, pinY: 0.5, firstSeenOn: createdAt.slice(0, 10), createdBy: home.tenant, createdAt,
  }).execute()
  return id
}

export async function addReport(db: Db, home: InventedHome, markId: string, dangerSigns: string[] = []) {
  const id = newId()
  const { lastNumber: number } = await db.updateTable('organisation').set(eb => ({ lastNumber: eb('lastNumber', '+', 1) })).where('id', '=', home.organisationId).returning('lastNumber').executeTakeFirstOrThrow()
  await db.insertInto('observation').values({
    id, organisationId: home.organisationId, unitId: home.unitId, roomId: home.roomId, markId, number, answers: JSON.stringify({ dangerSigns }), dangerSigns,
    reportedBy: home.tenant, clientKey: newId(), receivedAt: nowInstant(),
  }).execute()
  return id
}

export async function addReading(db: Db, home: InventedHome, markId: string, daysAgo: number, value: number, sigma = 0.2) {
  await db.insertInto('reading').values({
    id: newId(), organisationId: home.organisationId, unitId: home.unitId, markId, segment: 1, takenOn: today(-daysAgo), value, quantity: 'width_mm', sigma,
    method: 'gauge-card', detail: '{}', takenBy: home.tenant, clientKey: newId(), receivedAt: nowInstant(),
  }).execute()
}

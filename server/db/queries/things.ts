import type { Db } from '../connect'

/** One statement each: the row a route is about, with its organisation and unit. */
export const things = {
  property: async (db: Db, id: string) => {
    const row = await db.selectFrom('property').selectAll().where('id', '=', id).executeTakeFirst()
    return row && { ...row, unitId: null }
  },
  unit: async (db: Db, id: string) => {
    const row = await db.selectFrom('unit').selectAll().where('id', '=', id).executeTakeFirst()
    return row && { ...row, unitId: row.id }
  },
  room: (db: Db, id: string) => db.selectFrom('room').selectAll().where('id', '=', id).executeTakeFirst(),
  tenancy: (db: Db, id: string) => db.selectFrom('tenancy').selectAll().where('id', '=', id).executeTakeFirst(),
  attic: (db: Db, id: string) => db.selectFrom('attic').selectAll().where('id', '=', id).executeTakeFirst(),
  item: (db: Db, id: string) => db.selectFrom('atticItem').selectAll().where('id', '=', id).executeTakeFirst(),
  document: (db: Db, id: string) => db.selectFrom('atticDocument').selectAll().where('id', '=', id).executeTakeFirst(),
  mark: (db: Db, id: string) => db.selectFrom('mark').selectAll().where('id', '=', id).executeTakeFirst(),
  observation: (db: Db, id: string) => db.selectFrom('observation').selectAll().where('id', '=', id).executeTakeFirst(),
  photo: (db: Db, id: string) => db.selectFrom('photo').selectAll().where('id', '=', id).executeTakeFirst(),
  finding: (db: Db, id: string) => db.selectFrom('finding').selectAll().where('id', '=', id).executeTakeFirst(),
  job: (db: Db, id: string) => db.selectFrom('job').selectAll().where('id', '=', id).executeTakeFirst(),
  invitation: (db: Db, id: string) => db.selectFrom('invitation').selectAll().where('id', '=', id).executeTakeFirst(),
  membership: async (db: Db, id: string) => {
    const row = await db.selectFrom('membership').selectAll().where('id', '=', id).executeTakeFirst()
    return row && { ...row, unitId: null }
  },
  message: async (db: Db, id: string) => {
    const row = await db.selectFrom('message').selectAll().where('id', '=', id).where('organisationId', 'is not', null).executeTakeFirst()
    return row && { ...row, organisationId: row.organisationId!, unitId: null }
  },
}

export type ThingName = keyof typeof things
export type Thing<N extends ThingName> = NonNullable<Awaited<ReturnType<typeof things[N]>>>

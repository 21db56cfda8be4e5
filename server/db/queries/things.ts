import { compiledOnce } from '../compiledOnce'
import type { Db } from '../connect'

interface Given { id: string }

const propertyRow = compiledOnce((db, { id }: Given) => db.selectFrom('property').selectAll().where('id', '=', id))
const unitRow = compiledOnce((db, { id }: Given) => db.selectFrom('unit').selectAll().where('id', '=', id))
const roomRow = compiledOnce((db, { id }: Given) => db.selectFrom('room').selectAll().where('id', '=', id))
const tenancyRow = compiledOnce((db, { id }: Given) => db.selectFrom('tenancy').selectAll().where('id', '=', id))
const atticRow = compiledOnce((db, { id }: Given) => db.selectFrom('attic').selectAll().where('id', '=', id))
const atticItemRow = compiledOnce((db, { id }: Given) => db.selectFrom('atticItem').selectAll().where('id', '=', id))
const atticDocumentRow = compiledOnce((db, { id }: Given) => db.selectFrom('atticDocument').selectAll().where('id', '=', id))
const markRow = compiledOnce((db, { id }: Given) => db.selectFrom('mark').selectAll().where('id', '=', id))
const observationRow = compiledOnce((db, { id }: Given) => db.selectFrom('observation').selectAll().where('id', '=', id))
const photoRow = compiledOnce((db, { id }: Given) => db.selectFrom('photo').selectAll().where('id', '=', id))
const findingRow = compiledOnce((db, { id }: Given) => db.selectFrom('finding').selectAll().where('id', '=', id))
const jobRow = compiledOnce((db, { id }: Given) => db.selectFrom('job').selectAll().where('id', '=', id))
const invitationRow = compiledOnce((db, { id }: Given) => db.selectFrom('invitation').selectAll().where('id', '=', id))
const membershipRow = compiledOnce((db, { id }: Given) => db.selectFrom('membership').selectAll().where('id', '=', id))
const messageRow = compiledOnce((db, { id }: Given) => db.selectFrom('message').selectAll().where('id', '=', id).where('organisationId', 'is not', null))

const noticeRow = compiledOnce((db, { id }: Given) => db.selectFrom('keepClearNotice').selectAll().where('id', '=', id))
const unloadTrialRow = compiledOnce((db, { id }: Given) => db.selectFrom('unloadTrial').selectAll().where('id', '=', id))

/** One statement each: the row a route is about, with its organisation and unit. */
export const things = {
  property: async (db: Db, id: string) => {
    const row = await propertyRow.first(db, { id })
    return row && { ...row, unitId: null }
  },
  unit: async (db: Db, id: string) => {
    const row = await unitRow.first(db, { id })
    return row && { ...row, unitId: row.id }
  },
  room: (db: Db, id: string) => roomRow.first(db, { id }),
  tenancy: (db: Db, id: string) => tenancyRow.first(db, { id }),
  attic: (db: Db, id: string) => atticRow.first(db, { id }),
  item: (db: Db, id: string) => atticItemRow.first(db, { id }),
  document: (db: Db, id: string) => atticDocumentRow.first(db, { id }),
  mark: (db: Db, id: string) => markRow.first(db, { id }),
  observation: (db: Db, id: string) => observationRow.first(db, { id }),
  photo: (db: Db, id: string) => photoRow.first(db, { id }),
  finding: (db: Db, id: string) => findingRow.first(db, { id }),
  notice: (db: Db, id: string) => noticeRow.first(db, { id }),
  unloadTrial: (db: Db, id: string) => unloadTrialRow.first(db, { id }),
  job: (db: Db, id: string) => jobRow.first(db, { id }),
  invitation: (db: Db, id: string) => invitationRow.first(db, { id }),
  membership: async (db: Db, id: string) => {
    const row = await membershipRow.first(db, { id })
    return row && { ...row, unitId: null }
  },
  message: async (db: Db, id: string) => {
    const row = await messageRow.first(db, { id })
    return row && { ...row, organisationId: row.organisationId!, unitId: null }
  },
}

export type ThingName = keyof typeof things
export type Thing<N extends ThingName> = NonNullable<Awaited<ReturnType<typeof things[N]>>>

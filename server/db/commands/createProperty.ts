import type { Db } from '../connect'
import type { Actor } from '../queries/actor'
import type { PropertyCreateValue } from '../../../shared/schemas/home'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { appendRecord } from './appendRecord'
import { insertUnit } from './createUnit'

/** A property, and in the same go its first unit with rooms and attic when they were given. */
export function createProperty(db: Db, actor: Actor, { firstUnit, ...facts }: PropertyCreateValue) {
  return db.transaction().execute(async (trx) => {
    const { organisationId } = actor
    const id = newId()
    await trx.insertInto('property').values({ id, organisationId, ...facts, archivedAt: null, createdAt: nowInstant() }).execute()
    await appendRecord(trx, actor, { organisationId, unitId: null, action: 'property added', subjectKind: 'property', subjectId: id, after: facts })
    const unit = firstUnit ? await insertUnit(trx, actor, { organisationId, propertyId: id }, { notes: '', accessNotes: '', ...firstUnit }) : null
    return { id, unitId: unit?.id ?? null, atticId: unit?.atticId ?? null }
  })
}

import type { Db, Trx } from '../connect'
import type { Actor } from '../queries/actor'
import type { Thing } from '../queries/things'
import type { TenancyCreateValue, TenancyEditValue } from '../../../shared/schemas/tenancy'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { problem } from '../../utils/problems'
import { appendRecord, type RecordActor } from './appendRecord'
import { editRow } from './editRow'
import { refuseArchived } from './refuseArchived'

export function createTenancy(db: Db, actor: Actor, unit: Thing<'unit'>, input: TenancyCreateValue) {
  refuseArchived(unit, 'unit')
  return refusingOverlap(() => db.transaction().execute(trx => addTenancy(trx, actor, unit, input)))
}

/** In the caller's transaction: an invitation makes its tenancy with it. */
export async function addTenancy(trx: Trx, actor: RecordActor, unit: Thing<'unit'>, input: TenancyCreateValue) {
  await refuseOverlap(trx, unit.id, input)
  const id = newId()
  const { organisationId } = unit
  await trx.insertInto('tenancy').values({ id, organisationId, unitId: unit.id, ...input, createdAt: nowInstant() }).execute()
  await appendRecord(trx, actor, { organisationId, unitId: unit.id, action: 'tenancy added', subjectKind: 'tenancy', subjectId: id, after: input })
  return { id }
}

export function editTenancy(db: Db, actor: Actor, tenancy: Thing<'tenancy'>, { version, ...patch }: TenancyEditValue) {
  return refusingOverlap(() => db.transaction().execute(async (trx) => {
    await refuseOverlap(trx, tenancy.unitId, { ...patch, id: tenancy.id })
    return editRow<Thing<'tenancy'>>(trx, actor, {
      table: 'tenancy', id: tenancy.id, version, patch,
      record: { organisationId: tenancy.organisationId, unitId: tenancy.unitId, subjectKind: 'tenancy', action: 'tenancy changed' },
    })
  }))
}

/** Both days count: the next tenancy starts the day after the last one ends. */
async function refuseOverlap(trx: Trx, unitId: string, { startsOn, endsOn, id }: { startsOn: string, endsOn: string | null, id?: string }) {
  const other = await trx.selectFrom('tenancy').select(['tenantName', 'startsOn', 'endsOn']).where('unitId', '=', unitId)
    .where(eb => eb.or([eb('endsOn', 'is', null), eb('endsOn', '>=', startsOn)]))
    .$if(endsOn !== null, query => query.where('startsOn', '<=', endsOn!))
    .$if(id !== undefined, query => query.where('id', '!=', id!))
    .orderBy('startsOn').limit(1).executeTakeFirst()
  if (other) throw overlaps(`These days overlap with the tenancy of ${other.tenantName}.`, other)
}

const overlaps = (message: string, other?: object) => problem(409, 'overlaps', message, { fields: { startsOn: message }, other })

/** Two people adding at the same moment: the database's own constraint refuses the second. */
export async function refusingOverlap<T>(work: () => Promise<T>): Promise<T> {
  try { return await work() }
  catch (error) {
    if ((error as { code?: string }).code === '23P01') throw overlaps('These days overlap with another tenancy.')
    throw error
  }
}

import { sql } from 'kysely'
import { compiledOnce } from '../compiledOnce'
import type { Db } from '../connect'
import type { Actor } from './actor'
import type { UnitPage } from '../../../shared/types/home'
import { dayIn } from '../../utils/clock'
import { abilitiesOf, reachOf } from '../../utils/policy'
import { notFound } from '../../utils/problems'
import { judgedAtticsOf, findingsOf, jobsOf, marksOf, roomsOf, statusOf, tenanciesOf } from './unitParts'

interface Sees { edits: boolean, findings: boolean, jobs: boolean }

const unitPageRow = compiledOnce((db, given: { unitId: string, userId: string }, sees: Sees) => {
  const id = sql.val(given.unitId)
  return db.selectFrom('unit as u').innerJoin('property as p', 'p.id', 'u.propertyId').leftJoin('recordChain as c', 'c.chainId', 'u.id')
    .select(['u.id', 'u.propertyId', 'u.name', 'u.notes', 'u.accessNotes', 'u.archivedAt', 'u.version',
      'p.name as propertyName', 'p.addressLines', 'p.yearBuilt', 'p.notes as propertyNotes', 'p.archivedAt as propertyArchivedAt', 'p.version as propertyVersion',
      'c.entries', roomsOf(db, id).as('rooms'), roomsOf(db, id, 'archived').as('archivedRooms'), judgedAtticsOf(db, id).as('attics'), marksOf(db, id).as('marks'),
      tenanciesOf(db, id, sees.edits ? null : given.userId).as('tenancies')])
    .$if(sees.findings, query => query.select([findingsOf(db, id).as('findings'), statusOf(db, id).as('status')]))
    .$if(sees.jobs, query => query.select(jobsOf(db, id).as('jobs')))
    .where('u.id', '=', given.unitId)
})

/** Everything the unit's page shows, in one statement; what the asker's role may not see is left out. */
export async function findUnitPage(db: Db, actor: Actor, unitId: string): Promise<UnitPage> {
  const edits = Boolean(reachOf(actor.role, 'edit homes'))
  const sees = { edits, findings: Boolean(reachOf(actor.role, 'see finding')), jobs: Boolean(reachOf(actor.role, 'see job')) }
  const row = await unitPageRow.first(db, { unitId, userId: actor.userId }, sees)
  if (!row) throw notFound()
  return {
    unit: {
      id: row.id, propertyId: row.propertyId, name: row.name, archivedAt: row.archivedAt, version: row.version,
      notes: edits ? row.notes : '', accessNotes: edits ? row.accessNotes : null,
    },
    property: {
      id: row.propertyId, name: row.propertyName, addressLines: row.addressLines, yearBuilt: row.yearBuilt, notes: edits ? row.propertyNotes : '',
      archivedAt: row.propertyArchivedAt, version: row.propertyVersion,
    },
    rooms: row.rooms ?? [], archivedRooms: row.archivedRooms ?? [], attics: row.attics ?? [], tenancies: row.tenancies ?? [],
    marks: row.marks ?? [], findings: row.findings ?? [], jobs: row.jobs ?? [], status: row.status ?? null,
    recordEntries: row.entries ?? 0, today: dayIn(actor.timeZone), abilities: abilitiesOf(actor.role),
  }
}

import { sql } from 'kysely'
import { compiledOnce } from '../compiledOnce'
import type { Db } from '../connect'
import type { Actor } from './actor'
import type { Thing } from './things'
import type { Page, PropertyCard, PropertyPage, UnitCard } from '../../../shared/types/home'
import { dayIn } from '../../utils/clock'
import { likeAnywhere, pageOf, readCursor } from '../../utils/cursor'
import { abilitiesOf } from '../../utils/policy'
import { jsonList } from './jsonList'
import { statusOf } from './unitParts'
import { addressMatches, sectionPartsOf, tenantNameOf, unitCardOf } from './units'

const PROPERTIES = 20
const UNITS_SHOWN = 6
const UNITS = 60

const severityRank = sql`array_position(array['urgent', 'attention', 'notice'], us.worst_severity) nulls last`

interface HomesFilter { search?: string, after?: string, archived: 'yes' | 'no' }

interface PropertiesGiven { organisationId: string, today: string, pattern: string | undefined, fromName: string | undefined, fromId: string | undefined }
interface PropertiesShape { archived: 'yes' | 'no', isSearched: boolean, isContinued: boolean }

const propertyRows = compiledOnce((db, given: PropertiesGiven, shape: PropertiesShape) =>
  db.selectFrom('property as p')
    .innerJoinLateral(eb => eb.selectFrom('unit as n').leftJoin('unitStatus as ns', 'ns.unitId', 'n.id').select([
      sql<number>`count(*)`.as('unitCount'), sql<number>`coalesce(sum(ns.open_findings), 0)`.as('openFindings'),
      sql<number>`count(*) filter (where ns.worst_severity = 'urgent')`.as('urgentFindings'), sql<number>`coalesce(sum(ns.active_marks), 0)`.as('activeMarks'),
      sql<number>`coalesce(sum(ns.stored_lb), 0)`.as('storedLb'), sql<number>`count(*) filter (where ns.load_state in ('over', 'hold') and ns.stored_lb > 0)`.as('overUnits'),
    ]).whereRef('n.propertyId', '=', 'p.id').whereRef('n.organisationId', '=', 'p.organisationId').where('n.archivedAt', 'is', null).as('counts'), join => join.onTrue())
    .select(['p.id', 'p.name', 'p.addressLines', 'p.yearBuilt', 'p.notes', 'p.archivedAt', 'p.version',
      'counts.unitCount', 'counts.openFindings', 'counts.urgentFindings', 'counts.activeMarks', 'counts.storedLb', 'counts.overUnits',
      sql<UnitCard[]>`(select ${jsonList(unitCardOf(db, given.today), sql`u.place`)} from (
        select un.*, row_number() over (order by ${severityRank}, us.open_findings desc nulls last, un.name, un.id) as place
        from unit un left join unit_status us on us.unit_id = un.id
        where un.organisation_id = p.organisation_id and un.property_id = p.id and un.archived_at is null
        order by place limit ${UNITS_SHOWN}) u)`.as('units')])
    .where('p.organisationId', '=', given.organisationId).where('p.archivedAt', shape.archived === 'yes' ? 'is not' : 'is', null)
    .$if(shape.isSearched, query => query.where(eb => eb.or([eb('p.name', 'ilike', given.pattern!), addressMatches(given.pattern!),
      eb.exists(eb.selectFrom('unit as un').select('un.id').whereRef('un.propertyId', '=', 'p.id').where('un.name', 'ilike', given.pattern!)),
      eb.exists(eb.selectFrom('tenancy as te').innerJoin('unit as un', 'un.id', 'te.unitId').select('te.id').whereRef('un.propertyId', '=', 'p.id').where('te.tenantName', 'ilike', given.pattern!)),
    ])))
    .$if(shape.isContinued, query => query.where(sql<boolean>`(p.name, p.id) > (${given.fromName}, ${given.fromId}::uuid)`))
    .orderBy('p.name').orderBy('p.id').limit(PROPERTIES + 1))

/** Properties by name with their counts and the units that most need a look; keyset-paged on (name, id). */
export async function listProperties(db: Db, actor: Actor, { search, after, archived }: HomesFilter): Promise<Page<PropertyCard>> {
  const from = readCursor(after, ['text', 'id'])
  const pattern = search ? likeAnywhere(search) : undefined
  const given = { organisationId: actor.organisationId, today: dayIn(actor.timeZone), pattern, fromName: from?.[0], fromId: from?.[1] }
  const rows = await propertyRows.rows(db, given, { archived, isSearched: pattern !== undefined, isContinued: from !== undefined })
  return pageOf(rows, PROPERTIES, row => [row.name, row.id])
}

/** One property with its units by name, archived ones last. */
export async function findPropertyPage(db: Db, actor: Actor, property: Thing<'property'>, { after }: { after?: string }): Promise<PropertyPage> {
  const from = readCursor(after, ['number', 'text', 'id'])
  const id = sql.ref<string>('u.id')
  const gone = sql<number>`(u.archived_at is not null)::int`
  const rows = await db.selectFrom('unit as u').select(['u.id', 'u.name', 'u.propertyId', 'u.archivedAt', gone.as('gone'),
    tenantNameOf(db, id, dayIn(actor.timeZone)).as('tenantName'), statusOf(db, id).as('status'), sectionPartsOf(db, id).as('section')])
    .where('u.organisationId', '=', property.organisationId).where('u.propertyId', '=', property.id)
    .$if(from !== undefined, query => query.where(sql<boolean>`(${gone}, u.name, u.id) > (${from![0]}, ${from![1]}, ${from![2]}::uuid)`))
    .orderBy(gone).orderBy('u.name').orderBy('u.id').limit(UNITS + 1).execute()
  const { rows: shown, next } = pageOf(rows, UNITS, row => [row.gone, row.name, row.id])
  const { organisationId: _organisationId, createdAt: _createdAt, unitId: _unitId, ...facts } = property
  return {
    property: facts,
    units: { rows: shown.map(({ gone: _gone, ...row }) => ({ ...row, propertyName: property.name })), next },
    abilities: abilitiesOf(actor.role),
  }
}

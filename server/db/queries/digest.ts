import { sql } from 'kysely'
import type { StoredFinding } from '../../../shared/types/finding'
import type { DueKind } from '../../../shared/utils/upkeep/dueItems'
import type { UnitsOfMeasure } from '../../../shared/types/people'
import type { Db } from '../connect'
import { fallRiskOfSubject, riskRank } from './riskRank'

/** What digests are made of. Most important first everywhere. */

export interface Home { unitId: string, unitName: string, propertyName: string }
export interface WaitingFinding extends Home { id: string, finding: StoredFinding, changedAt: string }
export interface DueLine extends Home { id: string, kind: DueKind, subjectId: string, dueOn: string, createdAt: string, remindersSent: number, lastRemindedOn: string | null, label: string }

/** More than one mail names; the rest is reached by its link. */
const MOST_FINDINGS = 200

/** Findings that wait for a person, gravest first. */
export async function findWaitingFindings(db: Db, organisationId: string): Promise<WaitingFinding[]> {
  const rows = await db.selectFrom('finding as f').innerJoin('unit as u', 'u.id', 'f.unitId').innerJoin('property as p', 'p.id', 'u.propertyId')
    .select(['f.id', 'f.unitId', 'f.rule', 'f.subjectKind', 'f.subjectId', 'f.severity', 'f.adviceCode', 'f.evidence', 'f.openedAt', 'f.changedAt', 'u.name as unitName', 'p.name as propertyName'])
    .where('f.organisationId', '=', organisationId).where('f.clearedAt', 'is', null).where('f.acknowledgedAt', 'is', null)
    .orderBy(sql`array_position(array['urgent', 'attention', 'notice'], f.severity)`).orderBy(riskRank('f.rule')).orderBy(fallRiskOfSubject('f.subject_id'), 'desc').orderBy('f.openedAt').orderBy('f.id').limit(MOST_FINDINGS).execute()
  return rows.map(({ id, unitId, unitName, propertyName, changedAt, subjectKind, subjectId, ...rest }) => ({
    id, unitId, unitName, propertyName, changedAt,
    finding: { ...rest, id, subject: { kind: subjectKind, id: subjectId }, clearedAt: null, acknowledgedAt: null, acknowledgedReason: null, lookAgainOn: null } as StoredFinding,
  }))
}

/** Open due items with a name for what they are about, the latest first. */
export const findDueLines = (db: Db, organisationId: string): Promise<DueLine[]> =>
  db.selectFrom('dueItem as d').innerJoin('unit as u', 'u.id', 'd.unitId').innerJoin('property as p', 'p.id', 'u.propertyId')
    .leftJoin('mark as m', 'm.id', 'd.subjectId').leftJoin('attic as a', 'a.id', 'd.subjectId').leftJoin('job as j', 'j.id', 'd.subjectId')
    .select(['d.id', 'd.kind', 'd.subjectId', 'd.dueOn', 'd.createdAt', 'd.remindersSent', 'd.lastRemindedOn', 'd.unitId', 'u.name as unitName', 'p.name as propertyName',
      sql<string>`coalesce(m.label, a.name, j.title, '')`.as('label')])
    .where('d.organisationId', '=', organisationId).where('d.settledAt', 'is', null)
    .orderBy('d.dueOn').orderBy('d.id').$castTo<DueLine>().execute()

export interface DigestReader { userId: string, name: string, email: string, role: 'owner' | 'manager' | 'tenant' | 'trades', unitsOfMeasure: UnitsOfMeasure, lastDigestAt: string | null, unitIds: string[], jobIds: string[] }

/** Members who want a digest, with the homes they live in today and the open jobs that are theirs, after a given one. */
export const findDigestReaders = (db: Db, organisationId: string, today: string, afterUserId: string | undefined, limit: number): Promise<DigestReader[]> =>
  db.selectFrom('membership as m').innerJoin('appUser as u', 'u.id', 'm.userId')
    .select(['m.userId', 'u.name', 'u.email', 'm.role', 'u.unitsOfMeasure',
      sql<string | null>`(select max(g.created_at) from message g where g.user_id = m.user_id and g.organisation_id = m.organisation_id and g.kind = 'digest')`.as('lastDigestAt'),
      sql<string[]>`array(select t.unit_id from tenancy_person tp join tenancy t on t.id = tp.tenancy_id
        where tp.user_id = m.user_id and tp.organisation_id = m.organisation_id and t.starts_on <= ${today}::date and (t.ends_on is null or t.ends_on >= ${today}::date))`.as('unitIds'),
      sql<string[]>`array(select j.id from job j where j.assignee_user_id = m.user_id and j.organisation_id = m.organisation_id and j.state in ('planned', 'scheduled'))`.as('jobIds')])
    .where('m.organisationId', '=', organisationId).where('m.endedAt', 'is', null).where('m.digest', '=', true).where('m.role', '!=', 'engineer')
    .$if(afterUserId !== undefined, query => query.where('m.userId', '>', afterUserId!))
    .orderBy('m.userId').limit(limit).$castTo<DigestReader>().execute()

/** Units somebody who wants a digest lives in today: their readings are asked of them first. */
export async function findReachableUnits(db: Db, organisationId: string, today: string): Promise<Set<string>> {
  const rows = await db.selectFrom('tenancy as t').innerJoin('tenancyPerson as tp', 'tp.tenancyId', 't.id').innerJoin('appUser as u', 'u.id', 'tp.userId')
    .innerJoin('membership as m', join => join.onRef('m.userId', '=', 'tp.userId').onRef('m.organisationId', '=', 'tp.organisationId'))
    .select('t.unitId').distinct()
    .where('t.organisationId', '=', organisationId).where('m.endedAt', 'is', null).where('m.digest', '=', true).where('u.mailRefusedAt', 'is', null)
    .where('t.startsOn', '<=', today).where(eb => eb.or([eb('t.endsOn', 'is', null), eb('t.endsOn', '>=', today)])).execute()
  return new Set(rows.map(row => row.unitId))
}

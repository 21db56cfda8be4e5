import { sql } from 'kysely'
import type { z } from 'zod'
import type { FindingsQuery } from '../../../shared/schemas/finding'
import type { Page } from '../../../shared/types/home'
import type { StoredFinding } from '../../../shared/types/finding'
import type { FindingEventRow, FindingList, FindingRow, FindingView } from '../../../shared/types/findingView'
import { lookAgainUntilOn } from '../../../shared/utils/upkeep/lookAgain'
import { correctBy, responseClassOf } from '../../../shared/utils/upkeep/responseTimes'
import type { Db } from '../connect'
import { dayIn } from '../../utils/clock'
import { abilitiesOf } from '../../utils/policy'
import { findResponsePolicy } from './organisations'
import { likeAnywhere, pageOf, readCursor } from '../../utils/cursor'
import { visibleUnits, type Actor } from './actor'
import { fallRiskOfSubject, riskRank } from './riskRank'

const LIMIT = 50

/** 0 is gravest. */
const rank = sql<number>`array_position(array['urgent', 'attention', 'notice'], f.severity)`
const risk = riskRank('f.rule')
/** What could fall on whom, the heaviest first when counted upwards. */
const lightness = sql<number>`-${fallRiskOfSubject('f.subject_id')}`
const subjectLabel = sql<string>`case f.subject_kind when 'mark' then m.label when 'attic' then a.name when 'job' then j.title else u.name end`

const fromFindings = (db: Db) =>
  db.selectFrom('finding as f').innerJoin('unit as u', 'u.id', 'f.unitId').innerJoin('property as p', 'p.id', 'u.propertyId')
    .leftJoin('mark as m', 'm.id', 'f.subjectId').leftJoin('attic as a', 'a.id', 'f.subjectId').leftJoin('job as j', 'j.id', 'f.subjectId')
    .leftJoin('appUser as w', 'w.id', 'f.acknowledgedBy')
    .selectAll('f').select(['u.name as unitName', 'p.name as propertyName', 'm.id as markId', 'a.id as atticId', 'm.atticId as markAtticId', 'w.name as acknowledgedByName', subjectLabel.as('subjectLabel'), rank.as('rank'), risk.as('risk'), lightness.as('lightness')])

type Listed = Awaited<ReturnType<ReturnType<typeof fromFindings>['execute']>>[number]

/** Gravest first, then by what could fall on whom, then what waits longest; keyset-paged. */
export async function listFindings(db: Db, actor: Actor, { list, severity, rule, property, unit, search, after }: z.output<typeof FindingsQuery>): Promise<Page<FindingRow>> {
  const from = readCursor(after, ['number', 'number', 'number', 'text', 'id'])
  const units = visibleUnits(actor)
  const rows = await inList(fromFindings(db), list)
    .where('f.organisationId', '=', actor.organisationId)
    .$if(units !== 'all', query => query.where('f.unitId', '=', sql<string>`any(${units}::uuid[])`))
    .$if(severity !== undefined, query => query.where('f.severity', '=', severity!))
    .$if(rule !== undefined, query => query.where('f.rule', '=', rule!))
    .$if(property !== undefined, query => query.where('u.propertyId', '=', property!))
    .$if(unit !== undefined, query => query.where('f.unitId', '=', unit!))
    .$if(Boolean(search), query => query.where(sql<boolean>`(p.name || ' ' || u.name || ' ' || coalesce(m.label, a.name, j.title, '')) ilike ${likeAnywhere(search!)}`))
    .$if(from !== undefined, query => query.where(sql<boolean>`(${rank}, ${risk}, ${lightness}, f.opened_at, f.id) > (${from![0]}, ${from![1]}, ${from![2]}::float8, ${from![3]}::timestamptz, ${from![4]}::uuid)`))
    .orderBy(rank).orderBy(risk).orderBy(lightness).orderBy('f.openedAt').orderBy('f.id').limit(LIMIT + 1).execute()
  const page = pageOf(rows, LIMIT, row => [row.rank, row.risk, row.lightness, row.openedAt, row.id])
  return { ...page, rows: page.rows.map(asFindingRow) }
}

function inList(listed: ReturnType<typeof fromFindings>, list: FindingList) {
  if (list === 'cleared') return listed.where('f.clearedAt', 'is not', null)
  if (list === 'all') return listed
  const open = listed.where('f.clearedAt', 'is', null)
  return list === 'open' ? open : open.where('f.acknowledgedAt', list === 'waiting' ? 'is' : 'is not', null)
}

const findFinding = (db: Db, id: string) => fromFindings(db).where('f.id', '=', id).executeTakeFirstOrThrow()

const asFindingRow = (row: Listed): FindingRow => ({
  id: row.id, version: row.version, changedAt: row.changedAt,
  unitId: row.unitId, unitName: row.unitName, propertyName: row.propertyName, subjectLabel: row.subjectLabel,
  finding: {
    id: row.id, rule: row.rule, severity: row.severity, evidence: row.evidence, adviceCode: row.adviceCode, subject: { kind: row.subjectKind, id: row.subjectId },
    openedAt: row.openedAt, clearedAt: row.clearedAt, acknowledgedAt: row.acknowledgedAt, acknowledgedReason: row.acknowledgedReason, lookAgainOn: row.lookAgainOn,
  } as StoredFinding,
})

const listFindingEvents = (db: Db, findingId: string): Promise<FindingEventRow[]> =>
  db.selectFrom('findingEvent as e').leftJoin('appUser as w', 'w.id', 'e.actorId')
    .select(['e.id', 'e.kind', 'e.severity', 'e.evidence', 'e.reason', 'w.name as actorName', 'e.happenedAt'])
    .where('e.findingId', '=', findingId).orderBy('e.happenedAt').orderBy('e.id').$castTo<FindingEventRow>().execute()

const listJobsOfFinding = (db: Db, findingId: string) =>
  db.selectFrom('job').select(['id', 'number', 'title', 'state', 'dueOn']).where('findingId', '=', findingId).orderBy('dueOn').orderBy('id').execute()

/** One finding with its history, its jobs, and what the asker may do about it. */
export async function findFindingView(db: Db, actor: Actor, findingId: string): Promise<FindingView> {
  const row = await findFinding(db, findingId)
  const policy = await findResponsePolicy(db, row.organisationId)
  const shown = asFindingRow(row)
  return {
    ...shown,
    acknowledgedByName: row.acknowledgedByName,
    markId: row.markId, atticId: row.atticId ?? row.markAtticId,
    events: await listFindingEvents(db, findingId),
    jobs: await listJobsOfFinding(db, findingId),
    lookAgainUntilOn: lookAgainUntilOn(shown.finding, dayIn(actor.timeZone)),
    correctBy: correctBy(responseClassOf(shown.finding), row.openedAt, policy),
    abilities: abilitiesOf(actor.role),
  }
}

import { sql } from 'kysely'
import type { HindsightRow, LedgerCount, LedgerPage, LedgerRow } from '../../../shared/types/hindsight'
import type { LedgerFilter } from '../../../shared/schemas/hindsight'
import type { Db } from '../connect'
import { pageOf, readCursor } from '../../utils/cursor'
import { riskRank } from './riskRank'
import { visibleUnits, type Actor } from './actor'

const LIMIT = 50

/** What people said of one finding later, newest first. */
export const listHindsight = (db: Db, findingId: string): Promise<HindsightRow[]> =>
  db.selectFrom('findingHindsight as h').innerJoin('appUser as w', 'w.id', 'h.judgedBy')
    .select(['h.id', 'h.outcome', 'h.reason', 'w.name as judgedByName', 'h.judgedAt'])
    .where('h.findingId', '=', findingId).orderBy('h.judgedAt', 'desc').orderBy('h.id', 'desc').limit(100).execute()

/** Findings of the asker's organisation with the newest hindsight of each. */
function fromLedger(db: Db, actor: Actor) {
  const units = visibleUnits(actor)
  return db.selectFrom('finding as f')
    .leftJoinLateral(eb => eb.selectFrom('findingHindsight as x').selectAll('x').whereRef('x.findingId', '=', 'f.id').orderBy('x.judgedAt', 'desc').orderBy('x.id', 'desc').limit(1).as('h'), join => join.onTrue())
    .where('f.organisationId', '=', actor.organisationId)
    .$if(units !== 'all', query => query.where('f.unitId', '=', sql<string>`any(${units}::uuid[])`))
}

const countLedger = (db: Db, actor: Actor): Promise<LedgerCount[]> =>
  fromLedger(db, actor).select([
    'f.rule', sql<number>`count(*)`.as('opened'), sql<number>`count(*) filter (where h.outcome = 'right')`.as('right'),
    sql<number>`count(*) filter (where h.outcome = 'wrong')`.as('wrong'), sql<number>`count(*) filter (where h.outcome is null)`.as('notJudged'),
  ]).groupBy('f.rule').orderBy(riskRank('f.rule')).execute()

/** The ledger: how often each rule was right, and the findings themselves, newest first; keyset-paged. */
export async function readLedger(db: Db, actor: Actor, { list, rule, unit, after }: LedgerFilter): Promise<LedgerPage> {
  const from = readCursor(after, ['text', 'id'])
  const rows = await fromLedger(db, actor)
    .innerJoin('unit as u', 'u.id', 'f.unitId').innerJoin('property as p', 'p.id', 'u.propertyId')
    .leftJoin('mark as m', 'm.id', 'f.subjectId').leftJoin('attic as a', 'a.id', 'f.subjectId').leftJoin('job as j', 'j.id', 'f.subjectId')
    .leftJoin('appUser as w', 'w.id', 'h.judgedBy')
    .select([
      'f.id as findingId', 'f.rule', 'f.severity', 'f.subjectKind', 'f.subjectId', 'f.unitId', 'u.name as unitName', 'p.name as propertyName', 'f.openedAt', 'f.clearedAt',
      sql<string>`coalesce(m.label, a.name, j.title, u.name)`.as('subjectLabel'), 'h.outcome', 'h.reason', 'w.name as judgedByName', 'h.judgedAt',
    ])
    .$if(list === 'not-judged', query => query.where('h.outcome', 'is', null))
    .$if(list === 'right' || list === 'wrong', query => query.where('h.outcome', '=', list as 'right'))
    .$if(rule !== undefined, query => query.where('f.rule', '=', rule!))
    .$if(unit !== undefined, query => query.where('f.unitId', '=', unit!))
    .$if(from !== undefined, query => query.where(sql<boolean>`(f.opened_at, f.id) < (${from![0]}::timestamptz, ${from![1]}::uuid)`))
    .orderBy('f.openedAt', 'desc').orderBy('f.id', 'desc').limit(LIMIT + 1).$castTo<LedgerRow>().execute()
  return { counts: await countLedger(db, actor), ...pageOf(rows, LIMIT, row => [row.openedAt, row.findingId]) }
}

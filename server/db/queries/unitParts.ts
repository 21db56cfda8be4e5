import { sql, type Expression, type ExpressionBuilder, type SelectQueryBuilder } from 'kysely'
import { jsonBuildObject } from 'kysely/helpers/postgres'
import type { Db } from '../connect'
import type { CeilingFinish } from '../../../shared/types/attic'
import type { StoredFinding } from '../../../shared/types/finding'
import type { AtticOfUnit, FieldMeasures } from '../../../shared/types/home'
import { isoInstant, jsonList } from './jsonList'
import { judgedAnswers } from './surveys'
import { fallRiskOfSubject, riskRank } from './riskRank'

/** Subqueries for parts of one unit; `unitId` is a value or a column of the statement around them. */

export const roomsOf = (db: Db, unitId: Expression<string>, kept: 'in use' | 'archived' = 'in use') => db.selectFrom('room as r')
  .select(({ ref }) => jsonList(jsonBuildObject({
    id: ref('r.id'), name: ref('r.name'), isBedroom: ref('r.isBedroom'), lengthFt: ref('r.lengthFt'), widthFt: ref('r.widthFt'),
    ceilingHeightIn: ref('r.ceilingHeightIn'), ceilingFinish: sql.ref<CeilingFinish>('r.ceiling_finish'), sort: ref('r.sort'), version: ref('r.version'),
  }), sql`r.sort, r.id`).as('list'))
  .where('r.unitId', '=', unitId).where('r.archivedAt', kept === 'in use' ? 'is' : 'is not', null)

/** Each attic with what the survey that holds now says in short, and what is in it. */
export const atticsOf = (db: Db, unitId: Expression<string>) => atticRowsOf(db, unitId).select(eb => jsonList(atticFacts(eb), byName).as('list'))

/** The same with the whole survey and the papers in force, for judging the contents. */
export const judgedAtticsOf = (db: Db, unitId: Expression<string>) => atticRowsOf(db, unitId).select(eb => jsonList(sql<AtticOfUnit>`${atticFacts(eb)}::jsonb || jsonb_build_object(
  'survey', latest.answers, 'documents', coalesce(${eb.selectFrom('atticDocument as d').select(({ ref }) => jsonList(jsonBuildObject({
    kind: ref('d.kind'), writtenOn: ref('d.writtenOn'), writtenBy: ref('d.writtenBy'), attached: sql<boolean>`true`, ratedPsf: ref('d.ratedPsf'),
    liftsHold: ref('d.liftsHold'), acceptsStrongbacks: ref('d.acceptsStrongbacks'), coversWholeAttic: ref('d.coversWholeAttic'), area: ref('d.area'),
  }), sql`d.created_at`).as('list')).whereRef('d.atticId', '=', 'a.id').where('d.withdrawnAt', 'is', null)}, '[]'::json)::jsonb)`, byName).as('list'))

const byName = sql`a.name, a.id`

const atticRowsOf = (db: Db, unitId: Expression<string>) => db.selectFrom('attic as a')
  .leftJoin('atticStatus as judged', 'judged.atticId', 'a.id')
  .leftJoinLateral(eb => eb.selectFrom('atticSurvey as s')
    .select([judgedAnswers().as('answers'), 's.surveyedOn', 's.ratedPsf', 's.onHold', 's.basis', sql<FieldMeasures[]>`(
      select json_agg(json_build_object('spanFt', f->'spanFt', 'spacingIn', f->'spacingIn', 'joistCount', f->'joistCount') order by n)
      from jsonb_array_elements(s.answers->'joistFields') with ordinality as field(f, n))`.as('fields')])
    .whereRef('s.atticId', '=', 'a.id').orderBy('s.createdAt', 'desc').orderBy('s.id', 'desc').limit(1).as('latest'), join => join.onTrue())
  .leftJoinLateral(eb => eb.selectFrom('atticItem as i')
    .select(({ ref }) => [
      sql<number>`coalesce(sum(i.quantity * i.typical_lb), 0)`.as('storedLb'),
      jsonList(jsonBuildObject({
        id: ref('i.id'), name: ref('i.name'), quantity: ref('i.quantity'), lowLb: ref('i.lowLb'), typicalLb: ref('i.typicalLb'), highLb: ref('i.highLb'),
        weightSource: ref('i.weightSource'), fieldNumber: ref('i.fieldNumber'), xFt: ref('i.xFt'), yFt: ref('i.yFt'), lengthFt: ref('i.lengthFt'), widthFt: ref('i.widthFt'),
      }), sql`i.quantity * i.typical_lb desc, i.id`).as('items'),
    ])
    .whereRef('i.atticId', '=', 'a.id').where('i.removedOn', 'is', null).as('stored'), join => join.onTrue())
  .where('a.unitId', '=', unitId).where('a.archivedAt', 'is', null)

type AtticRows = ReturnType<typeof atticRowsOf> extends SelectQueryBuilder<infer DB, infer TB, object> ? ExpressionBuilder<DB, TB> : never

const atticFacts = ({ ref, fn }: AtticRows) => jsonBuildObject({
  id: ref('a.id'), name: ref('a.name'), notes: ref('a.notes'), inventoryConfirmedOn: ref('a.inventoryConfirmedOn'),
  surveyedOn: ref('latest.surveyedOn'), basis: ref('latest.basis'),
  // As judged with the documents on file; before the first judgement as the survey alone says.
  ratedPsf: fn.coalesce('judged.ratedPsf', 'latest.ratedPsf'), onHold: sql<boolean | null>`case when judged.attic_id is null then latest.on_hold else judged.load_state = 'hold' end`,
  loadState: ref('judged.loadState'), utilisation: ref('judged.utilisation'), storedLb: sql<number>`stored.stored_lb`, fields: sql<FieldMeasures[]>`coalesce(latest.fields, '[]'::json)`, items: ref('stored.items').$notNull(),
})

/** Closed marks stay on their own pages. */
export const marksOf = (db: Db, unitId: Expression<string>) => db.selectFrom('mark as m')
  .select(({ ref }) => jsonList(jsonBuildObject({
    id: ref('m.id'), number: ref('m.number'), kind: ref('m.kind'), label: ref('m.label'), roomId: ref('m.roomId'), pinX: ref('m.pinX'), pinY: ref('m.pinY'),
    activity: ref('m.activity'), state: ref('m.state'), lastValue: ref('m.lastValue'), lastReadOn: ref('m.lastReadOn'), slopePerYear: ref('m.slopePerYear'),
    nextReadingOn: ref('m.nextReadingOn'), widthClass: ref('m.widthClass'), stainState: ref('m.stainState'),
  }), sql`m.number`).as('list'))
  .where('m.unitId', '=', unitId).where('m.state', '!=', 'closed')

export const findingsOf = (db: Db, unitId: Expression<string>) => db.selectFrom('finding as f')
  .select(({ ref }) => jsonList(sql<StoredFinding>`${jsonBuildObject({
    id: ref('f.id'), rule: ref('f.rule'), subject: jsonBuildObject({ kind: ref('f.subjectKind'), id: ref('f.subjectId') }), severity: ref('f.severity'),
    adviceCode: ref('f.adviceCode'), evidence: ref('f.evidence'), openedAt: isoInstant(ref('f.openedAt')), clearedAt: ref('f.clearedAt'),
    acknowledgedAt: isoInstant(ref('f.acknowledgedAt')), acknowledgedReason: ref('f.acknowledgedReason'), lookAgainOn: ref('f.lookAgainOn'),
  })}`, sql`array_position(array['urgent', 'attention', 'notice'], f.severity), ${riskRank('f.rule')}, ${fallRiskOfSubject('f.subject_id')} desc, f.opened_at desc, f.id`).as('list'))
  .where('f.unitId', '=', unitId).where('f.clearedAt', 'is', null)

/** What is still to be done or to be confirmed. */
export const jobsOf = (db: Db, unitId: Expression<string>) => db.selectFrom('job as j')
  .select(({ ref }) => jsonList(jsonBuildObject({
    id: ref('j.id'), number: ref('j.number'), title: ref('j.title'), priority: ref('j.priority'), state: ref('j.state'), dueOn: ref('j.dueOn'), scheduledOn: ref('j.scheduledOn'),
  }), sql`j.due_on, j.number`).as('list'))
  .where('j.unitId', '=', unitId).where('j.state', 'in', ['planned', 'scheduled', 'done'])

/** All of them for those who edit homes; otherwise only the asker's own. */
export const tenanciesOf = (db: Db, unitId: Expression<string>, onlyOf: string | null) => db.selectFrom('tenancy as t')
  .select(({ ref, selectFrom }) => jsonList(jsonBuildObject({
    id: ref('t.id'), tenantName: ref('t.tenantName'), startsOn: ref('t.startsOn'), endsOn: ref('t.endsOn'),
    notes: onlyOf === null ? ref('t.notes') : sql<string>`''::text`, version: ref('t.version'),
    people: sql<string[]>`coalesce(${selectFrom('tenancyPerson as tp').innerJoin('appUser as au', 'au.id', 'tp.userId')
      .select(sql`json_agg(au.name order by au.name)`.as('names')).whereRef('tp.tenancyId', '=', 't.id')}, '[]'::json)`,
  }), sql`t.starts_on desc, t.id`).as('list'))
  .where('t.unitId', '=', unitId)
  .$if(onlyOf !== null, query => query.where(eb => eb.exists(eb.selectFrom('tenancyPerson as mine').select('mine.userId').whereRef('mine.tenancyId', '=', 't.id').where('mine.userId', '=', onlyOf!))))

export const statusOf = (db: Db, unitId: Expression<string>) => db.selectFrom('unitStatus as us')
  .select(({ ref }) => jsonBuildObject({
    worstSeverity: ref('us.worstSeverity'), openFindings: ref('us.openFindings'), topFindingId: ref('us.topFindingId'), atticCount: ref('us.atticCount'),
    loadState: ref('us.loadState'), utilisation: ref('us.utilisation'), storedLb: ref('us.storedLb'), openMarks: ref('us.openMarks'),
    activeMarks: ref('us.activeMarks'), lateReadings: ref('us.lateReadings'),
  }).as('status'))
  .where('us.unitId', '=', unitId)

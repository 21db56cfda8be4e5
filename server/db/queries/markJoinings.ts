import { sql } from 'kysely'
import { compiledOnce } from '../compiledOnce'
import type { Db } from '../connect'
import type { Activity, MarkKind } from '../../../shared/types/mark'
import type { MarkDeed, MarkState } from '../../../shared/types/markPage'

interface Given { markId: string }

const standing = compiledOnce((db, { markId }: Given) =>
  db.selectFrom('markJoining as j').innerJoin('mark as m', 'm.id', 'j.markId').innerJoin('mark as i', 'i.id', 'j.intoId').innerJoin('appUser as u', 'u.id', 'j.joinedBy')
    .select(['j.markId', 'm.number', 'm.label', 'j.intoId', 'i.number as intoNumber', 'i.label as intoLabel', 'j.reason', 'j.joinedAt', 'u.name as joinedBy'])
    .where('j.undoneAt', 'is', null).where(eb => eb.or([eb('j.markId', '=', markId), eb('j.intoId', '=', markId)])).orderBy('j.joinedAt'))

/** Joinings that stand, of this mark into another and of others into this one. */
export async function listJoinings(db: Db, markId: string) {
  const rows = await standing.rows(db, { markId })
  return {
    joinedInto: rows.find(row => row.markId === markId) ?? null,
    joinedFrom: rows.filter(row => row.intoId === markId),
  }
}

const marksOfCeilings = compiledOnce((db, { unitId }: { unitId: string }) =>
  db.selectFrom('mark as m').innerJoin('room as r', 'r.id', 'm.roomId')
    .select(['m.id', 'm.number', 'm.label', 'm.kind', 'm.state', 'm.activity', 'm.roomId', 'r.name as roomName', 'm.pinX', 'm.pinY', 'm.lastValue', 'm.lastReadOn', 'm.nextReadingOn', 'm.version'])
    .where('m.unitId', '=', unitId).where('m.joinedInto', 'is', null).orderBy('m.number').limit(500)
    .$castTo<{ id: string, number: number, label: string, kind: MarkKind, state: MarkState, activity: Activity, roomId: string, roomName: string, pinX: number, pinY: number, lastValue: number | null, lastReadOn: string | null, nextReadingOn: string | null, version: number }>())

/** Every mark of a home but those that count as part of another. */
export const listCeilingMarks = (db: Db, unitId: string) => marksOfCeilings.rows(db, { unitId })

const deeds = compiledOnce((db, { markId }: Given) =>
  db.selectFrom('recordEntry').select(['action', 'recordedAt', 'actorName', sql<string | null>`after ->> 'happenedOn'`.as('happenedOn'), sql<string | null>`after ->> 'reason'`.as('reason')])
    .where('subjectId', '=', markId).where('subjectKind', '=', 'mark')
    .where('action', 'in', ['mark repaired', 'mark reopened', 'mark closed', 'marks joined', 'joining undone', 'mark split'])
    .orderBy('seq', 'desc').limit(100).$castTo<MarkDeed>())

/** What people did with a mark, newest first, from the record. */
export const listMarkDeeds = (db: Db, markId: string) => deeds.rows(db, { markId })

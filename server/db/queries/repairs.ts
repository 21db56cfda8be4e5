import { compiledOnce } from '../compiledOnce'
import type { Db } from '../connect'

const repairsOf = compiledOnce((db, { markId }: { markId: string }) =>
  db.selectFrom('markRepair as r').innerJoin('appUser as u', 'u.id', 'r.recordedBy')
    .select(['r.id', 'r.repairedOn', 'r.recordedAt', 'r.reason', 'u.name as recordedBy']).where('r.markId', '=', markId).orderBy('r.repairedOn').orderBy('r.recordedAt').orderBy('r.id'))

/** Repairs of a mark, oldest first; each begins a segment. */
export const listRepairs = (db: Db, markId: string) => repairsOf.rows(db, { markId })

import type { Db } from '../connect'
import type { Actor } from './actor'
import type { RecordPage, RecordRow, RecordSubjectKind } from '../../../shared/types/record'
import { cursorOf, readCursor } from '../../utils/cursor'
import { reachOf } from '../../utils/policy'
import { verifyChain } from '../commands/appendRecord'

const LIMIT = 50
export const HIDDEN = 'not shown to your role'

/** How to get in, who lives there and what was paid are the landlord's business, not an outside reviewer's. */
const PRIVATE = new Set(['accessNotes', 'tenantName', 'email', 'toAddress', 'phone', 'costCents'])

/** One chain, newest entry first. The first page also checks the whole chain. */
export async function findRecordPage(db: Db, actor: Actor, chainId: string, { after, subject }: { after?: string, subject?: RecordSubjectKind }): Promise<RecordPage> {
  const from = readCursor(after, ['number'])
  const rows = await db.selectFrom('recordEntry')
    .select(['id', 'seq', 'recordedAt', 'actorName', 'action', 'subjectKind', 'subjectId', 'before', 'after', 'hash'])
    .where('chainId', '=', chainId).where('organisationId', '=', actor.organisationId)
    .$if(subject !== undefined, query => query.where('subjectKind', '=', subject!))
    .$if(from !== undefined, query => query.where('seq', '<', Math.trunc(from![0])))
    .orderBy('seq', 'desc').limit(LIMIT + 1).execute() as RecordRow[]
  const shown = rows.slice(0, LIMIT)
  return {
    rows: reachOf(actor.role, 'edit homes') ? shown : shown.map(withoutPrivate),
    next: rows.length > LIMIT ? cursorOf([shown.at(-1)!.seq]) : null,
    chain: from ? null : await verifyChain(db, chainId),
  }
}

const withoutPrivate = (row: RecordRow): RecordRow => ({ ...row, before: veiled(row.before), after: veiled(row.after) })

const veiled = (values: RecordRow['before']) => values
  && Object.fromEntries(Object.entries(values).map(([key, value]) => [key, PRIVATE.has(key) && value ? HIDDEN : value]))

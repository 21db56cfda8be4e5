import { sql } from 'kysely'
import type { z } from 'zod'
import type { MessagesQuery } from '../../../shared/schemas/organisation'
import type { Page } from '../../../shared/types/home'
import type { MessageRow } from '../../../shared/types/review'
import type { Db } from '../connect'
import { pageOf, readCursor } from '../../utils/cursor'
import type { Actor } from './actor'

const LIMIT = 25

/** Mail of the organisation, newest first, without its words: they may hold a private link. Keyset-paged. */
export async function listMessages(db: Db, actor: Actor, { state, after }: z.output<typeof MessagesQuery>): Promise<Page<MessageRow>> {
  const from = readCursor(after, ['text', 'id'])
  const rows = await db.selectFrom('message').select(['id', 'kind', 'mailClass', 'toAddress', 'subject', 'state', 'attempts', 'lastError', 'createdAt', 'nextAttemptAt', 'sentAt'])
    .where('organisationId', '=', actor.organisationId)
    .$if(state !== undefined, query => query.where('state', '=', state!))
    .$if(from !== undefined, query => query.where(sql<boolean>`(created_at, id) < (${from![0]}::timestamptz, ${from![1]}::uuid)`))
    .orderBy('createdAt', 'desc').orderBy('id', 'desc').limit(LIMIT + 1).execute()
  return pageOf(rows, LIMIT, row => [row.createdAt, row.id])
}

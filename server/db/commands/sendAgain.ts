import type { Db } from '../connect'
import { nowInstant } from '../../utils/clock'
import { kickMail } from '../../utils/kickMail'
import { problem } from '../../utils/problems'
import type { Actor } from '../queries/actor'
import type { Thing } from '../queries/things'
import { appendRecord } from './appendRecord'

/** Puts a failed message back among the waiting ones, with all its tries. One that was sent is never sent twice. */
export async function sendAgain(db: Db, actor: Actor, message: Thing<'message'>): Promise<{ id: string, state: 'queued' }> {
  await db.transaction().execute(async (trx) => {
    const row = await trx.updateTable('message').set({ state: 'queued', attempts: 0, nextAttemptAt: nowInstant() })
      .where('id', '=', message.id).where('state', '=', 'failed').returning('id').executeTakeFirst()
    if (!row) throw problem(409, 'not-failed', 'This message has not failed: it was sent, or is still waiting for its turn.')
    await appendRecord(trx, actor, { organisationId: message.organisationId, unitId: null, subjectKind: 'message', subjectId: message.id, action: 'message sent again', after: { kind: message.kind, toAddress: message.toAddress } })
  })
  kickMail()
  return { id: message.id, state: 'queued' }
}

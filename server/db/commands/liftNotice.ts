import type { LiftingValue } from '../../../shared/schemas/notice'
import type { NoticeView } from '../../../shared/types/notice'
import { nowInstant } from '../../utils/clock'
import { problem } from '../../utils/problems'
import type { Db } from '../connect'
import type { Actor } from '../queries/actor'
import { findNoticeView } from '../queries/notices'
import type { Thing } from '../queries/things'
import { appendRecord } from './appendRecord'
import { lockUnit } from './lockUnit'

/** Ends a notice with the reason, by a person and never by itself. What was raised stays as it was. */
export async function liftNotice(db: Db, actor: Actor, notice: Thing<'notice'>, { reason }: LiftingValue): Promise<NoticeView> {
  const { id, organisationId, unitId } = notice
  await db.transaction().execute(async (trx) => {
    await lockUnit(trx, organisationId, unitId)
    const lifted = await trx.updateTable('keepClearNotice').set({ liftedAt: nowInstant(), liftedBy: actor.userId, liftedReason: reason })
      .where('id', '=', id).where('liftedAt', 'is', null).returning(['cause', 'roomId']).executeTakeFirst()
    if (!lifted) throw problem(409, 'already-lifted', 'This notice has been lifted already.')
    const room = await trx.selectFrom('room').select('name').where('id', '=', lifted.roomId).executeTakeFirstOrThrow()
    await appendRecord(trx, actor, { organisationId, unitId, subjectKind: 'notice', subjectId: id, action: 'keep-clear notice lifted', after: { name: room.name, cause: lifted.cause, reason } })
  })
  return findNoticeView(db, actor, id)
}

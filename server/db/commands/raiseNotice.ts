import type { z } from 'zod'
import type { NoticeInput } from '../../../shared/schemas/notice'
import type { NoticeView } from '../../../shared/types/notice'
import { WAITING_WORDS, WHOLE_ROOM } from '../../../shared/utils/messages/keepClearMessages'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { problem } from '../../utils/problems'
import type { Db, Trx } from '../connect'
import type { Actor } from '../queries/actor'
import { findNoticeView, findOpenCauses } from '../queries/notices'
import type { Thing } from '../queries/things'
import { appendRecord } from './appendRecord'
import { lockUnit } from './lockUnit'
import { refuseArchived } from './refuseArchived'

type Room = Thing<'room'>

/** Keeps a room clear from now on, for a cause that is open now. One a room: a second tap finds the first. */
export async function raiseNotice(db: Db, actor: Actor, room: Room, { atticId, findingId, area = WHOLE_ROOM, waitingFor }: z.output<typeof NoticeInput>): Promise<NoticeView> {
  const id = newId()
  await db.transaction().execute(async (trx) => {
    await lockUnit(trx, room.organisationId, room.unitId)
    refuseArchived(room, 'room')
    await refuseSecond(trx, room)
    const cause = await openCauseFor(trx, room, { atticId, findingId })
    const notice = { cause, area, waitingFor: waitingFor ?? WAITING_WORDS[cause], atticId, findingId }
    await trx.insertInto('keepClearNotice').values({ id, organisationId: room.organisationId, unitId: room.unitId, roomId: room.id, ...notice, raisedAt: nowInstant(), raisedBy: actor.userId }).execute()
    await appendRecord(trx, actor, { organisationId: room.organisationId, unitId: room.unitId, subjectKind: 'notice', subjectId: id, action: 'keep-clear notice raised', after: { name: room.name, ...notice } })
  })
  return findNoticeView(db, actor, id)
}

async function refuseSecond(trx: Trx, room: Room) {
  const standing = await trx.selectFrom('keepClearNotice').select('id').where('roomId', '=', room.id).where('liftedAt', 'is', null).executeTakeFirst()
  if (standing) throw problem(409, 'notice-stands', `A notice for ${room.name} stands already.`, { noticeId: standing.id })
}

async function openCauseFor(trx: Trx, room: Room, { atticId, findingId }: { atticId: string | null, findingId: string | null }) {
  const causes = await findOpenCauses(trx, { unitId: room.unitId })
  const found = causes.find(cause => findingId ? cause.findingId === findingId && cause.roomId === room.id : cause.atticId === atticId)
  if (!found) throw problem(409, 'no-cause', 'Nothing here calls for a notice just now: the attic is neither over nor on hold, or the finding has cleared.')
  return found.cause
}

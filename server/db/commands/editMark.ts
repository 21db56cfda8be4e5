import { sql } from 'kysely'
import type { Db, Trx } from '../connect'
import type { Actor } from '../queries/actor'
import type { MarkEditValue } from '../../../shared/schemas/mark'
import { SHAPES_BY_KIND } from '../../../shared/types/mark'
import { dayIn, nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { clash, notFound, problem, unsound } from '../../utils/problems'
import { appendRecord } from './appendRecord'
import { editRow } from './editRow'
import { judgeMark } from './judgeMark'
import { lockUnit } from './lockUnit'
import type { FollowedMark } from './openMark'
import { placeInSegments } from './placeInSegments'

/** Facts of a mark, or one change of its state; judged again, since both can change what stands. */
export async function editMark(db: Db, actor: Actor, mark: FollowedMark, { version, change, pin, ...facts }: MarkEditValue): Promise<FollowedMark> {
  return db.transaction().execute(async (trx) => {
    await lockUnit(trx, mark.organisationId, mark.unitId)
    let current = version
    const patch = { ...facts, ...(pin ? { pinX: pin.xShare, pinY: pin.yShare } : {}) }
    if (Object.keys(patch).length > 0) {
      await checkFacts(trx, actor, mark, facts)
      const edited = await editRow<FollowedMark>(trx, actor, {
        table: 'mark', id: mark.id, version, patch,
        record: { organisationId: mark.organisationId, unitId: mark.unitId, subjectKind: 'mark', action: 'mark edited' },
      })
      current = edited.version
    }
    if (change) await changeState(trx, actor, mark.id, current, change)
    await judgeMark(trx, actor, mark.id)
    return await trx.selectFrom('mark').selectAll().where('id', '=', mark.id).executeTakeFirstOrThrow()
  })
}

type Facts = Omit<MarkEditValue, 'version' | 'change' | 'pin'>

async function checkFacts(trx: Trx, actor: Actor, mark: FollowedMark, facts: Facts) {
  const own = (table: 'room' | 'attic', id: string) => trx.selectFrom(table).select('id').where('id', '=', id).where('unitId', '=', mark.unitId).executeTakeFirst()
  if (facts.roomId && !await own('room', facts.roomId)) throw unsound({ roomId: 'Choose a room of this home.' })
  if (facts.atticId && !await own('attic', facts.atticId)) throw unsound({ atticId: 'Choose an attic of this home.' })
  if (facts.shape && !(SHAPES_BY_KIND[mark.kind] as readonly string[]).includes(facts.shape)) throw unsound({ shape: 'That picture belongs to another kind of mark.' })
  if (facts.firstSeenOn && facts.firstSeenOn > dayIn(actor.timeZone)) throw unsound({ firstSeenOn: 'That day is still to come.' })
}

const FROM = { repaired: ['open'], reopened: ['repaired', 'closed'], closed: ['open', 'repaired'] } as const
const TO = { repaired: 'repaired', reopened: 'open', closed: 'closed' } as const

const openReports = (trx: Trx, markId: string) => trx.selectFrom('observation').select(['id', 'dangerSigns']).where('markId', '=', markId).where('correctedAt', 'is', null).execute()

const hasStandingDanger = async (trx: Trx, markId: string) => (await openReports(trx, markId)).some(report => report.dangerSigns.length > 0)

/** A filled crack does not tell that a danger is over: reports of danger stay until somebody says so on the report itself. */
async function settlePlainReports(trx: Trx, markId: string) {
  const ids = (await openReports(trx, markId)).filter(report => report.dangerSigns.length === 0).map(report => report.id)
  if (ids.length === 0) return
  const at = nowInstant()
  await trx.updateTable('observation').set(eb => ({ correctedAt: at, startedAt: eb.fn.coalesce('startedAt', eb.val(at)) })).where('id', 'in', ids).execute()
}

/** Readings of later days, entered before the repair was, go over into the new segment. */
async function keepRepair(trx: Trx, actor: Actor, { id, organisationId }: FollowedMark, { happenedOn, reason }: NonNullable<MarkEditValue['change']>) {
  await trx.insertInto('markRepair').values({ id: newId(), organisationId, markId: id, repairedOn: happenedOn, reason, recordedBy: actor.userId, recordedAt: nowInstant() }).execute()
  await placeInSegments(trx, id)
}

/** A repair starts a new segment, so that no trend runs across it. Repair and closing settle what was reported, danger excepted. */
async function changeState(trx: Trx, actor: Actor, id: string, version: number, change: NonNullable<MarkEditValue['change']>) {
  const before = await trx.selectFrom('mark').selectAll().where('id', '=', id).forUpdate().executeTakeFirst()
  if (!before) throw notFound()
  if (before.version !== version) throw clash(before)
  if (!(FROM[change.to] as readonly string[]).includes(before.state)) throw problem(409, 'state-does-not-allow', `This mark is ${before.state}, so it cannot be ${change.to}.`)
  if (change.happenedOn > dayIn(actor.timeZone)) throw unsound({ 'change.happenedOn': 'That day is still to come.' })
  if (change.to === 'closed' && await hasStandingDanger(trx, id)) {
    throw problem(409, 'danger-stands', 'A danger sign was reported here and nobody has put it right yet. Say on that report what was found and done; then the mark can be closed.')
  }
  if (before.joinedInto) throw problem(409, 'mark-joined', 'This mark counts as part of another one. Undo the joining first.')
  await trx.updateTable('mark').set({ state: TO[change.to], version: sql`version + 1` }).where('id', '=', id).execute()
  if (change.to === 'repaired') await keepRepair(trx, actor, before, change)
  const after = await trx.selectFrom('mark').selectAll().where('id', '=', id).executeTakeFirstOrThrow()
  if (change.to !== 'reopened') await settlePlainReports(trx, id)
  await appendRecord(trx, actor, {
    organisationId: before.organisationId, unitId: before.unitId, subjectKind: 'mark', subjectId: id, action: `mark ${change.to}`,
    before: { state: before.state, segment: before.segment }, after: { state: after.state, segment: after.segment, happenedOn: change.happenedOn, reason: change.reason },
  })
}

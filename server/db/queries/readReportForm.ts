import type { Db } from '../connect'
import type { PaperSize } from '../../../shared/types/paper'
import { reportForm } from '../../../shared/utils/papers/reportForm'
import { now } from '../../utils/clock'
import type { ReportForm } from '../../utils/papers/reportForm'
import { notFound } from '../../utils/problems'
import type { Actor } from './actor'
import { findPaperReader } from './paperReader'

/** The form for one home, with its rooms to tick. */
export async function readReportForm(db: Db, actor: Actor, unitId: string, asked?: PaperSize): Promise<ReportForm> {
  const [place, rooms, { system, size, contact }] = await Promise.all([
    db.selectFrom('unit as u').innerJoin('property as p', 'p.id', 'u.propertyId').select(['u.name as unitName', 'p.name as propertyName']).where('u.id', '=', unitId).executeTakeFirst(),
    db.selectFrom('room').select('name').where('unitId', '=', unitId).where('archivedAt', 'is', null).orderBy('sort').orderBy('id').execute(),
    findPaperReader(db, actor, asked),
  ])
  if (!place) throw notFound()
  return { size, contact, home: `${place.propertyName}, ${place.unitName}`, blocks: reportForm({ rooms: rooms.map(({ name }) => name), system }), madeAt: now() }
}

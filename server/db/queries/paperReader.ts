import { compiledOnce } from '../compiledOnce'
import type { Db } from '../connect'
import type { PaperContact, PaperSize } from '../../../shared/types/paper'
import type { UnitsOfMeasure } from '../../../shared/types/people'
import { notFound } from '../../utils/problems'
import type { Actor } from './actor'

const readerRow = compiledOnce((db, { userId, organisationId }: { userId: string, organisationId: string }) =>
  db.selectFrom('appUser as u').innerJoin('membership as m', 'm.userId', 'u.id').innerJoin('organisation as o', 'o.id', 'm.organisationId')
    .select(['u.unitsOfMeasure', 'o.name as organisationName', 'o.contactPhone as phone'])
    .where('u.id', '=', userId).where('o.id', '=', organisationId))

export interface PaperReader { system: UnitsOfMeasure, contact: PaperContact, size: PaperSize }

/** In whose units a paper is printed, on which sheet, and whom it names; Letter goes with US customary unless A4 is asked for. */
export async function findPaperReader(db: Db, actor: Pick<Actor, 'userId' | 'organisationId'>, asked?: PaperSize): Promise<PaperReader> {
  const row = await readerRow.first(db, { userId: actor.userId, organisationId: actor.organisationId })
  if (!row) throw notFound()
  const { unitsOfMeasure: system, organisationName, phone } = row
  return { system, contact: { organisationName, phone }, size: asked ?? (system === 'us' ? 'letter' : 'a4') }
}

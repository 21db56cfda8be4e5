import type { Selectable } from 'kysely'
import { formatDay } from '../../../shared/utils/days'
import { problem, unsound } from '../../utils/problems'
import type { Trx } from '../connect'
import type { AtticItemTable } from '../schema/attics'
import { lockAttic } from './lockAttic'

export type ItemRow = Selectable<AtticItemTable>

/** The item as it stands now, held until the commit. What has been taken out stays as it left. */
export async function lockItem(trx: Trx, item: ItemRow): Promise<ItemRow> {
  await lockAttic(trx, { id: item.atticId, organisationId: item.organisationId, unitId: item.unitId })
  const now = await trx.selectFrom('atticItem').selectAll().where('id', '=', item.id).executeTakeFirstOrThrow()
  if (now.removedOn) throw problem(409, 'taken-out', `${now.name} was taken out on ${formatDay(now.removedOn)}. Enter it anew if it came back.`)
  return now
}

/** Steps of one item go forward in time; otherwise the load on the days between would be wrong. */
export async function refuseBeforeLastStep(trx: Trx, field: string, day: string, itemId: string) {
  const { on } = await trx.selectFrom('loadEvent').select(eb => eb.fn.max('happenedOn').as('on')).where('itemId', '=', itemId).executeTakeFirstOrThrow()
  if (on && day < on) throw unsound({ [field]: `Its last change was on ${formatDay(on)}. Give that day or a later one.` })
}

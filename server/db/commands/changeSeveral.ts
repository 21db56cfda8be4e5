import type { Db } from '../connect'
import type { AtticItemBulkValue } from '../../../shared/schemas/atticItem'
import { notFound } from '../../utils/problems'
import type { RecordActor } from './appendRecord'
import { takeOut } from './changeItems'
import { editRow } from './editRow'
import { judgeAttic } from './judgeAttic'
import { lockAttic, type AtticRef } from './lockAttic'
import type { ItemRow } from './lockItem'
import { refuseFuture } from './refuseFuture'

/** One change to several things of an attic, all or none; each keeps its own step of the history and the record. */
export function changeSeveral(db: Db, actor: RecordActor & { userId: string, timeZone: string }, attic: AtticRef, { items, change }: AtticItemBulkValue) {
  if (change.kind === 'take-out') refuseFuture('removedOn', change.removedOn, actor)
  return db.transaction().execute(async (trx) => {
    await lockAttic(trx, attic)
    const rows = await trx.selectFrom('atticItem').selectAll().where('atticId', '=', attic.id).where('removedOn', 'is', null).execute()
    for (const { itemId, version } of items) {
      const item = rows.find(row => row.id === itemId)
      if (!item) throw notFound()
      if (change.kind === 'take-out') await takeOut(trx, actor, item, { removedOn: change.removedOn, version })
      else await editRow<ItemRow>(trx, actor, {
        table: 'atticItem', id: item.id, version, patch: { belongsTo: change.belongsTo },
        record: { organisationId: attic.organisationId, unitId: attic.unitId, subjectKind: 'item', action: 'item changed' },
      })
    }
    await judgeAttic(trx, actor, attic.id)
    return { changed: items.length }
  })
}

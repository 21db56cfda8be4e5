import type { Db } from '../connect'
import { nowInstant } from '../../utils/clock'
import { problem } from '../../utils/problems'
import { sumStoredLb } from '../queries/attics'
import type { RecordActor } from './appendRecord'
import { editRow } from './editRow'
import { judgeAttic } from './judgeAttic'
import type { AtticRef } from './lockAttic'
import { lockUnit } from './lockUnit'

/** Sets an attic aside. Not while something is stored in it: the load would drop out of sight. */
export function archiveAttic(db: Db, actor: RecordActor, attic: AtticRef, version: number) {
  return setArchived(db, actor, attic, version, nowInstant())
}

export function restoreAttic(db: Db, actor: RecordActor, attic: AtticRef, version: number) {
  return setArchived(db, actor, attic, version, null)
}

function setArchived(db: Db, actor: RecordActor, attic: AtticRef, version: number, archivedAt: string | null) {
  return db.transaction().execute(async (trx) => {
    await lockUnit(trx, attic.organisationId, attic.unitId)
    const storedLb = await sumStoredLb(trx, attic.id)
    if (archivedAt && storedLb > 0) throw problem(409, 'still-loaded', 'Something is still stored here. Take it out first, so that no load drops out of sight.', { storedLb })
    const row = await editRow(trx, actor, {
      table: 'attic', id: attic.id, version, patch: { archivedAt },
      record: { organisationId: attic.organisationId, unitId: attic.unitId, subjectKind: 'attic', action: archivedAt ? 'attic archived' : 'attic restored' },
    })
    await judgeAttic(trx, actor, attic.id)
    return row
  })
}

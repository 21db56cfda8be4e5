import type { Db } from '../connect'
import { nowInstant } from '../../utils/clock'
import { problem } from '../../utils/problems'
import { sumStoredLb } from '../queries/attics'
import type { RecordActor } from './appendRecord'
import { editRow } from './editRow'
import { judgeAttic } from './judgeAttic'

/** Sets an attic aside. Not while something is stored in it: the load would drop out of sight. */
export function archiveAttic(db: Db, actor: RecordActor, attic: { id: string, organisationId: string, unitId: string }, version: number) {
  return db.transaction().execute(async (trx) => {
    const storedLb = await sumStoredLb(trx, attic.id)
    if (storedLb > 0) throw problem(409, 'still-loaded', 'Something is still stored here. Take it out first, so that no load drops out of sight.', { storedLb })
    const row = await editRow(trx, actor, {
      table: 'attic', id: attic.id, version, patch: { archivedAt: nowInstant() },
      record: { organisationId: attic.organisationId, unitId: attic.unitId, subjectKind: 'attic', action: 'attic archived' },
    })
    await judgeAttic(trx, actor, attic.id)
    return row
  })
}

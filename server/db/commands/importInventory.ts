import type { Db } from '../connect'
import type { ListImported, ListPreview } from '../../../shared/types/inventoryList'
import { findLatestSurvey } from '../queries/attics'
import { dayIn, nowInstant } from '../../utils/clock'
import { readInventoryList } from '../../utils/inventoryList'
import { newId } from '../../utils/newId'
import { problem, unsound } from '../../utils/problems'
import { appendRecord, type RecordActor } from './appendRecord'
import { putItem } from './changeItems'
import { judgeAttic } from './judgeAttic'
import { lockAttic, type AtticRef } from './lockAttic'

type Person = RecordActor & { userId: string, timeZone: string }

/** What reading this list in would do. Writes nothing. */
export async function previewInventory(db: Db, actor: Person, attic: AtticRef, csv: string): Promise<ListPreview> {
  const survey = await findLatestSurvey(db, attic.id)
  const { items: _items, ...preview } = readInventoryList(csv, { survey: survey?.answers ?? null, today: dayIn(actor.timeZone) })
  return preview
}

/** Puts every row of a list into the attic, or none; bad rows are left out only when that was said. The same key answers the first time's. */
export function importInventory(db: Db, actor: Person, attic: AtticRef, { csv, skipBad, clientKey }: { csv: string, skipBad: boolean, clientKey: string | undefined }): Promise<ListImported> {
  if (!clientKey) throw problem(422, 'idempotency-key-needed', 'This list came without its own key, so that sending it twice could not be told apart. Please open the page again.')
  return db.transaction().execute(async (trx) => {
    await lockAttic(trx, attic)
    const earlier = await trx.selectFrom('inventoryImport').select(['atticId', 'items', 'skipped']).where('importedBy', '=', actor.userId).where('clientKey', '=', clientKey).executeTakeFirst()
    if (earlier && earlier.atticId !== attic.id) throw problem(409, 'key-used', 'This key belongs to a list for another attic.')
    if (earlier) return { items: earlier.items, skipped: earlier.skipped }
    const survey = await findLatestSurvey(trx, attic.id)
    const { items, bad } = readInventoryList(csv, { survey: survey?.answers ?? null, today: dayIn(actor.timeZone) })
    if (bad > 0 && !skipBad) throw unsound({ csv: `${bad} ${bad === 1 ? 'row is' : 'rows are'} not right yet. Nothing was read in.` })
    if (items.length === 0) throw unsound({ csv: 'No row of it can be read in.' })
    for (const item of items) await putItem(trx, actor, attic, item)
    await trx.insertInto('inventoryImport').values({
      id: newId(), organisationId: attic.organisationId, unitId: attic.unitId, atticId: attic.id, importedBy: actor.userId, clientKey, items: items.length, skipped: bad, importedAt: nowInstant(),
    }).execute()
    await appendRecord(trx, actor, {
      organisationId: attic.organisationId, unitId: attic.unitId, subjectKind: 'attic', subjectId: attic.id, action: 'list read in', after: { items: items.length, skipped: bad },
    })
    await judgeAttic(trx, actor, attic.id)
    return { items: items.length, skipped: bad }
  })
}

import type { Db, Trx } from '../connect'
import type { AtticItemEditValue, AtticItemMovesValue, AtticItemValue } from '../../../shared/schemas/atticItem'
import { dayIn, nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { notFound, unsound } from '../../utils/problems'
import { findLatestSurvey } from '../queries/attics'
import type { AtticItemTable } from '../schema/attics'
import type { Selectable } from 'kysely'
import { appendLoadEvent } from './appendLoadEvent'
import { appendRecord, type RecordActor } from './appendRecord'
import { editRow } from './editRow'
import { judgeAttic } from './judgeAttic'

type Person = RecordActor & { userId: string, timeZone: string }
type ItemRow = Selectable<AtticItemTable>
interface AtticRef { id: string, organisationId: string, unitId: string }

interface Spot { fieldNumber: number, xFt: number, yFt: number, lengthFt: number, widthFt: number }

/** Puts something into the attic: item, load step, record and judgement together. */
export function addItem(db: Db, actor: Person, attic: AtticRef, input: AtticItemValue) {
  refuseFuture('placedOn', input.placedOn, actor)
  return db.transaction().execute(async (trx) => {
    await refuseOutsideField(trx, attic.id, input)
    const item = await trx.insertInto('atticItem').values({
      id: newId(), organisationId: attic.organisationId, unitId: attic.unitId, atticId: attic.id, ...input, removedOn: null, createdAt: nowInstant(),
    }).returningAll().executeTakeFirstOrThrow()
    await appendLoadEvent(trx, actor, { item, kind: 'in', happenedOn: input.placedOn, deltaLb: weightLb(item), detail: spotOf(item) })
    await appendRecord(trx, actor, {
      organisationId: attic.organisationId, unitId: attic.unitId, subjectKind: 'item', subjectId: item.id, action: 'item put in the attic', after: { atticId: attic.id, ...input },
    })
    await judgeAttic(trx, actor, attic.id)
    return item
  })
}

/** Changes an item; a new weight or place is a step of the load history. */
export function editItem(db: Db, actor: Person, item: ItemRow, { version, happenedOn, ...patch }: AtticItemEditValue) {
  refuseFuture('happenedOn', happenedOn, actor)
  return db.transaction().execute(async (trx) => {
    await refuseOutsideField(trx, item.atticId, patch)
    const after = await writeItem(trx, actor, item, version, patch, happenedOn)
    await judgeAttic(trx, actor, item.atticId)
    return after
  })
}

/** Saves several moves of a tried-out plan at once, all or none. */
export function moveItems(db: Db, actor: Person, attic: AtticRef, { moves, happenedOn }: AtticItemMovesValue) {
  refuseFuture('happenedOn', happenedOn, actor)
  return db.transaction().execute(async (trx) => {
    const items = await trx.selectFrom('atticItem').selectAll().where('atticId', '=', attic.id).where('removedOn', 'is', null).execute()
    for (const { itemId, version, ...spot } of moves) {
      const item = items.find(row => row.id === itemId)
      if (!item) throw notFound()
      await refuseOutsideField(trx, attic.id, spot)
      await writeItem(trx, actor, item, version, spot, happenedOn)
    }
    await judgeAttic(trx, actor, attic.id)
    return { moved: moves.length }
  })
}

/** Takes an item out; it stays in the history. */
export function removeItem(db: Db, actor: Person, item: ItemRow, { removedOn, version }: { removedOn: string, version: number }) {
  refuseFuture('removedOn', removedOn, actor)
  if (removedOn < item.placedOn) throw unsound({ removedOn: 'It cannot go out before it came in.' })
  return db.transaction().execute(async (trx) => {
    const after = await editRow<ItemRow>(trx, actor, {
      table: 'atticItem', id: item.id, version, patch: { removedOn },
      record: { organisationId: item.organisationId, unitId: item.unitId, subjectKind: 'item', action: 'item taken out of the attic' },
    })
    await appendLoadEvent(trx, actor, { item, kind: 'out', happenedOn: removedOn, deltaLb: -weightLb(item) })
    await judgeAttic(trx, actor, item.atticId)
    return after
  })
}

/** "All still here": somebody looked and the list holds. */
export function confirmInventory(db: Db, actor: Person, attic: AtticRef, confirmedOn: string) {
  refuseFuture('confirmedOn', confirmedOn, actor)
  return db.transaction().execute(async (trx) => {
    await trx.updateTable('attic').set(eb => ({ inventoryConfirmedOn: confirmedOn, version: eb('version', '+', 1) })).where('id', '=', attic.id).execute()
    await appendRecord(trx, actor, {
      organisationId: attic.organisationId, unitId: attic.unitId, subjectKind: 'attic', subjectId: attic.id, action: 'inventory confirmed', after: { confirmedOn },
    })
    await judgeAttic(trx, actor, attic.id)
    return { confirmedOn }
  })
}

async function writeItem(trx: Trx, actor: Person, item: ItemRow, version: number, patch: Partial<AtticItemValue>, happenedOn: string) {
  const after = await editRow<ItemRow>(trx, actor, {
    table: 'atticItem', id: item.id, version, patch,
    record: { organisationId: item.organisationId, unitId: item.unitId, subjectKind: 'item', action: 'item changed' },
  })
  const deltaLb = weightLb(after) - weightLb(item)
  const moved = JSON.stringify(spotOf(after)) !== JSON.stringify(spotOf(item))
  if (moved) await appendLoadEvent(trx, actor, { item, kind: 'moved', happenedOn, deltaLb: 0, detail: { from: spotOf(item), to: spotOf(after) } })
  if (deltaLb !== 0) await appendLoadEvent(trx, actor, { item, kind: 'reweighed', happenedOn, deltaLb, detail: { fromLb: weightLb(item), toLb: weightLb(after), weightSource: after.weightSource } })
  return after
}

const weightLb = (item: { quantity: number, typicalLb: number }) => item.quantity * item.typicalLb

const spotOf = ({ fieldNumber, xFt, yFt, lengthFt, widthFt }: Spot): Spot => ({ fieldNumber, xFt, yFt, lengthFt, widthFt })

function refuseFuture(field: string, day: string, actor: Person) {
  if (day > dayIn(actor.timeZone)) throw unsound({ [field]: 'That day has not come yet.' })
}

/** Where the joists are measured, an item must stand inside their field. */
async function refuseOutsideField(trx: Trx, atticId: string, spot: Spot) {
  const survey = await findLatestSurvey(trx, atticId)
  const field = survey?.answers.joistFields[spot.fieldNumber - 1]
  if (survey && survey.answers.joistFields.length > 0 && !field) throw unsound({ fieldNumber: 'There is no such group of joists in the survey.' })
  if (!field || field.spanFt === null || field.spacingIn === null || field.joistCount === null) return
  const depthFt = (field.joistCount - 1) * field.spacingIn / 12
  const fields: Record<string, string> = {}
  if (spot.xFt + spot.lengthFt > field.spanFt + 1e-9) fields.xFt = `It would stick out: the span is ${field.spanFt} ft.`
  if (spot.yFt + spot.widthFt > depthFt + 1e-9) fields.yFt = `It would stick out: the joists reach ${depthFt.toFixed(1)} ft.`
  if (Object.keys(fields).length > 0) throw unsound(fields)
}

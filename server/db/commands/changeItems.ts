import type { Db, Trx } from '../connect'
import type { FieldSpot } from '../../../shared/utils/structure/outsideField'
import { keptDespiteProblem } from '../../../shared/utils/goods/refusals'
import type { AtticItemEditValue, AtticItemMovesValue, AtticItemRemovalValue, AtticItemValue } from '../../../shared/schemas/atticItem'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { notFound, unsound } from '../../utils/problems'
import { appendLoadEvent } from './appendLoadEvent'
import { appendRecord, type RecordActor } from './appendRecord'
import { attachPhotos } from './attachPhotos'
import { editRow } from './editRow'
import { judgeAttic } from './judgeAttic'
import { lockAttic, type AtticRef } from './lockAttic'
import { lockItem, refuseBeforeLastStep, type ItemRow } from './lockItem'
import { refuseFuture } from './refuseFuture'
import { refuseOutsideField } from './refuseOutsideField'

type Person = RecordActor & { userId: string, timeZone: string }

/** Puts something into the attic: item, load step, record and judgement together. */
export function addItem(db: Db, actor: Person, attic: AtticRef, input: AtticItemValue) {
  refuseFuture('placedOn', input.placedOn, actor)
  return db.transaction().execute(async (trx) => {
    await lockAttic(trx, attic)
    await refuseOutsideField(trx, attic.id, input)
    const item = await putItem(trx, actor, attic, input)
    await judgeAttic(trx, actor, attic.id)
    return item
  })
}

/** The same for callers that hold the attic, know the place to be sound and judge the attic themselves. */
export async function putItem(trx: Trx, actor: Person, attic: AtticRef, { photoIds, ...input }: AtticItemValue): Promise<ItemRow> {
  refuseRefused(input)
  const item = await trx.insertInto('atticItem').values({
    id: newId(), organisationId: attic.organisationId, unitId: attic.unitId, atticId: attic.id, ...input, removedOn: null, createdAt: nowInstant(),
  }).returningAll().executeTakeFirstOrThrow()
  const photos = await attachPhotos(trx, actor, attic.unitId, photoIds, { itemId: item.id })
  await appendLoadEvent(trx, actor, { item, kind: 'in', happenedOn: input.placedOn, deltaLb: weightLb(item), detail: spotOf(item) })
  await appendRecord(trx, actor, {
    organisationId: attic.organisationId, unitId: attic.unitId, subjectKind: 'item', subjectId: item.id, action: 'item put in the attic',
    after: { atticId: attic.id, ...input, photos: photos.map(({ id, sha256 }) => ({ id, sha256 })) },
  })
  return item
}

function refuseRefused(item: Parameters<typeof keptDespiteProblem>[0]) {
  const fields = keptDespiteProblem(item)
  if (Object.keys(fields).length > 0) throw unsound(fields)
}

/** Changes an item; a new weight or place is a step of the load history. */
export function editItem(db: Db, actor: Person, item: ItemRow, { version, happenedOn, photoIds, ...patch }: AtticItemEditValue) {
  refuseFuture('happenedOn', happenedOn, actor)
  refuseRefused(patch)
  return db.transaction().execute(async (trx) => {
    const before = await lockItem(trx, item)
    await refuseOutsideField(trx, item.atticId, patch)
    const after = await writeItem(trx, actor, { before, version, patch, happenedOn })
    await attachPhotos(trx, actor, item.unitId, photoIds, { itemId: item.id })
    await judgeAttic(trx, actor, item.atticId)
    return after
  })
}

/** Saves several moves of a tried-out plan at once, all or none. */
export function moveItems(db: Db, actor: Person, attic: AtticRef, { moves, happenedOn }: AtticItemMovesValue) {
  refuseFuture('happenedOn', happenedOn, actor)
  return db.transaction().execute(async (trx) => {
    await lockAttic(trx, attic)
    const items = await trx.selectFrom('atticItem').selectAll().where('atticId', '=', attic.id).where('removedOn', 'is', null).execute()
    for (const [index, { itemId, version, ...spot }] of moves.entries()) {
      const before = items.find(row => row.id === itemId)
      if (!before) throw notFound()
      await refuseOutsideField(trx, attic.id, spot, `moves.${index}.`)
      await writeItem(trx, actor, { before, version, patch: spot, happenedOn })
    }
    await judgeAttic(trx, actor, attic.id)
    return { moved: moves.length }
  })
}

/** Takes an item out; it stays in the history. */
export function removeItem(db: Db, actor: Person, item: ItemRow, { removedOn, version }: AtticItemRemovalValue) {
  refuseFuture('removedOn', removedOn, actor)
  return db.transaction().execute(async (trx) => {
    const after = await takeOut(trx, actor, item, { removedOn, version })
    await judgeAttic(trx, actor, item.atticId)
    return after
  })
}

/** The same for callers that judge the attic themselves. */
export async function takeOut(trx: Trx, actor: Person, item: ItemRow, { removedOn, version }: AtticItemRemovalValue): Promise<ItemRow> {
  const before = await lockItem(trx, item)
  await refuseBeforeLastStep(trx, 'removedOn', removedOn, item.id)
  const after = await editRow<ItemRow>(trx, actor, {
    table: 'atticItem', id: item.id, version, patch: { removedOn },
    record: { organisationId: item.organisationId, unitId: item.unitId, subjectKind: 'item', action: 'item taken out of the attic' },
  })
  await appendLoadEvent(trx, actor, { item, kind: 'out', happenedOn: removedOn, deltaLb: -weightLb(before) })
  return after
}

/** "All still here": somebody looked and the list holds. */
export function confirmInventory(db: Db, actor: Person, attic: AtticRef, confirmedOn: string) {
  refuseFuture('confirmedOn', confirmedOn, actor)
  return db.transaction().execute(async (trx) => {
    await lockAttic(trx, attic)
    await trx.updateTable('attic').set(eb => ({ inventoryConfirmedOn: confirmedOn, version: eb('version', '+', 1) })).where('id', '=', attic.id).execute()
    await appendRecord(trx, actor, {
      organisationId: attic.organisationId, unitId: attic.unitId, subjectKind: 'attic', subjectId: attic.id, action: 'inventory confirmed', after: { confirmedOn },
    })
    await judgeAttic(trx, actor, attic.id)
    return { confirmedOn }
  })
}

interface ItemChange { before: ItemRow, version: number, patch: Partial<Omit<AtticItemValue, 'photoIds'>>, happenedOn: string }

async function writeItem(trx: Trx, actor: Person, { before, version, patch, happenedOn }: ItemChange) {
  const after = await editRow<ItemRow>(trx, actor, {
    table: 'atticItem', id: before.id, version, patch,
    record: { organisationId: before.organisationId, unitId: before.unitId, subjectKind: 'item', action: 'item changed' },
  })
  const deltaLb = weightLb(after) - weightLb(before)
  const moved = JSON.stringify(spotOf(after)) !== JSON.stringify(spotOf(before))
  if (moved || deltaLb !== 0) await refuseBeforeLastStep(trx, 'happenedOn', happenedOn, before.id)
  if (moved) await appendLoadEvent(trx, actor, { item: before, kind: 'moved', happenedOn, deltaLb: 0, detail: { from: spotOf(before), to: spotOf(after) } })
  if (deltaLb !== 0) await appendLoadEvent(trx, actor, { item: before, kind: 'reweighed', happenedOn, deltaLb, detail: { fromLb: weightLb(before), toLb: weightLb(after), fromSource: before.weightSource, weightSource: after.weightSource } })
  return after
}

const weightLb = (item: { quantity: number, typicalLb: number }) => item.quantity * item.typicalLb

const spotOf = ({ fieldNumber, xFt, yFt, lengthFt, widthFt }: FieldSpot): FieldSpot => ({ fieldNumber, xFt, yFt, lengthFt, widthFt })

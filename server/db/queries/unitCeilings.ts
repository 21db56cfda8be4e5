import type { UnitCeilings } from '../../../shared/types/markPage'
import { dayIn } from '../../utils/clock'
import { abilitiesOf } from '../../utils/policy'
import type { Db } from '../connect'
import type { Actor } from './actor'
import { findUnitPlace } from './judging'
import { listCeilingMarks } from './markJoinings'
import { listRoomsOf } from './marks'

/** The ceilings of a home with everything that is or was followed on them. */
export async function findUnitCeilings(db: Db, actor: Actor, unit: { id: string }): Promise<UnitCeilings> {
  const [place, rooms, marks] = await Promise.all([findUnitPlace(db, unit.id), listRoomsOf(db, unit.id), listCeilingMarks(db, unit.id)])
  return { unit: { id: unit.id, name: place.unitName, propertyName: place.propertyName }, rooms, marks, abilities: abilitiesOf(actor.role), today: dayIn(actor.timeZone) }
}

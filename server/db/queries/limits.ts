import { LIMIT_NAMES, type LimitsView, type MovementLimits } from '../../../shared/types/limits'
import type { Db } from '../connect'
import { abilitiesOf } from '../../utils/policy'
import type { Actor } from './actor'

/** The limits' columns of `organisation as o`. */
export const limitColumns = [
  'o.seasonAllowanceMm', 'o.trussAllowanceMm', 'o.leastReadings', 'o.leastDays', 'o.pRising', 'o.dormantWithinMmPerYear', 'o.leastJumpMm', 'o.jumpSigmas', 'o.morePops',
] as const satisfies readonly `o.${keyof MovementLimits}`[]

/** The limits among the columns of a wider row. */
export const limitsOf = (row: MovementLimits): MovementLimits => Object.fromEntries(LIMIT_NAMES.map(name => [name, row[name]])) as unknown as MovementLimits

export async function findLimits(db: Db, organisationId: string): Promise<MovementLimits & { version: number }> {
  return db.selectFrom('organisation as o').select([...limitColumns, 'o.version']).where('o.id', '=', organisationId).executeTakeFirstOrThrow()
}

export async function findLimitsView(db: Db, actor: Actor): Promise<LimitsView> {
  const { version, ...limits } = await findLimits(db, actor.organisationId)
  return { limits, version, abilities: abilitiesOf(actor.role) }
}

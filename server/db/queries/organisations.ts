import type { OrganisationSettings } from '../../../shared/types/organisation'
import type { ResponsePolicy } from '../../../shared/utils/upkeep/responseTimes'
import type { Db } from '../connect'
import { abilitiesOf } from '../../utils/policy'
import type { Actor } from './actor'

/** The organisation's own times, as the calculations read them. */
export async function findResponsePolicy(db: Db, organisationId: string): Promise<ResponsePolicy> {
  const row = await db.selectFrom('organisation').select(['dangerResponseHours', 'urgentResponseHours', 'routineResponseDays', 'entryNoticeHours'])
    .where('id', '=', organisationId).executeTakeFirstOrThrow()
  return { hours: { danger: row.dangerResponseHours, urgent: row.urgentResponseHours, routine: row.routineResponseDays * 24 }, entryNoticeHours: row.entryNoticeHours }
}

export async function findSettings(db: Db, actor: Actor): Promise<OrganisationSettings> {
  const row = await db.selectFrom('organisation')
    .select(['id', 'name', 'timeZone', 'currency', 'contactPhone', 'dangerResponseHours', 'urgentResponseHours', 'routineResponseDays', 'entryNoticeHours', 'reviewHour', 'seasonAllowanceMm', 'isDemo', 'version'])
    .where('id', '=', actor.organisationId).executeTakeFirstOrThrow()
  return { ...row, abilities: abilitiesOf(actor.role) }
}

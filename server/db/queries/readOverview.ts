import type { Db } from '../connect'
import type { Overview } from '../../../shared/types/overview'
import { addDays } from '../../../shared/utils/days'
import { dayIn, nowInstant } from '../../utils/clock'
import type { Actor } from './actor'
import { countPortfolio, findChanges, findDecisions, findLastLooked } from './overview'
import { findUpcoming } from './upcoming'

const UPCOMING_DAYS = 14

/** The portfolio at a glance, in five statements whatever its size. */
export async function readOverview(db: Db, actor: Actor): Promise<Overview> {
  const today = dayIn(actor.timeZone)
  const since = await findLastLooked(db, actor.organisationId, actor.userId, nowInstant())
  const [counts, decisions, changes, upcoming] = await Promise.all([
    countPortfolio(db, actor.organisationId, today),
    findDecisions(db, actor.organisationId),
    findChanges(db, actor, since),
    findUpcoming(db, actor.organisationId, addDays(today, UPCOMING_DAYS)),
  ])
  return { today, ...counts, decisions, since, changes, upcoming }
}

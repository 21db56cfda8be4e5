import { dayIn } from '../../utils/clock'
import { unsound } from '../../utils/problems'

/** What is entered has happened: a day after today, where the organisation is, is refused at its field. */
export function refuseFuture(field: string, day: string, actor: { timeZone: string }) {
  if (day > dayIn(actor.timeZone)) throw unsound({ [field]: 'That day has not come yet.' })
}

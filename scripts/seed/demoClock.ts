import { addDays } from '../../shared/utils/days'

/** Sets the program's clock to a day of the past, late morning in the demo's town, so that the record tells the year in order. */
export function setDemoDay(on: string, minute = 0) {
  process.env.LATHKEY_CLOCK_OFFSET_MS = String(Date.parse(`${on}T15:00:00Z`) + minute * 60_000 - Date.now())
}

export function endDemoTime() {
  process.env.LATHKEY_CLOCK_OFFSET_MS = '0'
}

export const daysBack = (today: string, days: number) => addDays(today, -days)

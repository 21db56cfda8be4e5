import { useState } from '#imports'
import { useMe } from '~/composables/queries/session'
import { dayInZone } from '~/shared/utils/dayInZone'

/** The calendar day in the organisation's time zone, taken once where the page was rendered, so that server and browser agree. */
export function useToday() {
  const { data: me } = useMe()
  return useState('today', () => dayInZone(me.value?.organisation.timeZone ?? 'UTC', new Date()))
}

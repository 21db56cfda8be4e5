import { useState } from '#imports'
import { useMe } from '~/composables/queries/session'

/** The calendar day in the organisation's time zone, taken once where the page was rendered, so that server and browser agree. */
export function useToday() {
  const { data: me } = useMe()
  return useState('today', () => new Intl.DateTimeFormat('en-CA', { timeZone: me.value?.organisation.timeZone ?? 'UTC', year: 'numeric', month: '2-digit', day: '2-digit' }).format(new Date()))
}

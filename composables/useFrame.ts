import { computed, provide } from 'vue'
import { useMe } from '~/composables/queries/session'
import { unitSystemKey } from '~/composables/useUnits'
import { timeZoneKey } from '~/components/ui/dayText'

/** What every page inside a frame reads of the signed-in person: their units, and their organisation's time zone. */
export function useFrame() {
  const { data: me } = useMe()
  provide(unitSystemKey, computed(() => me.value?.user.unitsOfMeasure ?? 'us'))
  provide(timeZoneKey, computed(() => me.value?.organisation.timeZone))
  return { me, abilities: computed(() => me.value?.abilities ?? []) }
}

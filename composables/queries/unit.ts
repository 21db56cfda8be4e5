import type { MaybeRefOrGetter } from 'vue'
import { useServerQuery } from '~/composables/useServerQuery'
import type { UnitPage } from '#shared/types/home'

/** One unit with all its page shows; apart from units.ts, because the report's page must stay light. */
export const useUnit = (unitId: MaybeRefOrGetter<string>) => useServerQuery<UnitPage>({
  key: () => ['units', toValue(unitId)], path: () => `/api/units/${toValue(unitId)}`, essential: true,
})

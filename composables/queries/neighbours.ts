import { useServerQuery } from '~/composables/useServerQuery'
import type { NeighbourView } from '~/shared/types/neighbours'

/** Whether marks on other ceilings of the house moved in the same months. */
export const useNeighbours = (markId: string, options: { enabled?: MaybeRefOrGetter<boolean> } = {}) => useServerQuery<NeighbourView>({
  key: ['marks', markId, 'neighbours'], path: `/api/marks/${markId}/neighbours`, enabled: options.enabled,
})

import { useServerQuery } from '~/composables/useServerQuery'
import type { Page } from '#shared/types/home'
import type { JobRow } from '#shared/types/job'

/** Jobs of one home, planned and done, latest first. */
export const useWorkInUnit = (unitId: string) => useServerQuery<Page<JobRow>>({
  key: ['jobs', 'list', { unit: unitId, list: 'all' }], path: `/api/jobs?list=all&unit=${unitId}`,
})

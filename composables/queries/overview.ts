import { useServerQuery } from '~/composables/useServerQuery'
import type { Overview } from '~/shared/types/overview'

export const useOverview = () => useServerQuery<Overview>({ key: ['overview'], path: '/api/overview', essential: true })

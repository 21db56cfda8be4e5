import { useServerChange, useServerQuery } from '~/composables/useServerQuery'
import type { Reviews } from '~/shared/types/review'

export const useReviews = () => useServerQuery<Reviews>({ key: ['reviews'], path: '/api/reviews', essential: true })

export const useRunReview = () => useServerChange<undefined, { runId: string, isNew: boolean }>({
  stale: ['reviews'], send: request => request('/api/reviews', { method: 'POST' }),
})

import { useServerChange, useServerQuery } from '~/composables/useServerQuery'
import type { LimitsEditValue, LimitsRehearsalValue } from '~/shared/schemas/limits'
import type { LimitsRehearsalAnswer } from '~/shared/types/hindsight'
import type { LimitsView } from '~/shared/types/limits'

/** The organisation's limits of the movement rules; bounds and our defaults stand in shared/types/limits.ts. */
export const useLimits = () => useServerQuery<LimitsView>({ key: ['settings', 'limits'], path: '/api/limits', essential: true })

export const useSaveLimits = () => useServerChange<LimitsEditValue, LimitsView>({
  stale: ['settings', 'marks'], send: (request, body) => request('/api/limits', { method: 'PUT', body }),
})

/** What other limits would have raised on the readings there are; changes nothing. */
export const useRehearseLimits = () => useServerChange<LimitsRehearsalValue, LimitsRehearsalAnswer>({
  stale: [], send: (request, body) => request('/api/limits/rehearsal', { method: 'POST', body }),
})

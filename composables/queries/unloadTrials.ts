import { pathWith } from '~/composables/queries/pathWith'
import { useServerChange, useServerQuery } from '~/composables/useServerQuery'
import type { UnloadTrialEditValue, UnloadTrialEndingValue, UnloadTrialValue, UnloadingValue } from '~/shared/schemas/unloadTrial'
import type { UnloadTrialRow, UnloadTrialView } from '~/shared/types/unloadTrial'

/** Filter: state, attic, after. */
export const useUnloadTrials = (filter: MaybeRefOrGetter<Record<string, string | undefined>>) => useServerQuery<{ rows: UnloadTrialRow[], next: string | null }>({
  key: () => ['attics', 'unload-trials', toValue(filter)], path: () => pathWith('/api/unload-trials', toValue(filter)), keepPrevious: true,
})

export const useUnloadTrial = (trialId: string) => useServerQuery<UnloadTrialView>({
  key: ['attics', 'unload-trials', trialId], path: `/api/unload-trials/${trialId}`, essential: true,
})

/** A trial takes things out of the attic, and with them changes what is judged. */
const STALE = ['attics', 'marks', 'units', 'overview', 'findings', 'properties', 'record']

export const usePlanUnloadTrial = (atticId: string) => useServerChange<UnloadTrialValue, UnloadTrialView>({
  stale: STALE, send: (request, body) => request<unknown>(`/api/attics/${atticId}/unload-trials`, { method: 'POST', body }) as Promise<UnloadTrialView>,
})

export function useUnloadTrialChanges(trialId: string) {
  const path = `/api/unload-trials/${trialId}`
  return {
    edit: useServerChange<UnloadTrialEditValue, UnloadTrialView>({ stale: STALE, send: (request, body) => request<unknown>(path, { method: 'PUT', body }) as Promise<UnloadTrialView> }),
    carryOut: useServerChange<UnloadingValue, UnloadTrialView>({ stale: STALE, send: (request, body) => request<unknown>(`${path}/unloading`, { method: 'POST', body }) as Promise<UnloadTrialView> }),
    end: useServerChange<UnloadTrialEndingValue, UnloadTrialView>({ stale: STALE, send: (request, body) => request<unknown>(`${path}/ending`, { method: 'POST', body }) as Promise<UnloadTrialView> }),
  }
}

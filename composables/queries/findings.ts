import { useServerChange, useServerQuery } from '~/composables/useServerQuery'
import type { Acknowledgement } from '~/shared/schemas/finding'
import type { FindingRow, FindingView } from '~/shared/types/findingView'

export interface Page<T> { rows: T[], next: string | null }
export type ListQuery = Record<string, string>

export const useFindings = (query: Ref<ListQuery>) => useServerQuery<Page<FindingRow>>({
  key: () => ['findings', 'list', query.value],
  path: () => `/api/findings?${new URLSearchParams(query.value)}`,
})

export const useFinding = (id: string) => useServerQuery<FindingView>({ key: ['findings', id], path: `/api/findings/${id}`, essential: true })

const STALE = ['findings', 'units', 'overview', 'record']

export const useAcknowledge = (id: string) => useServerChange<Acknowledgement, FindingView>({
  stale: STALE, send: (request, body) => request(`/api/findings/${id}/acknowledgement`, { method: 'POST', body }),
})

export const useReturnFinding = (id: string) => useServerChange<undefined, FindingView>({
  stale: STALE, send: request => request(`/api/findings/${id}/acknowledgement`, { method: 'DELETE' }),
})

import type { ListQuery, Page } from '~/composables/queries/findings'
import { useServerChange, useServerQuery } from '~/composables/useServerQuery'
import type { JobChanges, JobMove, NewJob } from '~/shared/schemas/job'
import type { JobChoices, JobRow, JobView } from '~/shared/types/job'

export const useJobs = (query: Ref<ListQuery>) => useServerQuery<Page<JobRow>>({
  key: () => ['jobs', 'list', query.value],
  path: () => `/api/jobs?${new URLSearchParams(query.value)}`,
})

export const useJob = (id: string) => useServerQuery<JobView>({ key: ['jobs', id], path: `/api/jobs/${id}`, essential: true })

/** Homes and people for the form; only those who plan jobs may ask. */
export const useJobChoices = (enabled: MaybeRefOrGetter<boolean> = true) => useServerQuery<JobChoices>({ key: ['jobs', 'choices'], path: '/api/jobs/choices', enabled })

const STALE = ['jobs', 'findings', 'units', 'marks', 'observations', 'overview', 'record']

export const usePlanJob = () => useServerChange<NewJob, JobView>({
  stale: STALE, send: (request, body) => request('/api/jobs', { method: 'POST', body }),
})

export const useEditJob = (id: string) => useServerChange<JobChanges, JobView>({
  stale: STALE, send: (request, body) => request<JobView>(`/api/jobs/${id}` as string, { method: 'PATCH', body }),
})

export const useMoveJob = (id: string) => useServerChange<JobMove, JobView>({
  stale: STALE, send: (request, body) => request(`/api/jobs/${id}/state`, { method: 'POST', body }),
})

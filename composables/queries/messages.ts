import type { ListQuery, Page } from '~/composables/queries/findings'
import { useServerChange, useServerQuery } from '~/composables/useServerQuery'
import type { MessageRow } from '~/shared/types/review'

export const useMessages = (query: Ref<ListQuery>) => useServerQuery<Page<MessageRow>>({
  key: () => ['messages', query.value],
  path: () => `/api/messages?${new URLSearchParams(query.value)}`,
})

export const useSendAgain = () => useServerChange<string, { id: string, state: 'queued' }>({
  stale: ['messages'], send: (request, id) => request(`/api/messages/${id}/sending`, { method: 'POST' }),
})

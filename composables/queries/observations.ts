import { useServerChange, useServerQuery } from '~/composables/useServerQuery'
import type { ReportStepValue } from '~/shared/schemas/reportStep'
import type { Receipt } from '~/shared/types/receipt'

export const useReceipt = (observationId: string) => useServerQuery<Receipt & { abilities: string[] }>({
  key: ['observations', observationId], path: `/api/observations/${observationId}`, essential: true,
})

export const useMoveReport = (observationId: string) => useServerChange<ReportStepValue, Receipt>({
  stale: ['observations', 'marks', 'findings', 'units', 'overview', 'record'],
  send: (request, body) => request<unknown>(`/api/observations/${observationId}`, { method: 'PATCH', body }) as Promise<Receipt>,
})

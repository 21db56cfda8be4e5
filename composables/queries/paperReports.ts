import { useServerChange } from '~/composables/useServerQuery'
import type { PaperOrigin } from '~/shared/types/paperReport'
import type { Receipt } from '~/shared/types/receipt'
import type { ReportAnswers } from '~/shared/types/reportDraft'

interface PaperReport { key: string, paper: PaperOrigin, report: ReportAnswers & { photoIds: string[], sameAsMarkId: string | null } }

/** The same key however often it is tried: one sheet, one report. */
export const useEnterPaperReport = (unitId: string) => useServerChange<PaperReport, Receipt>({
  stale: ['units', 'marks', 'observations', 'findings', 'overview', 'properties', 'record'],
  send: (request, { key, ...body }) => request<unknown>(`/api/units/${unitId}/paper-reports`, { method: 'POST', headers: { 'Idempotency-Key': key }, body }) as Promise<Receipt>,
})

import { pathWith } from '~/composables/queries/pathWith'
import { useServerChange, useServerQuery } from '~/composables/useServerQuery'
import type { HindsightValue } from '~/shared/schemas/hindsight'
import type { HindsightRow, LedgerPage } from '~/shared/types/hindsight'

/** Findings judged right or wrong. Filter: list (all, not-judged, right, wrong), rule, unit, after. */
export const useLedger = (filter: MaybeRefOrGetter<Record<string, string | undefined>>) => useServerQuery<LedgerPage>({
  key: () => ['findings', 'ledger', toValue(filter)], path: () => pathWith('/api/ledger', toValue(filter)), essential: true, keepPrevious: true,
})

/** What people said of one finding later, newest first. */
export const useHindsight = (findingId: string) => useServerQuery<{ rows: HindsightRow[] }>({
  key: ['findings', findingId, 'hindsight'], path: `/api/findings/${findingId}/hindsight`,
})

export const useJudgeHindsight = (findingId: string) => useServerChange<HindsightValue, { rows: HindsightRow[] }>({
  stale: ['findings', 'record'], send: (request, body) => request<unknown>(`/api/findings/${findingId}/hindsight`, { method: 'POST', body }) as Promise<{ rows: HindsightRow[] }>,
})

import type { MaybeRefOrGetter } from 'vue'
import { pathWith } from '~/composables/queries/pathWith'
import { useServerChange, useServerQuery } from '~/composables/useServerQuery'
import type { MarkEditValue, MarkJoiningValue, MarkSplitValue } from '#shared/schemas/mark'
import type { ReadingValue } from '#shared/schemas/reading'
import type { MarkFacts, MarkPage, MarkRow, ReadingAnswer, UnitCeilings } from '#shared/types/markPage'

export const useMark = (markId: MaybeRefOrGetter<string>) => useServerQuery<MarkPage>({
  key: () => ['marks', toValue(markId)], path: () => `/api/marks/${toValue(markId)}`, essential: true,
})

export interface MarkFilter { kind?: string, activity?: string, state?: string, due?: string, search?: string, sort?: string, after?: string, unit?: string, [more: string]: string | undefined }

export const useMarks = (filter: MaybeRefOrGetter<MarkFilter>) => useServerQuery<{ rows: MarkRow[], next: string | null, today: string }>({
  key: () => ['marks', 'list', toValue(filter)], path: () => pathWith('/api/marks', toValue(filter)), essential: true, keepPrevious: true,
})

export const useUnitCeilings = (unitId: MaybeRefOrGetter<string>) => useServerQuery<UnitCeilings>({
  key: () => ['marks', 'ceilings', toValue(unitId)], path: () => `/api/units/${toValue(unitId)}/ceilings`, essential: true,
})

/** What a change of a mark makes stale elsewhere. */
export const STALE_WITH_MARKS = ['marks', 'observations', 'units', 'findings', 'overview', 'properties', 'record']

export function useMarkChanges(markId: string) {
  return {
    save: useServerChange<Omit<MarkEditValue, 'change'>, MarkFacts>({
      stale: STALE_WITH_MARKS, send: (request, body) => request<unknown>(`/api/marks/${markId}`, { method: 'PATCH', body }) as Promise<MarkFacts>,
    }),
    changeState: useServerChange<Pick<MarkEditValue, 'version' | 'change'>, MarkFacts>({
      stale: STALE_WITH_MARKS, send: (request, body) => request<unknown>(`/api/marks/${markId}`, { method: 'PATCH', body }) as Promise<MarkFacts>,
    }),
    join: useServerChange<MarkJoiningValue, MarkFacts>({
      stale: STALE_WITH_MARKS, send: (request, body) => request<unknown>(`/api/marks/${markId}/joining`, { method: 'POST', body }) as Promise<MarkFacts>,
    }),
    undoJoining: useServerChange<string, MarkFacts>({
      stale: STALE_WITH_MARKS, send: (request, joinedId) => request<unknown>(`/api/marks/${joinedId}/joining`, { method: 'DELETE' }) as Promise<MarkFacts>,
    }),
    split: useServerChange<MarkSplitValue, MarkFacts>({
      stale: STALE_WITH_MARKS, send: (request, body) => request<unknown>(`/api/marks/${markId}/splits`, { method: 'POST', body }) as Promise<MarkFacts>,
    }),
    read: useServerChange<{ key: string, reading: ReadingValue }, ReadingAnswer>({
      stale: STALE_WITH_MARKS,
      send: (request, { key, reading }) => request<unknown>(`/api/marks/${markId}/readings`, { method: 'POST', body: reading, headers: { 'idempotency-key': key } }) as Promise<ReadingAnswer>,
    }),
  }
}

/** Pins of any mark of a ceiling. */
export const usePinMoves = () => useServerChange<Required<Pick<MarkEditValue, 'version' | 'pin'>> & { markId: string }, MarkFacts>({
  stale: STALE_WITH_MARKS, send: (request, { markId, ...body }) => request<unknown>(`/api/marks/${markId}`, { method: 'PATCH', body }) as Promise<MarkFacts>,
})

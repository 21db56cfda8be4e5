import { useServerChange, useServerQuery } from '~/composables/useServerQuery'
import type { LiftingValue, NoticeValue } from '~/shared/schemas/notice'
import type { NoticesOfUnit, NoticeView } from '~/shared/types/notice'

/** Keyed under units, attics and findings change what may be raised: whatever marks a unit stale fetches this again. */
export const useNoticesOfUnit = (unitId: MaybeRefOrGetter<string>, enabled: MaybeRefOrGetter<boolean> = true) => useServerQuery<NoticesOfUnit>({
  key: () => ['units', toValue(unitId), 'notices'], path: () => `/api/units/${toValue(unitId)}/notices`, enabled,
})

export const useNotice = (noticeId: string) => useServerQuery<NoticeView>({ key: ['units', 'notice', noticeId], path: `/api/notices/${noticeId}`, essential: true })

const STALE = ['units', 'record']

export const useRaiseNotice = () => useServerChange<{ roomId: string, notice: NoticeValue }, NoticeView>({
  stale: STALE, send: (request, { roomId, notice }) => request<unknown>(`/api/rooms/${roomId}/notices`, { method: 'POST', body: notice }) as Promise<NoticeView>,
})

export const useLiftNotice = (noticeId: string) => useServerChange<LiftingValue, NoticeView>({
  stale: STALE, send: (request, body) => request<unknown>(`/api/notices/${noticeId}/lifting`, { method: 'POST', body }) as Promise<NoticeView>,
})

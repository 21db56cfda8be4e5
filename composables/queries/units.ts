import type { MaybeRefOrGetter } from 'vue'
import { pathWith } from '~/composables/queries/pathWith'
import { useServerChange, useServerQuery } from '~/composables/useServerQuery'
import type { AtticCreateValue, UnitEditValue } from '#shared/schemas/home'
import type { RoomCreateValue, RoomEditValue } from '#shared/schemas/room'
import type { TenancyCreateValue, TenancyEditValue } from '#shared/schemas/tenancy'
import type { Page, RoomFacts, TenancyFacts, UnitCard, UnitFacts } from '#shared/types/home'

export interface UnitsFilter { search?: string, after?: string, sections?: 'yes', [more: string]: string | undefined }

/** The units the asker may see, by property and name. */
export const useUnitList = (filter: MaybeRefOrGetter<UnitsFilter>, enabled: MaybeRefOrGetter<boolean> = true) => useServerQuery<Page<UnitCard>>({
  key: () => ['units', 'list', toValue(filter)], path: () => pathWith('/api/units', toValue(filter)), enabled, essential: true, keepPrevious: true,
})

const stale = ['units', 'properties', 'attics', 'marks', 'overview', 'record']

interface OfUnit<V> { unitId: string, value: V }
interface OfRow<V> { id: string, edit: V }
type Seen = { id: string, version: number }
type Made = { id: string }

export function useUnitChanges() {
  const change = <V, A>(method: 'POST' | 'PATCH' | 'PUT', pathOf: (value: V) => string, bodyOf: (value: V) => object) => useServerChange<V, A>({
    send: (request, value) => request<unknown>(pathOf(value), { method, body: bodyOf(value) }) as Promise<A>, stale,
  })
  const ofUnit = <V, A>(method: 'POST' | 'PUT', part: string) => change<OfUnit<V>, A>(method, ({ unitId }) => `/api/units/${unitId}/${part}`, ({ value }) => value as object)
  const edit = <V extends object, A>(things: string) => change<OfRow<V>, A>('PATCH', ({ id }) => `/api/${things}/${id}`, value => value.edit)
  const move = <A>(things: string, act: 'archive' | 'restore') => change<Seen, A>('POST', ({ id }) => `/api/${things}/${id}/${act}`, ({ version }) => ({ version }))
  return {
    saveUnit: edit<UnitEditValue, UnitFacts>('units'),
    archiveUnit: move<UnitFacts>('units', 'archive'),
    restoreUnit: move<UnitFacts>('units', 'restore'),
    addRoom: ofUnit<RoomCreateValue, Made>('POST', 'rooms'),
    saveRoom: edit<RoomEditValue, RoomFacts>('rooms'),
    archiveRoom: move<RoomFacts>('rooms', 'archive'),
    restoreRoom: move<RoomFacts>('rooms', 'restore'),
    orderRooms: ofUnit<{ roomIds: string[] }, unknown>('PUT', 'room-order'),
    addTenancy: ofUnit<TenancyCreateValue, Made>('POST', 'tenancies'),
    saveTenancy: edit<TenancyEditValue, TenancyFacts>('tenancies'),
    addAttic: ofUnit<AtticCreateValue, Made>('POST', 'attics'),
  }
}

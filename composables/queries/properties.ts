import type { MaybeRefOrGetter } from 'vue'
import { pathWith } from '~/composables/queries/pathWith'
import { useServerChange, useServerQuery } from '~/composables/useServerQuery'
import type { CodeBasisEditValue } from '#shared/schemas/codeBasis'
import type { PropertyCreateValue, PropertyEditValue, UnitCreateValue } from '#shared/schemas/home'
import type { Page, PropertyCard, PropertyFacts, PropertyPage } from '#shared/types/home'

export interface HomesFilter { search?: string, after?: string, archived?: string, [more: string]: string | undefined }

export const useHomes = (filter: MaybeRefOrGetter<HomesFilter>, enabled: MaybeRefOrGetter<boolean> = true) => useServerQuery<Page<PropertyCard>>({
  key: () => ['properties', 'list', toValue(filter)], path: () => pathWith('/api/properties', toValue(filter)), enabled, essential: true, keepPrevious: true,
})

export const useProperty = (propertyId: MaybeRefOrGetter<string>, after: MaybeRefOrGetter<string | undefined> = undefined) => useServerQuery<PropertyPage>({
  key: () => ['properties', toValue(propertyId), toValue(after) ?? ''], path: () => pathWith(`/api/properties/${toValue(propertyId)}`, { after: toValue(after) }), essential: true,
})

const stale = ['properties', 'units', 'attics', 'overview', 'findings', 'record']

export interface MadeHome { id: string, unitId: string | null, atticId: string | null }

export function usePropertyChanges() {
  const change = <V, A>(method: 'POST' | 'PATCH' | 'PUT', pathOf: (value: V) => string, bodyOf: (value: V) => object) => useServerChange<V, A>({
    send: (request, value) => request<unknown>(pathOf(value), { method, body: bodyOf(value) }) as Promise<A>, stale,
  })
  return {
    addProperty: change<PropertyCreateValue, MadeHome>('POST', () => '/api/properties', value => value),
    saveProperty: change<{ id: string, edit: PropertyEditValue }, PropertyFacts>('PATCH', ({ id }) => `/api/properties/${id}`, ({ edit }) => edit),
    saveCodeBasis: change<{ id: string, edit: CodeBasisEditValue }, { version: number }>('PUT', ({ id }) => `/api/properties/${id}/code-basis`, ({ edit }) => edit),
    archiveProperty: change<{ id: string, version: number }, PropertyFacts>('POST', ({ id }) => `/api/properties/${id}/archive`, ({ version }) => ({ version })),
    restoreProperty: change<{ id: string, version: number }, PropertyFacts>('POST', ({ id }) => `/api/properties/${id}/restore`, ({ version }) => ({ version })),
    addUnit: change<{ propertyId: string, unit: UnitCreateValue }, { id: string, atticId: string | null }>('POST', ({ propertyId }) => `/api/properties/${propertyId}/units`, ({ unit }) => unit),
  }
}

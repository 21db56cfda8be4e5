import { useServerChange, useServerQuery } from '~/composables/useServerQuery'
import type { InvitationInput } from '~/shared/schemas/invitation'
import type { Page, UnitCard, UnitPage } from '~/shared/types/home'
import type { InvitationRow, PersonRow } from '~/shared/types/invitation'
import type { Role } from '~/shared/types/people'
import type { z } from 'zod'

export interface PeopleFilter { search?: string, role?: Role, after?: string }

const pathWith = (path: string, query: Record<string, string | undefined>) => {
  const pairs = Object.entries(query).filter((pair): pair is [string, string] => Boolean(pair[1]))
  return pairs.length > 0 ? `${path}?${new URLSearchParams(pairs)}` : path
}

/** Everybody in the organisation, by name. */
export function usePeople(filter: MaybeRefOrGetter<PeopleFilter> = {}) {
  return useServerQuery<Page<PersonRow>>({
    key: () => ['people', 'list', toValue(filter)], path: () => pathWith('/api/people', { ...toValue(filter) }), essential: true,
  })
}

/** Invitations that wait for an answer. */
export function useInvitations(after: MaybeRefOrGetter<string | undefined> = undefined) {
  return useServerQuery<Page<InvitationRow>>({
    key: () => ['people', 'invitations', toValue(after)], path: () => pathWith('/api/invitations', { after: toValue(after) }),
  })
}

export function usePeopleChanges() {
  const stale = ['people']
  return {
    invite: useServerChange({
      send: (request, input: z.output<typeof InvitationInput>) => request<{ id: string }>('/api/invitations', { method: 'POST', body: input }),
      stale: ['people', 'units'],
    }),
    sendAgain: useServerChange({ send: (request, id: string) => request<{ expiresAt: string }>(`/api/invitations/${id}/send`, { method: 'POST' }), stale }),
    revoke: useServerChange({ send: (request, id: string) => request<unknown>(`/api/invitations/${id}`, { method: 'DELETE' }), stale }),
    endAccess: useServerChange({ send: (request, id: string) => request<unknown>(`/api/people/${id}`, { method: 'DELETE' }), stale }),
  }
}

/** Homes whose name or address has the words, for choosing one. */
export function useHomesFound(search: MaybeRefOrGetter<string>) {
  return useServerQuery<Page<UnitCard>>({
    key: () => ['units', 'found', toValue(search)], path: () => pathWith('/api/units', { search: toValue(search) }),
  })
}

/** The chosen home with its tenancies. */
export function useHomeChosen(unitId: MaybeRefOrGetter<string | null>) {
  return useServerQuery<UnitPage>({
    key: () => ['units', 'one', toValue(unitId)], path: () => `/api/units/${toValue(unitId)}`, enabled: () => Boolean(toValue(unitId)),
  })
}

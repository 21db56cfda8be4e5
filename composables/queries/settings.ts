import { useServerChange, useServerQuery } from '~/composables/useServerQuery'
import type { OrganisationChanges } from '~/shared/schemas/organisation'
import type { OrganisationSettings } from '~/shared/types/organisation'

export const useSettings = () => useServerQuery<OrganisationSettings>({ key: ['settings'], path: '/api/organisation', essential: true })

export const useSaveSettings = () => useServerChange<OrganisationChanges, OrganisationSettings>({
  stale: ['settings', 'me', 'reviews', 'overview'], send: (request, body) => request('/api/organisation', { method: 'PATCH', body }),
})

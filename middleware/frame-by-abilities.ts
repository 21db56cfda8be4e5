import { useQueryClient } from '@tanstack/vue-query'
import { meKey } from '~/composables/queries/session'
import type { Me } from '~/shared/types/people'

/** For pages that tenants and staff share: those who see the portfolio get the desk's frame, the others the phone's. */
export default defineNuxtRouteMiddleware(() => {
  const me = useQueryClient().getQueryData<Me>(meKey)
  setPageLayout(me?.abilities.includes('see portfolio') ? 'default' : 'phone')
})

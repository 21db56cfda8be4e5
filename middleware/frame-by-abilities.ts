import { useQueryClient } from '@tanstack/vue-query'
import { meKey } from '~/composables/queries/session'
import type { Me } from '~/shared/types/people'

declare module '#app' {
  interface PageMeta {
    /** The ability without which this page is of no use. */
    can?: string
  }
}

/**
 * For pages that tenants and staff share: those who may read the record (staff, engineers) get the desk's frame, the others
 * the phone's. A page that needs an ability refuses those without it.
 */
export default defineNuxtRouteMiddleware((to) => {
  const abilities = useQueryClient().getQueryData<Me>(meKey)?.abilities ?? []
  if (to.meta.can && !abilities.includes(to.meta.can)) return abortNavigation(createError({ statusCode: 403, fatal: true }))
  setPageLayout(abilities.includes('see record') ? 'default' : 'phone')
})

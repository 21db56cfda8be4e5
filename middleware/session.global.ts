import { useQueryClient } from '@tanstack/vue-query'
import { meKey } from '~/composables/queries/session'
import type { Me } from '~/shared/types/people'

declare module '#app' {
  interface PageMeta {
    /** Open to people who are not signed in. */
    public?: boolean
    /** A public page that shows everybody the same. */
    sameForAll?: boolean
  }
}

interface Refusal { statusCode?: number, data?: { message?: string, data?: { code?: string } } }

/** Pages are private unless they say `public: true`. The server puts the person into the page's own query cache here. */
export default defineNuxtRouteMiddleware(async (to) => {
  const rendering = useRequestEvent()
  if (rendering && to.meta.sameForAll) rendering.context.mayKeepPage ??= true
  if (to.meta.public || to.matched.length === 0) return
  const client = useQueryClient()
  const request = useRequestFetch()
  try {
    await client.ensureQueryData({ queryKey: meKey, queryFn: () => request('/api/me') as Promise<Me> })
    if (rendering) rendering.context.mayKeepPage ??= true
  }
  catch (error) {
    const { statusCode, data } = error as Refusal
    if (statusCode === 401) return navigateTo({ path: '/sign-in', query: to.fullPath === '/' ? {} : { next: to.fullPath } })
    if (data?.data?.code === 'no-membership') return navigateTo('/no-membership')
    return abortNavigation(createError({ statusCode: statusCode || 503, message: data?.message, fatal: true }))
  }
})

import { useQueryClient } from '@tanstack/vue-query'

/** A session that ended elsewhere (a change of password, an ended membership) shows at the next read: then the sign-in page, and back. */
export default defineNuxtPlugin((nuxtApp) => {
  nuxtApp.hook('app:mounted', () => nuxtApp.runWithContext(() => {
    const client = useQueryClient()
    const router = useRouter()
    client.getQueryCache().subscribe((event) => {
      if (event.type !== 'updated' || event.action.type !== 'error') return
      const { statusCode } = event.action.error as { statusCode?: number }
      const here = router.currentRoute.value
      if (statusCode !== 401 || here.meta.public) return
      client.clear()
      void router.push({ path: '/sign-in', query: { next: here.fullPath } })
    })
  }))
})

import { dehydrate, hydrate, QueryClient, VueQueryPlugin, type DehydratedState } from '@tanstack/vue-query'

/** One client a request on the server, one a browser; what the server fetched travels with the page. */
export default defineNuxtPlugin((nuxtApp) => {
  const state = useState<DehydratedState | null>('vue-query', () => null)
  const queryClient = new QueryClient({
    defaultOptions: {
      queries: { staleTime: 30_000, retry: (failures, error) => import.meta.client && failures < 2 && isWorthRetrying(error) },
    },
  })
  nuxtApp.vueApp.use(VueQueryPlugin, { queryClient })

  if (import.meta.server) {
    nuxtApp.hook('app:rendered', () => {
      state.value = dehydrate(queryClient)
    })
  }
  if (import.meta.client && state.value) hydrate(queryClient, state.value)
})

/** A refusal stays a refusal; only a lost connection or a server in trouble may answer differently next time. */
function isWorthRetrying(error: unknown): boolean {
  const status = (error as { statusCode?: number } | null)?.statusCode ?? 0
  return status === 0 || status >= 500
}

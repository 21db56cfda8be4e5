import { dehydrate, hydrate, QueryClient, VueQueryPlugin, type DehydratedState } from '@tanstack/vue-query'

/** One client a request on the server, one a browser; what the server fetched travels with the page. */
export default defineNuxtPlugin((nuxtApp) => {
  const state = useState('vue-query', () => shallowRef<DehydratedState | null>(null))
  const queryClient = new QueryClient({
    defaultOptions: {
      // Answers are replaced whole, never changed in place: making each of their objects reactive took a large part of rendering.
      queries: { shallow: true, staleTime: 30_000, retry: (failures, error) => import.meta.client && failures < 2 && isWorthRetrying(error) },
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

import { keepPreviousData, useQuery, useQueryClient, type QueryKey } from '@tanstack/vue-query'

interface ServerQuery {
  key: MaybeRefOrGetter<QueryKey>
  path: MaybeRefOrGetter<string>
  enabled?: MaybeRefOrGetter<boolean>
  /** The page makes no sense without it: a refusal becomes the error page (404 stays 404). */
  essential?: boolean
  /** Show the last answer while another key is fetched: lists that are searched and paged. */
  keepPrevious?: boolean
}

/** A GET of our own server as a vue-query query: fetched with the asker's cookie while the page is rendered, then hydrated. */
export function useServerQuery<T>(options: ServerQuery) {
  const request = useRequestFetch()
  const query = useQuery({
    queryKey: computed(() => toValue(options.key)),
    queryFn: () => request(toValue(options.path)) as Promise<T>,
    enabled: computed(() => toValue(options.enabled ?? true)),
    placeholderData: options.keepPrevious ? keepPreviousData : undefined,
    retry: (failures, error) => failures < 2 && isWorthRetrying(error),
  })
  onServerPrefetch(async () => {
    if (!toValue(options.enabled ?? true)) return
    await query.suspense()
    if (options.essential && query.error.value) throw asPageError(query.error.value)
  })
  if (options.essential && import.meta.client) watch(query.error, error => error && !query.data.value && showError(asPageError(error)), { immediate: true })
  return query
}

interface ServerChange<V, A> {
  send: (request: typeof $fetch, value: V) => Promise<A>
  /** Subjects whose queries are stale afterwards: the first part of their keys. */
  stale: string[]
}

/** A write: sends, then marks the named subjects stale. Returns a plain function for forms. */
export function useServerChange<V, A>({ send, stale }: ServerChange<V, A>) {
  const client = useQueryClient()
  return async (value: V): Promise<A> => {
    const answer = await send($fetch, value)
    await Promise.all(stale.map(subject => client.invalidateQueries({ queryKey: [subject] })))
    return answer
  }
}

const statusOf = (error: unknown) => (error as { statusCode?: number })?.statusCode ?? 0
const isWorthRetrying = (error: unknown) => import.meta.client && (statusOf(error) === 0 || statusOf(error) === 503)
const asPageError = (error: unknown) => {
  const message = (error as { data?: { message?: string } })?.data?.message
  return createError({ statusCode: statusOf(error) || 503, message, fatal: true })
}

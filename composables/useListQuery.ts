import { computed, reactive, watch } from 'vue'
import { useRoute, useRouter } from '#imports'

/** Filters of a list as they stand in the address, so that a list can be kept, sent and gone back to. Empty ones are left out. */
export function useListQuery<K extends string>(names: readonly K[]) {
  const route = useRoute()
  const router = useRouter()
  const inAddress = (name: string) => (typeof route.query[name] === 'string' ? route.query[name] : '')
  const query = computed(() => Object.fromEntries([...names, 'after'].map(name => [name, inAddress(name)]).filter(([, value]) => value)) as Record<string, string>)
  const typed = reactive(Object.fromEntries(names.map(name => [name, inAddress(name)]))) as Record<K, string>
  watch(query, (now) => { for (const name of names) typed[name] = (now[name] ?? '') as typeof typed[K] })
  const apply = () => router.push({ query: Object.fromEntries(Object.entries(typed as Record<string, string>).map(([name, value]) => [name, value.trim()]).filter(([, value]) => value)) })
  const moreAt = (next: string) => `${route.path}?${new URLSearchParams({ ...query.value, after: next })}`
  return { query, typed, apply, moreAt }
}

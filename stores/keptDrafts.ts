import { ref, type Ref } from 'vue'

export interface KeptDrafts<T> {
  drafts: Ref<Record<string, T>>
  load: () => void
  keep: (id: string, draft: T) => void
  drop: (id: string) => void
}

/** Drafts by the id of what they are about, in this browser's own store. `read` refuses what is not one of ours. */
export function keptDrafts<T extends object>(storeKey: string, read: (value: object) => T | null): KeptDrafts<T> {
  const drafts = ref({}) as Ref<Record<string, T>>

  function load() {
    try {
      const found = Object.entries(JSON.parse(localStorage.getItem(storeKey) ?? '{}') as Record<string, unknown>)
      drafts.value = Object.fromEntries(found.flatMap(([id, value]) => {
        const draft = typeof value === 'object' && value !== null ? read(value) : null
        return draft ? [[id, draft]] : []
      }))
    }
    catch { drafts.value = {} }
  }
  function save() {
    // A full or forbidden store must not stop the work itself: the draft lives on in memory.
    try { localStorage.setItem(storeKey, JSON.stringify(drafts.value)) }
    catch { return }
  }
  function keep(id: string, draft: T) {
    drafts.value = { ...drafts.value, [id]: JSON.parse(JSON.stringify(draft)) as T }
    save()
  }
  function drop(id: string) {
    if (!(id in drafts.value)) return
    drafts.value = Object.fromEntries(Object.entries(drafts.value).filter(([other]) => other !== id))
    save()
  }
  return { drafts, load, keep, drop }
}

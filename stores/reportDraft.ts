import { defineStore } from 'pinia'
import { v4 } from 'uuid'
import { ref } from 'vue'
import { NOTHING_ASKED } from '~/shared/types/mark'
import type { DraftPhoto, ReportDraft } from '~/shared/types/reportDraft'

const STORE_KEY = 'lathkey.report-drafts'
/** Ours: what nobody came back to for a month is out of date. */
const KEPT_FOR_MS = 30 * 86_400_000

export const emptyDraft = (): ReportDraft => ({
  key: v4(), question: 'room', answers: { ...NOTHING_ASKED, recentEvents: [], dangerSigns: [], kind: null, roomId: null },
  noDanger: false, sameAsMarkId: null, photos: [], savedAt: '', isWaiting: false,
})

/** Reports begun on this phone and not yet received: they outlive a reload and a lost signal. One for each person and home. */
export const useReportDraft = defineStore('reportDraft', () => {
  const drafts = ref<Record<string, ReportDraft>>({})
  /** False where the browser forbids or has no room to keep anything. */
  const isKept = ref(true)

  function load() {
    const now = Date.now()
    try {
      const kept = JSON.parse(localStorage.getItem(STORE_KEY) ?? '{}') as Record<string, ReportDraft>
      drafts.value = Object.fromEntries(Object.entries(kept).filter(([, draft]) => now - Date.parse(draft.savedAt) < KEPT_FOR_MS))
    }
    catch { drafts.value = {} }
  }
  function write() {
    try {
      localStorage.setItem(STORE_KEY, JSON.stringify(drafts.value))
      isKept.value = true
    }
    catch { isKept.value = false }
  }
  function change(id: string, changes: Partial<ReportDraft>) {
    drafts.value = { ...drafts.value, [id]: { ...(drafts.value[id] ?? emptyDraft()), ...changes, savedAt: new Date().toISOString() } }
    write()
  }
  function changePhoto(id: string, localId: string, changes: Partial<DraftPhoto>) {
    const photos = drafts.value[id]?.photos ?? []
    if (!photos.some(photo => photo.localId === localId)) return
    change(id, { photos: photos.map(photo => photo.localId === localId ? { ...photo, ...changes } : photo) })
  }
  function drop(id: string) {
    drafts.value = Object.fromEntries(Object.entries(drafts.value).filter(([other]) => other !== id))
    write()
  }
  /** Pictures that some draft still needs. */
  const photoIdsInUse = () => Object.values(drafts.value).flatMap(draft => draft.photos.map(photo => photo.localId))

  return { drafts, isKept, load, change, changePhoto, drop, photoIdsInUse }
})

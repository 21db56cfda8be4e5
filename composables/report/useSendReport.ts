import { useQueryClient } from '@tanstack/vue-query'
import { readProblem, type FormProblem } from '~/composables/formProblem'
import type { ReportPhotos } from '~/composables/report/useReportPhotos'
import type { Receipt } from '~/shared/types/receipt'
import { reportBody } from '~/shared/utils/report/reportBody'
import { isReportOfDanger } from '~/shared/utils/report/dangerOf'
import { useReportDraft } from '~/stores/reportDraft'

/** Ours: how often a report that waits for a signal is tried again while the page is open. */
const TRY_AGAIN_MS = 15_000
/** What may pass by itself: no line, too many at once, a server that restarts. */
const PASSES = (status: number) => status === 0 || status === 429 || status >= 500
const STALE = ['units', 'marks', 'observations', 'findings', 'overview', 'properties', 'record']

/** Sends one draft, once: the same key goes along each time, so that the server knows a second try. */
export function useSendReport(unitId: string, draftId: () => string, photos: ReportPhotos) {
  const store = useReportDraft()
  const client = useQueryClient()
  const isSending = ref(false)
  const problem = ref<FormProblem | null>(null)
  const draft = computed(() => store.drafts[draftId()])
  const isWaiting = computed(() => draft.value?.isWaiting === true)

  const isDanger = () => isReportOfDanger(draft.value!.answers)

  async function post(): Promise<Receipt> {
    const { key } = draft.value!
    return await $fetch<unknown>(`/api/units/${unitId}/observations`, {
      method: 'POST', headers: { 'Idempotency-Key': key }, body: reportBody(draft.value!), timeout: 60_000,
    }) as Receipt
  }

  async function postWithPhotos(): Promise<Receipt> {
    // Photos that cannot be sent now never hold back a report of danger.
    if (!await photos.uploadAll() && !isDanger()) throw { statusCode: 0 }
    try { return await post() }
    catch (error) {
      if (!readProblem(error).fields.photoIds) throw error
      if (!await photos.uploadAgain() && !isDanger()) throw { statusCode: 0 }
      return await post()
    }
  }

  async function finish(receipt: Receipt) {
    const localIds = photos.photos.value.map(photo => photo.localId)
    const left = photos.photos.value.filter(photo => photo.state === 'kept').length
    store.drop(draftId())
    await photos.forget(localIds)
    await Promise.all(STALE.map(subject => client.invalidateQueries({ queryKey: [subject] })))
    await navigateTo({ path: `/reports/${receipt.id}`, query: { sent: '1', ...left > 0 && { left } } }, { replace: true })
  }

  async function send() {
    if (isSending.value || !draft.value) return
    isSending.value = true
    problem.value = null
    try {
      const receipt = await postWithPhotos()
      await finish(receipt)
    }
    catch (error) {
      const found = readProblem(error)
      if (PASSES(found.status)) store.change(draftId(), { isWaiting: true })
      else {
        problem.value = found
        store.change(draftId(), { isWaiting: false })
      }
    }
    finally { isSending.value = false }
  }

  const tryAgain = () => {
    if (isWaiting.value) void send()
    else void photos.uploadAll()
  }
  const comeBack = () => document.visibilityState === 'visible' && tryAgain()
  let timer: ReturnType<typeof setInterval> | undefined
  onMounted(() => {
    window.addEventListener('online', tryAgain)
    document.addEventListener('visibilitychange', comeBack)
    timer = setInterval(() => isWaiting.value && void send(), TRY_AGAIN_MS)
  })
  onBeforeUnmount(() => {
    window.removeEventListener('online', tryAgain)
    document.removeEventListener('visibilitychange', comeBack)
    clearInterval(timer)
  })

  return { isSending, isWaiting, problem, send }
}

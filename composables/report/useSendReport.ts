import { useQueryClient } from '@tanstack/vue-query'
import { readProblem, type FormProblem } from '~/composables/formProblem'
import type { ReportPhotos } from '~/composables/report/useReportPhotos'
import { useTryAgain } from '~/composables/report/useTryAgain'
import type { Receipt } from '~/shared/types/receipt'
import type { ReportDraft } from '~/shared/types/reportDraft'
import { isReportOfDanger } from '~/shared/utils/report/dangerOf'
import { reportBody } from '~/shared/utils/report/reportBody'
import { useReportDraft } from '~/stores/reportDraft'

/** What may pass by itself: no line, too many at once, a server that restarts. */
const passes = (status: number) => status === 0 || status === 429 || status >= 500
const STALE = ['units', 'marks', 'observations', 'findings', 'overview', 'properties', 'record']

/** Once: the same key goes along each time, so that the server knows a second try. Photos that cannot be sent now never hold back a report of danger. */
async function sendOnce(unitId: string, draft: () => ReportDraft, photos: ReportPhotos): Promise<Receipt> {
  const post = async () => await $fetch<unknown>(`/api/units/${unitId}/observations`, {
    method: 'POST', headers: { 'Idempotency-Key': draft().key }, body: reportBody(draft()), timeout: 60_000,
  }) as Receipt
  const mayGo = (areSent: boolean) => areSent || isReportOfDanger(draft().answers)

  if (!mayGo(await photos.uploadAll())) throw { statusCode: 0 }
  try { return await post() }
  catch (error) {
    if (!readProblem(error).fields.photoIds) throw error
    if (!mayGo(await photos.uploadAgain())) throw { statusCode: 0 }
    return await post()
  }
}

export function useSendReport(unitId: string, draftId: () => string, photos: ReportPhotos) {
  const store = useReportDraft()
  const client = useQueryClient()
  const isSending = ref(false)
  const problem = ref<FormProblem | null>(null)
  const isWaiting = computed(() => store.drafts[draftId()]?.isWaiting === true)

  async function finish({ id }: Receipt) {
    const sent = photos.photos.value
    const left = sent.filter(photo => photo.state === 'kept').length
    store.drop(draftId())
    await photos.forget(sent.map(photo => photo.localId))
    await Promise.all(STALE.map(subject => client.invalidateQueries({ queryKey: [subject] })))
    await navigateTo({ path: `/reports/${id}`, query: { sent: '1', ...left > 0 && { left } } }, { replace: true })
  }

  async function send() {
    if (isSending.value || !store.drafts[draftId()]) return
    isSending.value = true
    problem.value = null
    try { await finish(await sendOnce(unitId, () => store.drafts[draftId()]!, photos)) }
    catch (error) {
      const found = readProblem(error)
      store.change(draftId(), { isWaiting: passes(found.status) })
      if (!passes(found.status)) problem.value = found
    }
    finally { isSending.value = false }
  }

  useTryAgain(() => isWaiting.value, () => void (isWaiting.value ? send() : photos.uploadAll()))

  return { isSending, isWaiting, problem, send }
}

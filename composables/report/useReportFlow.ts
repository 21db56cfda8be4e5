import type { ReportAnswers, ReportDraft, ReportQuestion } from '~/shared/types/reportDraft'
import { problemsOn } from '~/shared/utils/report/reportBody'
import { questionAfter, questionBefore, questionsFor, reachableQuestion, unanswer } from '~/shared/utils/report/questions'
import { emptyDraft, useReportDraft } from '~/stores/reportDraft'

/**
 * Which question is shown: it stands in the address, so that the phone's own way back leads one question back.
 * Until the draft is read from this phone, server and browser both draw the form as if nothing had been said.
 */
export function useReportFlow(draftId: () => string, today: () => string) {
  const route = useRoute()
  const router = useRouter()
  const store = useReportDraft()
  const blank = emptyDraft()

  const draft = computed<ReportDraft>(() => store.drafts[draftId()] ?? blank)
  const question = computed(() => reachableQuestion(route.query.q, draft.value.answers))
  const questions = computed(() => questionsFor(draft.value.answers.kind))
  const errors = ref<Record<string, string>>({})

  const save = (changes: Partial<ReportDraft>) => store.change(draftId(), changes)

  function answer(changes: Partial<ReportAnswers>) {
    errors.value = Object.fromEntries(Object.entries(errors.value).filter(([field]) => !(field in changes)))
    const isElsewhere = 'roomId' in changes || 'kind' in changes
    save({ answers: { ...draft.value.answers, ...changes }, ...isElsewhere && { sameAsMarkId: null } })
  }

  async function goTo(next: ReportQuestion) {
    errors.value = {}
    if (store.drafts[draftId()]) save({ question: next })
    await router.push({ query: { q: next } })
  }

  async function goOn() {
    errors.value = problemsOn(question.value, draft.value, today())
    if (Object.keys(errors.value).length === 0) await goTo(questionAfter(question.value, draft.value.answers.kind))
  }

  async function skip() {
    save({ answers: unanswer(question.value, draft.value.answers), ...question.value === 'danger' && { noDanger: false } })
    await goTo(questionAfter(question.value, draft.value.answers.kind))
  }

  async function goBack() {
    await goTo(questionBefore(question.value, draft.value.answers.kind) ?? 'room')
  }

  /** Picks up where the person left, when the address does not say where. */
  async function resume() {
    store.load()
    const kept = store.drafts[draftId()]
    if (kept && route.query.q === undefined && kept.question !== 'room') await router.replace({ query: { q: kept.question } })
    return kept !== undefined
  }

  return { draft, question, questions, errors, save, answer, goTo, goOn, skip, goBack, resume }
}

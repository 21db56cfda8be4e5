import { v4 as newKey } from 'uuid'
import { readProblem } from '~/composables/formProblem'
import { useEnterPaperReport } from '~/composables/queries/paperReports'
import { NOTHING_ASKED, type DangerSign } from '~/shared/types/mark'
import type { ReportAnswers } from '~/shared/types/reportDraft'
import { FORM_ORDER } from '~/shared/utils/papers/reportForm'
import { questionsFor } from '~/shared/utils/report/questions'
import { problemsOn } from '~/shared/utils/report/reportBody'

const LEFT_OUT = ['photos', 'send']

/** A sheet that was filled in by hand, being entered: answers, who and when, what is wrong with them, and the sending. */
export function usePaperReport(unitId: string, today: () => string) {
  const enter = useEnterPaperReport(unitId)
  const key = newKey()
  const answers = ref<ReportAnswers>({ ...NOTHING_ASKED, kind: null, roomId: null })
  const noDanger = ref(false)
  const sameAsMarkId = ref<string | null>(null)
  const reporterName = ref('')
  const filledInOn = ref<string | null>(null)
  const errors = ref<Record<string, string>>({})
  const message = ref('')
  const busy = ref(false)

  const questions = computed(() => FORM_ORDER.filter(question => !LEFT_OUT.includes(question) && questionsFor(answers.value.kind).includes(question)))

  function answer(changes: Partial<ReportAnswers>) {
    answers.value = { ...answers.value, ...changes }
    if (changes.kind !== undefined || changes.roomId !== undefined) sameAsMarkId.value = null
  }
  function tick(signs: DangerSign[], none: boolean) {
    answer({ dangerSigns: signs })
    noDanger.value = none
  }

  function look(): Record<string, string> {
    const on = filledInOn.value ?? today()
    return {
      ...reporterName.value.trim() ? {} : { reporterName: 'Whose form is it? Their name is enough.' },
      ...filledInOn.value ? {} : { filledInOn: 'On which day was it filled in?' },
      ...Object.assign({}, ...[...questions.value, 'send' as const].map(question => problemsOn(question, { answers: answers.value }, on))) as Record<string, string>,
    }
  }

  async function send() {
    errors.value = look()
    message.value = ''
    if (busy.value || Object.keys(errors.value).length > 0) return
    busy.value = true
    try {
      const receipt = await enter({
        key, paper: { reporterName: reporterName.value, filledInOn: filledInOn.value! },
        report: { ...answers.value, note: answers.value.note?.trim() || null, photoIds: [], sameAsMarkId: sameAsMarkId.value },
      })
      await navigateTo(`/reports/${receipt.id}`)
    }
    catch (error) {
      const problem = readProblem(error)
      errors.value = Object.fromEntries(Object.entries(problem.fields).map(([field, text]) => [field.replace(/^(report|paper)\./, ''), text]))
      message.value = Object.keys(errors.value).length > 0 ? '' : problem.message
    }
    finally { busy.value = false }
  }

  return { answers, noDanger, sameAsMarkId, reporterName, filledInOn, errors, message, busy, questions, answer, tick, send }
}

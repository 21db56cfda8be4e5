import { computed, type WritableComputedRef } from 'vue'
import type { ReportAnswers } from '~/shared/types/reportDraft'

export interface QuestionProps {
  answers: ReportAnswers
  errors: Record<string, string>
  /** The question itself, for the group that stands under the heading. */
  label: string
}
export type AnswerEmit = (event: 'answer', changes: Partial<ReportAnswers>) => void

/** Two-way binding of single answers: read from the draft, written as an event. */
export function answerModels(props: QuestionProps, emit: AnswerEmit) {
  return <K extends keyof ReportAnswers>(field: K): WritableComputedRef<ReportAnswers[K]> => computed({
    get: () => props.answers[field],
    set: value => emit('answer', { [field]: value } as Partial<ReportAnswers>),
  })
}

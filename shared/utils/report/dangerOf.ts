import type { DangerSign } from '../../types/mark'
import type { ReportAnswers } from '../../types/reportDraft'
import { dangerSignsIn } from '../movement/impliedDanger'

/** Danger signs in what was answered so far; before the kind is known, what was ticked and what any kind implies. */
export const dangerOf = (answers: ReportAnswers): DangerSign[] => dangerSignsIn({ ...answers, kind: answers.kind ?? 'crack' })

export const isReportOfDanger = (answers: ReportAnswers): boolean => dangerOf(answers).length > 0

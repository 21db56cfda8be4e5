/** Answers of a survey that nobody has given, and what each would be worth. */
export const OPEN_ANSWERS = [
  'framing', 'clear-height', 'opening', 'condition', 'joists', 'measures', 'bearing-walls', 'stamp', 'top-edge', 'bearing-length', 'finish', 'insulation', 'deck',
] as const
export type OpenAnswerCode = typeof OPEN_ANSWERS[number]

export interface OpenAnswer {
  code: OpenAnswerCode
  /** The group of joists it is about; null for the whole attic. */
  fieldName: string | null
  /** The field of the form where it is given. */
  path: string
  /** Rating if this alone came out as well as it can, psf; null where no answer can be called the best. */
  atBestPsf: number | null
}

export interface OpenAnswers {
  nowPsf: number
  /** Rating if all of them came out as well as they can; null where one cannot be foreseen. */
  allAtBestPsf: number | null
  answers: OpenAnswer[]
}

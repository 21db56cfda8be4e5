/** A question that may stay open, as the three answers a person is offered. */
export type YesNoUnsure = 'yes' | 'no' | 'unknown'

export const YES_NO_UNSURE: readonly { value: YesNoUnsure, label: string }[] = [
  { value: 'yes', label: 'Yes' }, { value: 'no', label: 'No' }, { value: 'unknown', label: 'Not sure' },
]

export const answerOf = (told: boolean | null | undefined): YesNoUnsure => told === null || told === undefined ? 'unknown' : told ? 'yes' : 'no'
export const toldBy = (answer: YesNoUnsure): boolean | null => answer === 'unknown' ? null : answer === 'yes'

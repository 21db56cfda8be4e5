import type { AtticSurvey, JoistField } from '../../types/attic'
import { FIELD_ANSWERS, SURVEY_ANSWERS, type SurveyAnswer } from './surveyAnswers'
import type { UnitSystem } from '../units'

/** One difference between two surveys, as a person reads it. `group`: the group of joists it is of; null for the attic. */
export interface SurveyChange { group: string | null, label: string, before: string, after: string }

const same = (one: unknown, other: unknown): boolean => JSON.stringify(one) === JSON.stringify(other)

function changesOf<T>(answers: readonly SurveyAnswer<T>[], before: T, after: T, group: string | null, system: UnitSystem): SurveyChange[] {
  return answers.filter(({ of }) => !same(of(before), of(after))).map(({ label, words }) => ({ group, label, before: words(before, system), after: words(after, system) }))
}

/** Groups of joists are the same by name; what is left over on both sides is the same by its place, and was renamed. */
export function pairFields(before: readonly JoistField[], after: readonly JoistField[]): { before: JoistField | null, after: JoistField | null }[] {
  const byName = new Map(after.map(field => [before.find(({ name }) => name === field.name), field] as const))
  const renamed = after.filter(field => !before.some(({ name }) => name === field.name))
  const pairs = before.map((field, index) => {
    const found = byName.get(field) ?? renamed.find(other => after.indexOf(other) === index)
    return { before: field as JoistField | null, after: found ?? null }
  })
  const taken = new Set(pairs.map(pair => pair.after))
  return [...pairs, ...after.filter(field => !taken.has(field)).map(field => ({ before: null, after: field }))]
}

const SUMMARY = FIELD_ANSWERS.filter(({ label }) => ['Size', 'Spacing', 'Clear span'].includes(label))
const joistWords = (field: JoistField, system: UnitSystem): string => SUMMARY.map(({ label, words }) => `${label.toLowerCase()} ${words(field, system)}`).join(', ')

/** What a survey says otherwise than the one before, in the order of the survey. */
export function compareSurveys(before: AtticSurvey, after: AtticSurvey, system: UnitSystem = 'us'): SurveyChange[] {
  const fields = pairFields(before.joistFields, after.joistFields).flatMap((pair): SurveyChange[] => {
    if (pair.before && pair.after) return changesOf(FIELD_ANSWERS, pair.before, pair.after, pair.after.name, system)
    const field = (pair.before ?? pair.after)!
    const words = joistWords(field, system)
    return [{ group: field.name, label: 'Group of joists', before: pair.before ? words : 'not in this survey', after: pair.after ? words : 'not in this survey' }]
  })
  return [...changesOf(SURVEY_ANSWERS, before, after, null, system), ...fields]
}

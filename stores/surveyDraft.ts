import { defineStore } from 'pinia'
import type { AtticSurvey } from '~/shared/types/attic'
import { emptySurvey } from '~/shared/utils/attic/emptySurvey'
import { keptDrafts } from './keptDrafts'

/** A draft of an older version may lack an answer: it then counts as not given. */
const readSurvey = (value: object): AtticSurvey | null =>
  Array.isArray((value as Partial<AtticSurvey>).joistFields) ? { ...emptySurvey(''), ...value } : null

/** Surveys begun on this browser and not yet kept: they outlive a reload and a lost signal. */
export const useSurveyDraft = defineStore('surveyDraft', () => keptDrafts('lathkey.survey-drafts', readSurvey))

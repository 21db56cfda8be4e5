import { defineStore } from 'pinia'
import type { AtticSurvey } from '~/shared/types/attic'

const STORE_KEY = 'lathkey.survey-drafts'

/** Surveys begun on this browser and not yet kept: they outlive a reload and a lost signal. */
export const useSurveyDraft = defineStore('surveyDraft', () => {
  const drafts = ref<Record<string, AtticSurvey>>({})

  function load() {
    try { drafts.value = JSON.parse(localStorage.getItem(STORE_KEY) ?? '{}') as Record<string, AtticSurvey> }
    catch { drafts.value = {} }
  }
  function save() {
    // A full or forbidden store must not stop the survey itself.
    try { localStorage.setItem(STORE_KEY, JSON.stringify(drafts.value)) }
    catch { /* the draft lives on in memory */ }
  }
  function keep(atticId: string, survey: AtticSurvey) {
    drafts.value = { ...drafts.value, [atticId]: JSON.parse(JSON.stringify(survey)) as AtticSurvey }
    save()
  }
  function drop(atticId: string) {
    drafts.value = Object.fromEntries(Object.entries(drafts.value).filter(([id]) => id !== atticId))
    save()
  }
  return { drafts, load, keep, drop }
})

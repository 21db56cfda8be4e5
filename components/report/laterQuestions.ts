import { defineAsyncComponent } from 'vue'

/**
 * All questions but the first come a moment after the page: it opens sooner on a slow line.
 * fetchLaterQuestions() brings them at once, so that none is missing when the signal goes.
 * What they share with the page itself has to be part of another page too, or the build no longer knows the page by its name:
 * so the first question does without answerModels.ts. `npm run size` fails when that happens.
 */
const later = {
  question: () => import('./LaterQuestion.vue'),
  lead: () => import('./DangerLead.vue'),
  advice: () => import('./DangerAdvice.vue'),
} as const

export const fetchLaterQuestions = () => Promise.allSettled(Object.values(later).map(load => load()))

export const LaterQuestion = defineAsyncComponent(later.question)
export const DangerLead = defineAsyncComponent(later.lead)
export const DangerAdvice = defineAsyncComponent(later.advice)

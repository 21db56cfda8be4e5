import { defineAsyncComponent } from 'vue'

/**
 * All questions but the first come a moment after the page: it opens sooner on a slow line.
 * fetchLaterQuestions() brings them at once, so that none is missing when the signal goes.
 * What they share with the page itself has to be part of another page too, or the build no longer knows the page by its name:
 * so the first questions do without answerModels.ts. `npm run size` fails when that happens.
 */
const later = {
  where: () => import('./QuestionWhere.vue'),
  size: () => import('./QuestionSize.vue'),
  run: () => import('./QuestionRun.vue'),
  wet: () => import('./QuestionWet.vue'),
  danger: () => import('./QuestionDanger.vue'),
  changed: () => import('./QuestionChanged.vue'),
  around: () => import('./QuestionAround.vue'),
  photos: () => import('./QuestionPhotos.vue'),
  send: () => import('./QuestionSend.vue'),
  advice: () => import('./DangerAdvice.vue'),
} as const

export const fetchLaterQuestions = () => Promise.allSettled(Object.values(later).map(load => load()))

export const QuestionWhere = defineAsyncComponent(later.where)
export const QuestionSize = defineAsyncComponent(later.size)
export const QuestionRun = defineAsyncComponent(later.run)
export const QuestionWet = defineAsyncComponent(later.wet)
export const QuestionDanger = defineAsyncComponent(later.danger)
export const QuestionChanged = defineAsyncComponent(later.changed)
export const QuestionAround = defineAsyncComponent(later.around)
export const QuestionPhotos = defineAsyncComponent(later.photos)
export const QuestionSend = defineAsyncComponent(later.send)
export const DangerAdvice = defineAsyncComponent(later.advice)

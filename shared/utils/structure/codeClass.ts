import type { AtticClass, AtticSurvey, CodeBasis } from '../../types/attic'
import type { ClassReason } from '../../types/atticRating'

/** IRC 2018/2021 Table R301.5, live load, psf. Local amendments may ask for more, such as 40 in a habitable attic. */
export const IRC_R301_5: CodeBasis = {
  name: 'IRC Table R301.5',
  note: '',
  psf: { 'habitable-or-fixed-stairs': 30, 'limited-storage': 20, 'no-storage': 10 },
}

/** Table R301.5 notes b and g: least clear height and access opening of an attic with limited storage. */
export const STORAGE_CLEAR_HEIGHT_IN = 42
export const STORAGE_OPENING_IN = { width: 20, length: 30 } as const

export interface CodeClass { atticClass: AtticClass, classPsf: number, reasons: ClassReason[] }

type ClassSurvey = Pick<AtticSurvey, 'access' | 'openingWidthIn' | 'openingLengthIn' | 'clearHeightIn' | 'habitable'>

function storageObstacles(survey: ClassSurvey): ClassReason[] {
  const obstacles: ClassReason[] = []
  const { clearHeightIn, openingWidthIn, openingLengthIn } = survey
  const limits = { limitWidthIn: STORAGE_OPENING_IN.width, limitLengthIn: STORAGE_OPENING_IN.length }
  if (clearHeightIn === null) obstacles.push({ code: 'clear-height-unknown', limitIn: STORAGE_CLEAR_HEIGHT_IN })
  else if (!(clearHeightIn >= STORAGE_CLEAR_HEIGHT_IN)) obstacles.push({ code: 'clear-height-too-low', clearHeightIn, limitIn: STORAGE_CLEAR_HEIGHT_IN })
  if (survey.access === 'none') return [...obstacles, { code: 'no-access' }]
  if (openingWidthIn === null || openingLengthIn === null) return [...obstacles, { code: 'opening-unknown', ...limits }]
  // An opening has no front: 30 x 20 is as good as 20 x 30.
  const fits = Math.min(openingWidthIn, openingLengthIn) >= limits.limitWidthIn && Math.max(openingWidthIn, openingLengthIn) >= limits.limitLengthIn
  if (!fits) obstacles.push({ code: 'opening-too-small', widthIn: openingWidthIn, lengthIn: openingLengthIn, ...limits })
  return obstacles
}

/** Class of an attic with rafters and ceiling joists, and the live load the code asks of it. Unknown answers give the lower class. */
export function codeClass(survey: ClassSurvey, basis: CodeBasis = IRC_R301_5): CodeClass {
  const reasons: ClassReason[] = []
  if (survey.habitable) reasons.push({ code: 'habitable', psf: basis.psf['habitable-or-fixed-stairs'] })
  if (survey.access === 'fixed-stairs') reasons.push({ code: 'fixed-stairs', psf: basis.psf['habitable-or-fixed-stairs'] })
  if (reasons.length > 0) return { atticClass: 'habitable-or-fixed-stairs', classPsf: basis.psf['habitable-or-fixed-stairs'], reasons }
  const obstacles = storageObstacles(survey)
  const { clearHeightIn, openingWidthIn, openingLengthIn } = survey
  if (obstacles.length > 0 || clearHeightIn === null || openingWidthIn === null || openingLengthIn === null) {
    return { atticClass: 'no-storage', classPsf: basis.psf['no-storage'], reasons: obstacles }
  }
  const psf = basis.psf['limited-storage']
  return { atticClass: 'limited-storage', classPsf: psf, reasons: [{ code: 'limited-storage', psf, clearHeightIn, openingWidthIn, openingLengthIn }] }
}

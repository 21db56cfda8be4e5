import type { AtticSurvey } from '../../shared/types/attic'
import type { AtticRating } from '../../shared/types/atticRating'

/** Floor of the measured joist fields, square feet; null unless every field is measured: a part would be taken for the whole. */
export function floorSqFt(survey: AtticSurvey): number | null {
  const areas = survey.joistFields.map(({ spanFt, spacingIn, joistCount }) =>
    spanFt !== null && spacingIn !== null && joistCount !== null && joistCount >= 2 ? spanFt * (joistCount - 1) * spacingIn / 12 : null)
  return areas.length > 0 && areas.every(area => area !== null) ? areas.reduce((sum, area) => sum + area, 0) : null
}

/** What the rated load comes to over the whole floor, pounds. */
export function ratedTotalLb(survey: AtticSurvey, rating: Pick<AtticRating, 'ratedPsf'>): number | null {
  const area = floorSqFt(survey)
  return area === null ? null : rating.ratedPsf * area
}

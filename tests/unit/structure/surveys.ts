import type { AtticDocument, AtticSurvey, JoistField } from '../../../shared/types/attic'

/** An invented field: southern pine No. 2 2x8 at 16 in, 12 ft. */
export function joistField(change: Partial<JoistField> = {}): JoistField {
  return {
    name: 'north', species: 'Southern pine', grade: 'No.2', size: '2x8', breadthIn: null, depthIn: null, spacingIn: 16, spanFt: 12, joistCount: 16,
    bearingLengthIn: 1.5, topEdgeBraced: true, installedBeforeJune2013: false, preJune2013StampProven: false, notches: [], holes: [], strongbacks: [], ...change,
  }
}

/** An invented attic of the class "limited storage". */
export function survey(change: Partial<AtticSurvey> = {}): AtticSurvey {
  return {
    surveyedOn: '2026-03-14', framing: 'rafters-and-joists', access: 'pull-down-ladder', openingWidthIn: 22.5, openingLengthIn: 54, clearHeightIn: 60,
    habitable: false, ceilingFinish: 'gypsum-half-inch', insulation: { material: 'fiberglass', depthIn: 6 }, deck: 'full', conditions: [],
    joistFields: [joistField()], ...change,
  }
}

export function paper(change: Partial<AtticDocument> = {}): AtticDocument {
  return {
    kind: 'engineer-letter', writtenOn: '2026-04-01', writtenBy: 'An Engineer', attached: true, ratedPsf: null, liftsHold: false,
    coversWholeAttic: true, area: 'whole attic', ...change,
  }
}

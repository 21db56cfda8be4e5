import type { AtticSurvey, JoistField } from '../../types/attic'

/** A survey nobody has answered yet: every answer unknown. */
export const emptySurvey = (surveyedOn: string): AtticSurvey => ({
  surveyedOn, framing: 'unknown', access: 'unknown', openingWidthIn: null, openingLengthIn: null, clearHeightIn: null, habitable: null,
  ceilingFinish: 'unknown', insulation: { material: 'unknown', depthIn: null }, deck: 'unknown', conditions: null, joistFields: [],
})

export const emptyJoistField = (name: string): JoistField => ({
  name, species: 'unknown', grade: 'no stamp', size: null, breadthIn: null, depthIn: null, spacingIn: null, spanFt: null, joistCount: null,
  bearingLengthIn: null, topEdgeBraced: null, installedBeforeJune2013: null, preJune2013StampProven: false, notches: [], holes: [], strongbacks: [],
})

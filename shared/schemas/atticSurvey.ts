import { z } from 'zod'
import {
  ACCESSES, CEILING_FINISHES, CONDITIONS, DECKS, FRAMINGS, GRADES, JOIST_DIRECTIONS, INSULATION_MATERIALS, NOTCH_EDGES, NOTCH_PLACES, SIZES, SPECIES,
  type AtticSurvey,
} from '../types/attic'
import { LONGEST_SPAN_FT } from '../utils/structure/checkLoadPlan'
import { overlappingFields } from '../utils/structure/fieldLayout'
import { DRESSED_SIZES } from '../utils/structure/lumberValues'
import { day, measure, measureOrUnknown, shortText } from './fields'

const Notch = z.strictObject({
  depthIn: measureOrUnknown('the depth of the notch in inches', 24),
  lengthIn: measureOrUnknown('the length of the notch in inches', 240),
  place: z.enum(NOTCH_PLACES),
  edge: z.enum(NOTCH_EDGES),
})

const Hole = z.strictObject({
  diameterIn: measureOrUnknown('the width of the hole in inches', 24),
  edgeDistanceIn: z.number().min(0, 'Not less than 0.').max(24, 'That is more than 24 in.').nullable(),
  nearestOtherIn: z.number().min(0, 'Not less than 0.').max(480, 'That is more than 480 in.').nullable(),
})

const Strongback = z.strictObject({
  atFt: measure('the distance from the wall in feet', LONGEST_SPAN_FT),
  size: z.enum(SIZES).nullable(),
  breadthIn: measureOrUnknown('the thickness in inches', 12),
  depthIn: measureOrUnknown('the depth in inches', 24),
  sound: z.boolean().nullable(),
  // Set by an engineer's opinion on file, never from the survey form.
  engineerAccepts: z.literal(false),
})

const fromWallFt = (wall: string) => z.number({ error: `Please give the distance from the ${wall} wall in feet.` })
  .min(0, 'Not outside the wall.').max(200, 'That is more than 200 ft. Is it in the right unit?')
const FieldLayout = z.strictObject({ leftFt: fromWallFt('left'), frontFt: fromWallFt('front'), joistsRun: z.enum(JOIST_DIRECTIONS, { error: 'Which way do the joists run?' }) })

export const JoistFieldInput = z.strictObject({
  name: shortText('Please name this group of joists.', 80),
  species: z.enum([...SPECIES, 'unknown']),
  grade: z.enum([...GRADES, 'unknown']),
  size: z.enum(SIZES).nullable(),
  breadthIn: measureOrUnknown('the thickness in inches', 12),
  depthIn: measureOrUnknown('the depth in inches', 24),
  spacingIn: z.number().min(6, 'Joists stand at least 6 in apart.').max(60, 'That is more than 60 in. Measure from middle to middle, in inches.').nullable(),
  spanFt: measureOrUnknown('the span in feet', LONGEST_SPAN_FT),
  joistCount: z.int('A whole number, please.').min(1, 'At least one joist.').max(100, 'At most 100 joists in a group.').nullable(),
  bothEndsBear: z.boolean().nullable().optional(),
  bearingLengthIn: measureOrUnknown('the bearing in inches', 24),
  topEdgeBraced: z.boolean().nullable(),
  installedBeforeJune2013: z.boolean().nullable(),
  preJune2013StampProven: z.boolean(),
  notches: z.array(Notch).max(40, 'At most 40 notches.'),
  holes: z.array(Hole).max(40, 'At most 40 holes.'),
  strongbacks: z.array(Strongback).max(10, 'At most 10 strongbacks.'),
  layout: FieldLayout.nullable().optional(),
}).superRefine((field, context) => {
  if (field.preJune2013StampProven && field.installedBeforeJune2013 !== true) {
    context.addIssue({ code: 'custom', path: ['preJune2013StampProven'], message: 'Only wood put in before June 2013 can be proven so.' })
  }
  const { spanFt, breadthIn, depthIn } = field
  const issue = (path: (string | number)[], message: string) => context.addIssue({ code: 'custom', path, message })
  if (breadthIn !== null && depthIn !== null && breadthIn > depthIn) issue(['breadthIn'], 'A joist stands on edge: its thickness is the shorter side.')
  if (field.bearingLengthIn !== null && spanFt !== null && field.bearingLengthIn >= spanFt * 6) issue(['bearingLengthIn'], 'The joist would lie on the walls over its whole length.')
  const wholeDepthIn = depthIn ?? (field.size ? DRESSED_SIZES[field.size].depthIn : null)
  field.notches.forEach((notch, index) => {
    if (wholeDepthIn !== null && notch.depthIn !== null && notch.depthIn >= wholeDepthIn) issue(['notches', index, 'depthIn'], 'The notch is as deep as the joist. Is the joist cut through? Then say so under the state of the wood.')
  })
  field.holes.forEach((hole, index) => {
    if (wholeDepthIn !== null && hole.diameterIn !== null && hole.diameterIn + (hole.edgeDistanceIn ?? 0) >= wholeDepthIn) issue(['holes', index, 'diameterIn'], 'Hole and distance to the edge together are more than the joist is deep.')
  })
  field.strongbacks.forEach((strongback, index) => {
    if (spanFt !== null && strongback.atFt >= spanFt) context.addIssue({ code: 'custom', path: ['strongbacks', index, 'atFt'], message: 'The strongback must lie between the two walls.' })
  })
})

/** A whole survey. Joists are taken only where there are joists: trusses never carry a joist field. */
export const AtticSurveyInput = z.strictObject({
  surveyedOn: day('When was the attic looked at?'),
  framing: z.enum(FRAMINGS, { error: 'Which kind of roof framing is it? "Not sure" is an answer.' }),
  access: z.enum(ACCESSES),
  openingWidthIn: measureOrUnknown('the width of the opening in inches', 240),
  openingLengthIn: measureOrUnknown('the length of the opening in inches', 240),
  clearHeightIn: measureOrUnknown('the clear height in inches', 480),
  habitable: z.boolean().nullable(),
  ceilingFinish: z.enum(CEILING_FINISHES),
  insulation: z.strictObject({ material: z.enum(INSULATION_MATERIALS), depthIn: z.number().min(0, 'Not less than 0.').max(60, 'That is more than 60 in.').nullable() }),
  deck: z.enum(DECKS),
  deckAreaFt2: measureOrUnknown('the area of the boards in square feet', 10_000).optional(),
  standsOverTenYears: z.boolean().nullable().optional(),
  conditions: z.array(z.enum(CONDITIONS)).max(CONDITIONS.length).nullable(),
  // Comes back with a survey that was read and sent again; the server alone decides it.
  earlierHold: z.unknown().optional().transform(() => undefined),
  codeBasis: z.unknown().optional().transform(() => undefined),
  joistFields: z.array(JoistFieldInput).max(20, 'At most 20 groups of joists.'),
}).superRefine((survey, context) => {
  if (survey.framing !== 'rafters-and-joists' && survey.joistFields.length > 0) {
    context.addIssue({ code: 'custom', path: ['joistFields'], message: 'Joists are entered only for rafters with ceiling joists. Trusses are never calculated.' })
  }
  if (survey.deck !== 'partial' && (survey.deckAreaFt2 ?? null) !== null) {
    context.addIssue({ code: 'custom', path: ['deckAreaFt2'], message: 'An area is given only where boards lie on part of it.' })
  }
  const names = survey.joistFields.map(field => field.name.toLowerCase())
  names.forEach((name, index) => {
    if (names.indexOf(name) < index) context.addIssue({ code: 'custom', path: ['joistFields', index, 'name'], message: 'Another group has this name. Please give each its own.' })
  })
  for (const { index, otherName } of overlappingFields(survey.joistFields)) {
    context.addIssue({ code: 'custom', path: ['joistFields', index, 'layout'], message: `It lies over "${otherName}". Two groups of joists cannot lie in the same place.` })
  }
}) satisfies z.ZodType<AtticSurvey>

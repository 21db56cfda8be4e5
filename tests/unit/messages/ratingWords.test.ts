import { describe, expect, it } from 'vitest'
import { CONDITIONS, type AtticSurvey } from '../../../shared/types/attic'
import { emptyJoistField, emptySurvey } from '../../../shared/utils/attic/emptySurvey'
import { ratingCautionSentence } from '../../../shared/utils/messages/ratingCautions'
import { ratingReasonSentence } from '../../../shared/utils/messages/ratingReasons'
import { rateAttic } from '../../../shared/utils/structure/rating'

const surveys: AtticSurvey[] = [
  emptySurvey('2026-11-01'),
  { ...emptySurvey('2026-11-01'), framing: 'trusses' },
  ...['fixed-stairs', 'hatch', 'none'].map(access => ({ ...emptySurvey('2026-11-01'), framing: 'rafters-and-joists' as const, access: access as 'hatch', conditions: [] })),
  ...CONDITIONS.map(condition => ({ ...emptySurvey('2026-11-01'), framing: 'rafters-and-joists' as const, conditions: [condition] })),
  ...[30, 42, 80].map(clearHeightIn => ({
    ...emptySurvey('2026-11-01'), framing: 'rafters-and-joists' as const, access: 'hatch' as const, clearHeightIn, openingWidthIn: 22, openingLengthIn: 54, conditions: [],
    insulation: { material: 'cellulose' as const, depthIn: 14 },
    joistFields: [
      { ...emptyJoistField('West'), size: '2x4' as const, spacingIn: 24, spanFt: 12, joistCount: 9 },
      { ...emptyJoistField('East'), species: 'Southern pine' as const, grade: 'No.1' as const, size: '2x12' as const, spacingIn: 16, spanFt: 14, joistCount: 12, topEdgeBraced: false,
        notches: [{ depthIn: 4, lengthIn: 9, place: 'middle-third' as const, edge: 'top' as const }], holes: [{ diameterIn: 6, edgeDistanceIn: 1, nearestOtherIn: 1 }] },
    ],
  })),
]

describe('reasons and cautions in words', () => {
  it('gives every reason and caution of a wide range of attics one whole sentence with its numbers', () => {
    for (const survey of surveys) {
      const rating = rateAttic(survey)
      expect(rating.reasons.length).toBeGreaterThan(0)
      for (const sentence of [...rating.reasons.flatMap(reason => [ratingReasonSentence(reason), ratingReasonSentence(reason, 'metric')]), ...rating.cautions.flatMap(caution => [ratingCautionSentence(caution), ratingCautionSentence(caution, 'metric')])]) {
        expect(sentence).toMatch(/^[A-Z0-9].*\.$/)
        expect(sentence).not.toMatch(/undefined|NaN|null|\[object/)
      }
    }
  })

  it('always says with trusses that only drawings or an engineer can allow storage', () => {
    const sentences = rateAttic({ ...emptySurvey('2026-11-01'), framing: 'trusses' }).reasons.map(reason => ratingReasonSentence(reason)).join(' ')
    expect(sentences).toMatch(/No storage unless the truss design drawings or an engineer give a figure/)
  })
})

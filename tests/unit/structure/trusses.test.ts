import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import { AtticSurveyInput } from '../../../shared/schemas/atticSurvey'
import { ACCESSES, CEILING_FINISHES, CONDITIONS, DECKS, DOCUMENT_KINDS, GRADES, SIZES, SPECIES } from '../../../shared/types/attic'
import type { AtticDocument, AtticSurvey, JoistField } from '../../../shared/types/attic'
import { judgeContents } from '../../../shared/utils/attic/judgeContents'
import { joistCapacity } from '../../../shared/utils/structure/joistCapacity'
import { loadFieldOf } from '../../../shared/utils/structure/loadField'
import { rateAttic } from '../../../shared/utils/structure/rating'
import { item } from '../attic/attics'
import { joistField, paper, survey } from './surveys'

const anyField: fc.Arbitrary<JoistField> = fc.record({
  species: fc.constantFrom(...SPECIES), grade: fc.constantFrom(...GRADES), size: fc.constantFrom(...SIZES), spacingIn: fc.constantFrom(12, 16, 24),
  spanFt: fc.double({ min: 4, max: 30, noNaN: true }), joistCount: fc.integer({ min: 2, max: 30 }),
}).map(joistField)
const neverCalculated = fc.constantFrom('trusses' as const, 'unknown' as const)
const anyAttic: fc.Arbitrary<AtticSurvey> = fc.record({
  framing: neverCalculated, access: fc.constantFrom(...ACCESSES), ceilingFinish: fc.constantFrom(...CEILING_FINISHES), deck: fc.constantFrom(...DECKS),
  clearHeightIn: fc.constantFrom(null, 30, 42, 90), habitable: fc.constantFrom(null, true, false), conditions: fc.constantFrom(null, ...[[], [CONDITIONS[0]]] satisfies AtticSurvey['conditions'][]),
  joistFields: fc.array(anyField, { minLength: 1, maxLength: 3 }),
}).map(survey)
const anyPaper: fc.Arbitrary<AtticDocument> = fc.record({
  kind: fc.constantFrom(...DOCUMENT_KINDS), ratedPsf: fc.constantFrom(null, 0, 10, 40), liftsHold: fc.boolean(), coversWholeAttic: fc.boolean(),
}).map(paper)

// Whatever joists are told of such an attic, by a form, a route, an import or an old row.
describe('trusses and unknown framing', () => {
  it('have no joist capacity, no load field and no joist check', () => {
    fc.assert(fc.property(anyAttic, fc.array(anyPaper, { maxLength: 3 }), (attic, papers) => {
      for (const field of attic.joistFields) {
        expect(joistCapacity(field, attic, { withStorage: true }).kind).toBe('not-joists')
        expect(loadFieldOf(attic, field, 20).kind).toBe('not-joists')
      }
      expect(rateAttic(attic, papers)).not.toHaveProperty('joistCheck')
    }))
  })

  it('have contents without a plan, a rated total or a utilisation, and are never called within', () => {
    fc.assert(fc.property(anyAttic, fc.array(anyPaper, { maxLength: 3 }), (attic, documents) => {
      const contents = judgeContents({ survey: attic, documents, items: [item()] })
      expect(contents.fields.every(field => field.plan === null && field.answer.kind === 'not-joists')).toBe(true)
      expect(contents).toMatchObject({ ratedTotalLb: null, utilisation: null, worstJoist: null, chanceOfExceeding: null })
      expect(contents.state).not.toBe('within')
    }))
  })

  it('without a paper hold nothing', () => {
    fc.assert(fc.property(anyAttic, (attic) => { expect(rateAttic(attic, []).ratedPsf).toBe(0) }))
  })

  it('are refused with joists in them by the form and the route alike', () => {
    fc.assert(fc.property(anyAttic, (attic) => {
      const { earlierHold: _, ...entered } = attic
      const checked = AtticSurveyInput.safeParse({ ...entered, joistFields: entered.joistFields.map(field => ({ ...field, spanFt: 12 })) })
      expect(checked.success).toBe(false)
      expect(checked.error?.issues.map(issue => issue.path.join('.'))).toContain('joistFields')
    }), { numRuns: 30 })
  })
})

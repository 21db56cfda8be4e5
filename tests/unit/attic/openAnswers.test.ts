import { describe, expect, it } from 'vitest'
import { openAnswers } from '../../../shared/utils/attic/openAnswers'
import { openAnswerSentence } from '../../../shared/utils/messages/openAnswerMessages'
import { rateAttic } from '../../../shared/utils/structure/rating'
import { emptySurvey } from '../../../shared/utils/attic/emptySurvey'
import { field, survey } from './attics'

const sound = { ...field, bothEndsBear: true, bearingLengthIn: 1.5 }
const codes = (open: ReturnType<typeof openAnswers>) => open.answers.map(answer => answer.code)

describe('what a survey leaves open', () => {
  it('is nothing where everything was told', () => {
    expect(openAnswers(survey({ joistFields: [sound] }))).toEqual({ nowPsf: 20, allAtBestPsf: 20, answers: [] })
  })

  it('is the framing first: no joist is asked for, and no figure is held out', () => {
    const open = openAnswers(emptySurvey('2026-11-01'))
    expect(codes(open)).toEqual(['framing', 'condition'])
    expect(open.allAtBestPsf).toBeNull()
    expect(open.answers.every(answer => answer.atBestPsf === null)).toBe(true)
  })

  it('never holds out a figure for trusses, whatever is open', () => {
    const open = openAnswers(survey({ framing: 'trusses', joistFields: [], clearHeightIn: null, conditions: null, deck: 'unknown' }))
    expect(open).toMatchObject({ nowPsf: 0, allAtBestPsf: 0 })
    expect(codes(open)).toEqual(['condition'])
  })

  it('gives the rating one answer could lead to: 42 in of height make limited storage (IRC Table R301.5)', () => {
    const open = openAnswers(survey({ clearHeightIn: null, joistFields: [sound] }))
    expect(open.answers).toEqual([{ code: 'clear-height', fieldName: null, path: 'clearHeightIn', atBestPsf: 20 }])
    expect(openAnswerSentence(open.answers[0]!, open.nowPsf, 'us').replaceAll('\u00A0', ' ')).toContain('At best the rating becomes 20 psf.')
  })

  it('says of two answers that wait for each other that either alone changes nothing', () => {
    const open = openAnswers(survey({ clearHeightIn: null, openingWidthIn: null, joistFields: [sound] }))
    expect(open.answers.map(answer => answer.atBestPsf)).toEqual([0, 0])
    expect(open.allAtBestPsf).toBe(20)
    expect(openAnswerSentence(open.answers[0]!, 0, 'us')).toMatch(/Alone it would not raise the rating/)
  })

  it('leads to the box where it is answered, by its group of joists', () => {
    const open = openAnswers(survey({ joistFields: [sound, { ...sound, name: 'South', spanFt: null, grade: 'no stamp', topEdgeBraced: null, bearingLengthIn: null, bothEndsBear: null }] }))
    expect(open.answers.map(({ path, fieldName }) => [path, fieldName])).toEqual([
      ['joistFields.1.spanFt', 'South'], ['joistFields.1.bothEndsBear', 'South'], ['joistFields.1.species', 'South'], ['joistFields.1.topEdgeBraced', 'South'], ['joistFields.1.bearingLengthIn', 'South'],
    ])
  })

  it('tells what cannot be foreseen without a figure: unmeasured joists, and wood nobody looked at', () => {
    const open = openAnswers(survey({ conditions: null, joistFields: [{ ...sound, size: null }] }))
    expect(open.answers.map(answer => [answer.code, answer.atBestPsf])).toEqual([['condition', null], ['measures', null]])
    expect(open.allAtBestPsf).toBeNull()
  })

  it('does not ask for height and opening where stairs or a finished room decide the class', () => {
    expect(codes(openAnswers(survey({ access: 'fixed-stairs', clearHeightIn: null, openingWidthIn: null, joistFields: [sound] })))).toEqual([])
  })
})

describe('answers that hold a rating back', () => {
  it('a span between walls that may not bear: at most 10 psf, and said', () => {
    const rating = rateAttic(survey({ joistFields: [{ ...sound, bothEndsBear: null }] }))
    expect(rating).toMatchObject({ ratedPsf: 10, basis: 'unverified' })
    expect(rating.reasons).toContainEqual({ code: 'bearing-walls-unsure', psf: 10, classPsf: 20, fieldNames: ['North'] })
  })

  it('an earlier survey that was not asked keeps its rating, with a caution', () => {
    const rating = rateAttic(survey())
    expect(rating.ratedPsf).toBe(20)
    expect(rating.cautions).toContainEqual({ code: 'bearing-walls-not-asked', fieldName: 'North' })
  })

  it('things that stand for more than ten years: CD 0.9 (NDS 2018 Table 2.3.2) in bending and shear, not in sag or bearing', () => {
    const check = (standsOverTenYears: boolean | null) => {
      const [answer] = rateAttic(survey({ standsOverTenYears, joistFields: [sound] })).joistCheck ?? []
      return answer?.kind === 'capacity' ? answer : expect.fail(answer?.kind)
    }
    const [ordinary, lasting] = [check(null), check(true)]
    const dead = ordinary.inputs.deadPsf
    expect(lasting.bendingPsf + dead).toBeCloseTo(0.9 * (ordinary.bendingPsf + dead), 9)
    expect(lasting.shearPsf + dead).toBeCloseTo(0.9 * (ordinary.shearPsf + dead), 9)
    expect([lasting.deflectionPsf, lasting.bearingPsf]).toEqual([ordinary.deflectionPsf, ordinary.bearingPsf])
  })

  it('boards on part of it: their area stands in the caution', () => {
    expect(rateAttic(survey({ deck: 'partial', deckAreaFt2: 80 })).cautions).toContainEqual({ code: 'no-deck', deckAreaFt2: 80 })
  })
})

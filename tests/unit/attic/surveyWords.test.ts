import { describe, expect, it } from 'vitest'
import type { AtticSurvey, JoistField } from '../../../shared/types/attic'
import type { JoistCapacity, JoistCapacityAnswer } from '../../../shared/types/atticRating'
import { AtticSurveyInput } from '../../../shared/schemas/atticSurvey'
import { deadLines, inputLines, limitLines, otherDivisor, sagAt, stressLines } from '../../../shared/utils/messages/capacitySums'
import { joistAnswerSentence } from '../../../shared/utils/messages/ratingReasons'
import { compareSurveys } from '../../../shared/utils/messages/surveyChanges'
import { joistCapacity } from '../../../shared/utils/structure/joistCapacity'
import { rateAttic } from '../../../shared/utils/structure/rating'
import { field, survey } from './attics'

const withField = (change: Partial<JoistField>, answers: Partial<AtticSurvey> = {}) => survey({ joistFields: [{ ...field, bothEndsBear: true, ...change }], ...answers })

describe('what not knowing does', () => {
  it.each<[string, Partial<JoistField>, number]>([
    ['the size', { size: null }, 10], ['the spacing', { spacingIn: null }, 10], ['the span', { spanFt: null }, 10], ['whether walls bear', { bothEndsBear: null }, 10], ['no bearing wall', { bothEndsBear: false }, 10],
  ])('takes at most 10 psf without %s', (_what, change, psf) => {
    expect(rateAttic(withField({})).ratedPsf).toBe(20)
    expect(rateAttic(withField(change))).toMatchObject({ ratedPsf: psf, basis: 'unverified' })
  })

  it('never raises a rating, whichever answer is forgotten', () => {
    const known = rateAttic(withField({})).ratedPsf
    const forgotten: AtticSurvey[] = [
      survey({ framing: 'unknown', joistFields: [] }), withField({}, { openingWidthIn: null }), withField({}, { clearHeightIn: null }), withField({}, { ceilingFinish: 'unknown' }), withField({}, { deck: 'unknown' }),
      withField({}, { insulation: { material: 'unknown', depthIn: null } }), withField({ species: 'unknown' }), withField({ joistCount: null }), withField({ topEdgeBraced: null }), withField({ bearingLengthIn: null }),
    ]
    for (const one of forgotten) expect(rateAttic(one).ratedPsf).toBeLessThanOrEqual(known)
  })
})

describe('things that stand for more than ten years', () => {
  it('lower bending and shear to nine tenths (NDS 2018 Table 2.3.2), and the rating says so', () => {
    const short = rateAttic(withField({ size: '2x6' }))
    const long = rateAttic(withField({ size: '2x6' }, { standsOverTenYears: true }))
    const [a, b] = [short.joistCheck![0], long.joistCheck![0]] as [JoistCapacity, JoistCapacity]
    expect((b.bendingPsf + b.inputs.deadPsf) / (a.bendingPsf + a.inputs.deadPsf)).toBeCloseTo(0.9, 9)
    expect((b.shearPsf + b.inputs.deadPsf) / (a.shearPsf + a.inputs.deadPsf)).toBeCloseTo(0.9, 9)
    expect(b.deflectionPsf).toBe(a.deflectionPsf)
    expect(long.cautions).toContainEqual({ code: 'stands-over-ten-years', cd: 0.9, fieldName: 'North' })
  })
})

describe('the difference between two surveys', () => {
  it('is nothing when nothing changed but the day', () => {
    expect(compareSurveys(survey(), survey({ surveyedOn: '2027-01-01' }))).toEqual([])
  })

  it('names each answer that changed, in words, before and after', () => {
    const changes = compareSurveys(survey({ conditions: null }), withField({ spanFt: 13.5, notches: [{ depthIn: 1, lengthIn: 2, place: 'end', edge: 'top' }] }, { deck: 'partial', deckAreaFt2: 60 }))
    expect(changes.map(({ group, label }) => [group, label])).toEqual([[null, 'Boards to walk on'], [null, 'Area of the boards'], [null, 'State of the wood'], ['North', 'Clear span'], ['North', 'Both ends on bearing walls'], ['North', 'Notches']])
    expect(changes.find(({ label }) => label === 'Clear span')).toMatchObject({ before: '12\u00A0ft', after: '13.5\u00A0ft' })
    expect(changes.find(({ label }) => label === 'State of the wood')).toMatchObject({ before: 'nobody has looked', after: 'looked, nothing found' })
    expect(changes.at(-1)!.after).toMatch(/1.in deep, 2.in long, at the end, on the wall, top edge/)
  })

  it('is in metric for who reads metric', () => {
    expect(compareSurveys(survey(), withField({ spanFt: 10 }), 'metric').find(({ label }) => label === 'Clear span')).toMatchObject({ before: '3.66\u00A0m', after: '3.05\u00A0m' })
  })

  it('follows a group by its name when groups change places, and by its place when it was renamed', () => {
    const south = { ...field, name: 'South', spanFt: 9 }
    expect(compareSurveys(survey({ joistFields: [field, south] }), survey({ joistFields: [south, field] }))).toEqual([])
    expect(compareSurveys(survey(), survey({ joistFields: [{ ...field, name: 'Over the hall' }] }))).toEqual([{ group: 'Over the hall', label: 'Name', before: 'North', after: 'Over the hall' }])
  })

  it('says which groups came and which are gone', () => {
    const south = { ...field, name: 'South', spanFt: 9 }
    expect(compareSurveys(survey(), survey({ joistFields: [field, south] }))).toEqual([{ group: 'South', label: 'Group of joists', before: 'not in this survey', after: expect.stringMatching(/size 2x10, spacing 16.in, clear span 9.ft/) }])
    expect(compareSurveys(survey(), survey({ framing: 'trusses', joistFields: [] })).at(-1)).toMatchObject({ group: 'North', after: 'not in this survey' })
  })
})

describe('the sums of a group of joists', () => {
  const from = withField({ size: '2x6', spanFt: 10, bearingLengthIn: 3 })
  const capacity = joistCapacity(from.joistFields[0]!, from, { withStorage: true }) as JoistCapacity

  /** Works the printed numbers out as an engineer with a calculator would. */
  const work = (numbers: string): number => {
    const plain = numbers.replaceAll(',', '').replaceAll('−', '-').replaceAll('·', '*').replaceAll('²', '**2').replaceAll('³', '**3')
    expect(plain).toMatch(/^[\d.*/()+\- ]+$/)
    return Function(`return ${plain}`)() as number
  }

  it('come out as printed when somebody works the printed numbers out, all four limits', () => {
    for (const line of limitLines(capacity)) expect(Math.abs(work(line.numbers) / line.psf - 1)).toBeLessThan(0.005)
    expect(limitLines(capacity).filter(line => line.governs).map(line => line.psf)).toEqual([capacity.allowedPsf])
    expect(capacity.allowedPsf).toBe(Math.min(...limitLines(capacity).map(line => line.psf)))
  })

  it('show section, factors and dead load with numbers that come out too, and a source on every line', () => {
    const lines = [...inputLines(capacity), ...stressLines(capacity), ...deadLines(capacity, from), ...limitLines(capacity)]
    for (const line of lines) {
      expect(line.source.length).toBeGreaterThan(2)
      expect(`${line.what}${line.numbers}${line.result}`).not.toMatch(/NaN|undefined|null/)
      if (line.numbers) expect(Math.abs(work(line.numbers) / Number(line.result.replace(/[^\d.]/g, '').replace(/[²³⁴]/g, '')) - 1)).toBeLessThan(0.01)
    }
    // 2.2 + 6 × 0.083 + 2.4 + 33 × 1.5 × 5.5 / 192.
    expect(deadLines(capacity, from).at(-1)!.result).toBe('6.52 psf')
  })

  it('give both sag limits of IRC R301.7: L/240 for board, L/360 for plaster, two thirds of it', () => {
    expect(otherDivisor(capacity)).toEqual({ divisor: 360, psf: capacity.deflectionPsf * 240 / 360 })
  })

  it('sag by 1/240 of the span at the load the sag limit allows, and Kcr times that over the years', () => {
    const sag = sagAt(capacity, capacity.deflectionPsf, false)
    expect(sag.atOnceIn).toBeCloseTo(120 / 240, 9)
    expect(sag).toMatchObject({ kcr: 1.5, limitIn: 0.5 })
    expect(sagAt(capacity, 10, true).kcr).toBe(2)
  })
})

describe('impossible joists', () => {
  const wrong = (change: Partial<JoistField>, answers: Partial<AtticSurvey> = {}) => (AtticSurveyInput.safeParse(withField(change, answers)).error?.issues ?? []).map(issue => issue.path.join('.'))

  it.each<[string, Partial<JoistField>, string]>([
    ['thicker than deep', { size: null, breadthIn: 5.5, depthIn: 1.5 }, 'breadthIn'],
    ['lying on the walls all along', { bearingLengthIn: 20, spanFt: 3 }, 'bearingLengthIn'],
    ['notched through', { notches: [{ depthIn: 9.25, lengthIn: 1, place: 'end', edge: 'top' }] }, 'notches.0.depthIn'],
    ['bored wider than deep', { holes: [{ diameterIn: 8, edgeDistanceIn: 2, nearestOtherIn: null }] }, 'holes.0.diameterIn'],
    ['of no number', { joistCount: 0 }, 'joistCount'],
    ['longer than 40 ft', { spanFt: 40.1 }, 'spanFt'],
    ['proven old and not said to be old', { preJune2013StampProven: true, installedBeforeJune2013: null }, 'preJune2013StampProven'],
  ])('are refused at the field: %s', (_what, change, path) => {
    expect(wrong(change)).toEqual([`joistFields.0.${path}`])
  })

  it('are refused for two groups of one name, and for boards on a part that is no part', () => {
    expect((AtticSurveyInput.safeParse(survey({ joistFields: [field, { ...field, name: 'north' }] })).error?.issues ?? []).map(issue => issue.path.join('.'))).toEqual(['joistFields.1.name'])
    expect(wrong({}, { deck: 'full', deckAreaFt2: 40 })).toEqual(['deckAreaFt2'])
  })
})

describe('joists that were not worked out', () => {
  it('are told why in one sentence', () => {
    const from = withField({ size: null, spanFt: null })
    expect(joistAnswerSentence(joistCapacity(from.joistFields[0]!, from, { withStorage: true }) as Exclude<JoistCapacityAnswer, JoistCapacity>)).toBe('North: not worked out without size, clear span. Measure the joists.')
    const deep = withField({ size: null, breadthIn: 3, depthIn: 20 })
    expect(joistAnswerSentence(joistCapacity(deep.joistFields[0]!, deep, { withStorage: true }) as Exclude<JoistCapacityAnswer, JoistCapacity>)).toMatch(/tables do not cover these joists \(depth 20, limit 16\)\. An engineer decides\./)
    expect(joistAnswerSentence({ kind: 'not-joists', fieldName: 'x', framing: 'trusses' })).toMatch(/never calculated/)
  })
})

describe('another table of loads than the code’s', () => {
  it('sets the class, and the joists still hold it back', () => {
    const codeBasis = { name: 'Invented town', note: '', psf: { 'habitable-or-fixed-stairs': 60, 'limited-storage': 50, 'no-storage': 10 } }
    const rating = rateAttic(withField({ size: '2x6', spanFt: 12 }, { codeBasis }))
    expect(rating).toMatchObject({ classPsf: 50, basis: 'joists' })
    expect(rating.ratedPsf).toBeLessThan(50)
    expect(rating.ratedPsf).toBeGreaterThan(20)
    expect(rateAttic(withField({}, { codeBasis: null })).classPsf).toBe(20)
    expect(AtticSurveyInput.parse(withField({}, { codeBasis })).codeBasis).toBeUndefined()
  })
})

import { describe, expect, it } from 'vitest'
import type { AtticSurvey } from '../../../shared/types/attic'
import type { ContentsItem } from '../../../shared/types/item'
import { judgeContents } from '../../../shared/utils/attic/judgeContents'
import { field, item, survey } from './attics'
import { contentsVerdict } from '../../../shared/utils/messages/contentsMessages'

const judge = (surveyed: AtticSurvey | null, items: ContentsItem[] = []) => judgeContents({ survey: surveyed, documents: [], items })

describe('contents of an attic against its rating', () => {
  it('says unsurveyed, on hold, no storage and empty before any load is judged', () => {
    expect(judge(null, [item()]).state).toBe('unsurveyed')
    expect(judge(survey({ conditions: ['rotten'] }), [item()]).state).toBe('hold')
    expect(judge(survey({ clearHeightIn: 30 })).state).toBe('no-storage')
    expect(judge(survey()).state).toBe('empty')
  })

  it('never calculates a trussed attic: no fields, no utilisation, whatever is stored', () => {
    const judged = judge(survey({ framing: 'trusses', joistFields: [field] }), [item({ typicalLb: 400, lowLb: 400, highLb: 400 })])
    expect(judged).toMatchObject({ state: 'no-storage', utilisation: null, ratedTotalLb: null })
    expect(judged.fields.every(({ plan }) => plan === null)).toBe(true)
  })

  it('carries the rated total of 20 psf over span times width', () => {
    // 12 ft span, 12 spaces of 16 in = 16 ft: 12 × 16 × 20 psf (common practice: psf times area).
    expect(judge(survey(), [item()])).toMatchObject({ state: 'within', ratedTotalLb: 3840, totalLb: 50 })
  })

  it('is over when one joist is, though the attic as a whole is within', () => {
    const judged = judge(survey(), [item({ typicalLb: 900, lowLb: 900, highLb: 900, xFt: 5 })])
    expect(judged.totalLb / judged.ratedTotalLb!).toBeLessThan(0.3)
    expect(judged.state).toBe('over')
    expect(judged.worstJoist!.utilisation).toBeGreaterThan(1)
    expect(judged.heavyInMiddle).toEqual(['a'])
    expect(contentsVerdict(judged)).toMatchObject({ word: 'Over', unloadFirst: true, doNow: null })
  })

  it('relieves the moment when the same weight is moved to the bearing wall', () => {
    const middle = judge(survey(), [item({ typicalLb: 300, lowLb: 300, highLb: 300, xFt: 5 })])
    const wall = judge(survey(), [item({ typicalLb: 300, lowLb: 300, highLb: 300, xFt: 0 })])
    expect(wall.utilisation!).toBeLessThan(middle.utilisation!)
  })

  it('says near when the guesses leave more than one chance in ten of being over', () => {
    const spread = Array.from({ length: 6 }, (_, i) => item({ id: String(i), weightSource: 'estimate', lowLb: 100, typicalLb: 480, highLb: 1500, xFt: 0.5, yFt: i * 2.5, lengthFt: 11, widthFt: 2.4 }))
    const judged = judge(survey(), spread)
    expect(judged.chanceOfExceeding!).toBeGreaterThan(0.1)
    expect(['near', 'over']).toContain(judged.state)
  })

  it('does not pass loaded joists nobody measured as within', () => {
    const judged = judge(survey({ joistFields: [{ ...field, spanFt: null }] }), [item()])
    expect(judged).toMatchObject({ state: 'near', utilisation: null, ratedTotalLb: null })
  })

  it('treats a thing entered outside the measured field as over until its place is mended', () => {
    expect(judge(survey(), [item({ xFt: 11.5 })]).state).toBe('over')
  })

  it('names the things that stand outside, also over joists the survey does not have', () => {
    expect(judge(survey(), [item(), item({ id: 'b', xFt: 11.5 }), item({ id: 'c', fieldNumber: 2 })])).toMatchObject({ state: 'over', outside: ['b', 'c'] })
    expect(judge(survey({ joistFields: [] }), [item({ fieldNumber: 2 })]).outside).toEqual([])
  })

  it('is near while one of two fields is not measured, however little it carries', () => {
    const judged = judge(survey({ joistFields: [field, { ...field, name: 'South', spanFt: null }] }), [item({ typicalLb: 1, lowLb: 1, highLb: 1 })])
    // An unmeasured field holds the whole attic to 10 psf (ours).
    expect(judged).toMatchObject({ state: 'near', ratedTotalLb: null, rating: { ratedPsf: 10, basis: 'unverified' } })
  })
})

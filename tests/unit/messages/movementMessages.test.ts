import { describe, expect, it } from 'vitest'
import { addDays } from '../../../shared/utils/days'
import { trendSentence } from '../../../shared/utils/messages/activityMessages'
import { neighbourSentence } from '../../../shared/utils/messages/neighbourMessages'
import { trialSentence } from '../../../shared/utils/messages/trialMessages'
import { markTrend } from '../../../shared/utils/movement/trend'
import { unloadTrialResult } from '../../../shared/utils/movement/unloadTrial'
import { monthly, readingsOn } from '../movement/seeded'

const plain = (text: string) => text.replaceAll('\u00A0', ' ')
const trial = (days: number[], values: number[], unloadedDay: number | null, sigma = 0.1) =>
  plain(trialSentence(unloadTrialResult(readingsOn(days, values, sigma), unloadedDay === null ? null : addDays('2026-01-01', unloadedDay)), 'crack', 'metric'))

const both = [0, 14, 28, 42, 56, 70, 84, 98, 112, 126, 140, 154, 168, 182, 196, 210]
const slowing = both.map(day => 3 + Math.min(day, 105) * 0.02)

describe('The result of an unload trial in words', () => {
  it('says what changed, by how much, and until when a season cannot be ruled out', () => {
    const said = trial(both, slowing, 105)
    expect(said).toContain('It moved more slowly after the unloading. About 7.3 mm a year before, 0 mm a year after; the change lies between ')
    expect(said).toContain('A season cannot be ruled out before 1 Jan 2027.')
  })

  it('says a step on the day with its range', () => {
    expect(trial(both, both.map(day => day <= 105 ? 3 : 2), 105)).toMatch(/It closed by 0\.\d+ mm to 1\.\d+ mm on the day\./)
  })

  it('says how many more readings would tell, and about when', () => {
    expect(trial([90, 104, 118], [1, 1, 1], 120)).toBe('Cannot tell yet. 3 more readings needed, 3 after the unloading: about 12 Jun 2026, one in two weeks.')
    expect(trial([0], [1], null)).toContain('5 more readings needed, 2 before and 3 after the unloading')
    expect(trial(both.slice(0, 11), slowing.slice(0, 11).map((value, i) => value + (i % 2) * 0.3), 105, 0.3)).toMatch(/^Cannot tell yet whether its rate changed\. .* \d+ more readings, one in two weeks, would tell: about /)
  })

  it('says when it is too late to tell', () => {
    expect(trial([118, 134, 148, 162], [1, 1, 1, 1], 120)).toBe('2 readings before the unloading are missing and cannot be taken any more, so this mark will not tell.')
  })
})

describe('The neighbours’ ceilings in words', () => {
  const period = { fromOn: '2026-01-01', untilOn: '2026-06-01' }
  const moves = (...movements: ('same-way' | 'still' | 'cannot-tell')[]) => movements.map(movement => ({ movement }))

  it('says how many of those that can be compared moved along, and what that speaks for', () => {
    expect(plain(neighbourSentence({ verdict: 'moves-with-others', neighbours: moves('same-way', 'same-way', 'still', 'cannot-tell'), ...period })))
      .toBe('2 of 3 marks on other ceilings moved the same way from 1 Jan 2026 to 1 Jun 2026. That speaks for the season, the weather or the house rather than for what lies above this one.')
    expect(plain(neighbourSentence({ verdict: 'moves-alone', neighbours: moves('still'), ...period }))).toContain('Of 1 mark on other ceilings that can be compared from 1 Jan 2026 to 1 Jun 2026, none moved the same way.')
    expect(neighbourSentence({ verdict: 'some-move-too', neighbours: moves('same-way', 'still', 'still'), ...period })).toContain('neither for nor against')
  })

  it('says when there is nothing to compare', () => {
    expect(neighbourSentence({ verdict: 'cannot-tell', neighbours: [], ...period })).toContain('No mark of this kind on another ceiling')
    expect(neighbourSentence({ verdict: 'cannot-tell', neighbours: moves('cannot-tell'), ...period })).toContain('do not tell yet')
    expect(neighbourSentence({ verdict: 'does-not-move', neighbours: moves('still'), ...period })).toContain('nothing to compare')
  })
})

describe('A trend in words', () => {
  it('says until when a season cannot be ruled out, and not any more once it can', () => {
    expect(plain(trendSentence(markTrend(monthly(9, years => 1 + 6 * years, 0.1)), 'crack'))).toContain('A season cannot be ruled out before 1 Jan 2027.')
    expect(trendSentence(markTrend(monthly(15, years => 1 + 6 * years, 0.1)), 'crack')).not.toContain('season cannot be ruled out')
  })
})

import { describe, expect, it } from 'vitest'
import { addDays } from '../../../shared/utils/days'
import { unloadTrialResult, type MeasuredTrial } from '../../../shared/utils/movement/unloadTrial'
import { normalOf, readingsOn, seeded } from './seeded'

const day = (n: number) => addDays('2026-01-01', n)
const UNLOADED = day(120)
const days = (from: number, count: number, step = 14) => Array.from({ length: count }, (_, i) => from + i * step)

function measured(...given: Parameters<typeof unloadTrialResult>): MeasuredTrial {
  const result = unloadTrialResult(...given)
  if (result.kind !== 'measured') throw new Error('expected a measured trial')
  return result
}

/** Grows by `before` a year up to the unloading, by `after` from then on, with a step on the day. */
const valueOf = (before: number, after: number, step = 0) => (n: number) =>
  3 + (n <= 120 ? before * (n - 120) : after * (n - 120)) / 365.25 + (n > 120 ? step : 0)

const bothSides = [...days(0, 9), ...days(127, 9)]

describe('An unload trial', () => {
  it('gives exact slopes, their change and the step of exact lines', () => {
    const result = measured(readingsOn(bothSides, bothSides.map(valueOf(6, 1, -0.4)), 0.1), UNLOADED)
    expect(result.slopeBefore.value).toBeCloseTo(6, 8)
    expect(result.slopeAfter.value).toBeCloseTo(1, 8)
    expect(result.slopeChange.value).toBeCloseTo(-5, 8)
    expect(result.levelStep.value).toBeCloseTo(-0.4, 8)
    expect([result.readingsBefore, result.readingsAfter]).toEqual([9, 9])
  })

  it('says it slowed, and that it closed, only with both intervals below zero', () => {
    expect(measured(readingsOn(bothSides, bothSides.map(valueOf(12, 0, -1)), 0.1), UNLOADED)).toMatchObject({ verdict: 'slowed', levelVerdict: 'closed', moreReadings: 0, tellsOn: null })
    expect(measured(readingsOn(bothSides, bothSides.map(valueOf(6, 0, -1)), 1), UNLOADED)).toMatchObject({ verdict: 'cannot-tell', levelVerdict: 'no-step-seen' })
  })

  it('says it quickened, or opened', () => {
    expect(measured(readingsOn(bothSides, bothSides.map(valueOf(0, 12, 1)), 0.1), UNLOADED)).toMatchObject({ verdict: 'quickened', levelVerdict: 'opened' })
  })

  it('says no change where the readings are sharp enough to exclude one', () => {
    expect(measured(readingsOn(bothSides, bothSides.map(valueOf(1, 1)), 0.02), UNLOADED)).toMatchObject({ verdict: 'no-change', levelVerdict: 'no-step-seen' })
  })

  it('counts a reading on the day itself as before it', () => {
    expect(unloadTrialResult(readingsOn([106, 113, 120, 127, 134, 141], [1, 1, 1, 1, 1, 1]), UNLOADED)).toMatchObject({ kind: 'measured', readingsBefore: 3, readingsAfter: 3 })
  })

  it('cannot tell yet below three readings a side, and says how many are missing and when they would be there', () => {
    expect(unloadTrialResult(readingsOn([90, 104, 118, 130], [1, 1, 1, 1]), UNLOADED)).toMatchObject({ kind: 'cannot tell yet', missingBefore: 0, missingAfter: 2, moreReadings: 2, tellsOn: day(130 + 28) })
  })

  it('says that no later reading makes up for what was not read before the unloading', () => {
    expect(unloadTrialResult(readingsOn([118, 127, 134, 141, 155], [1, 1, 1, 1, 1]), UNLOADED)).toMatchObject({ kind: 'cannot tell yet', missingBefore: 2, moreReadings: null, tellsOn: null })
  })

  it('before the unloading gives the counts only', () => {
    expect(unloadTrialResult(readingsOn([0, 14], [1, 1]), null)).toMatchObject({ kind: 'cannot tell yet', readingsBefore: 2, readingsAfter: 0, missingBefore: 1, missingAfter: 3, moreReadings: 4 })
    expect(unloadTrialResult([], null)).toMatchObject({ readingsBefore: 0, missingBefore: 3 })
  })

  it('asks for so many more readings that a stop would show, and with them it does', () => {
    const short = [...days(0, 9), ...days(127, 3)]
    const result = measured(readingsOn(short, short.map(valueOf(6, 0)), 0.2), UNLOADED)
    expect(result.verdict).toBe('cannot-tell')
    const more = result.moreReadings!
    expect(more).toBeGreaterThan(0)
    const longer = [...short, ...days(short.at(-1)! + 14, more)]
    expect(measured(readingsOn(longer, longer.map(valueOf(6, 0)), 0.2), UNLOADED).verdict).toBe('slowed')
    expect(result.tellsOn).toBe(day(short.at(-1)! + more * 14))
  })

  it('fits a season along once the readings reach over a year, and says until when it cannot', () => {
    const season = (n: number) => 0.75 * Math.sin(2 * Math.PI * n / 365.25)
    const long = days(-260, 40)
    const result = measured(readingsOn(long, long.map(n => valueOf(6, 0)(n) + season(n)), 0.05), UNLOADED)
    expect(result).toMatchObject({ seasonFitted: true, seasonRuledOutFrom: null, verdict: 'slowed' })
    expect(result.slopeChange.value).toBeCloseTo(-6, 6)
    expect(measured(readingsOn(bothSides, bothSides.map(valueOf(6, 0)), 0.1), UNLOADED)).toMatchObject({ seasonFitted: false, seasonRuledOutFrom: day(365) })
  })

  it('holds the change within its interval in about 95 % of invented series, and calls fewer than 5 % of steady ones slowed', () => {
    const uniform = seeded(31)
    const trials = Array.from({ length: 500 }, () => measured(readingsOn(bothSides, bothSides.map(n => valueOf(3, 3)(n) + 0.2 * normalOf(uniform)), 0.2), UNLOADED))
    const within = trials.filter(({ slopeChange: { interval } }) => interval[0] <= 0 && interval[1] >= 0).length
    expect(within / 500).toBeGreaterThanOrEqual(0.94)
    expect(trials.filter(trial => trial.verdict === 'slowed').length / 500).toBeLessThan(0.05)
  })
})

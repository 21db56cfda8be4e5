import { describe, expect, it } from 'vitest'
import { LIMIT_NAMES, MOVEMENT_LIMITS, OUR_LIMITS } from '../../../shared/types/limits'
import { LimitsEdit } from '../../../shared/schemas/limits'
import { replayLimits, type ReplayedMark } from '../../../shared/utils/movement/replayLimits'
import { activeFromOn, markActivity, markTrend } from '../../../shared/utils/movement/trend'
import { monthly, readingsOn } from './seeded'
import type { TrendReading } from '../../../shared/utils/movement/series'

const markOf = (readings: TrendReading[], changes: Partial<ReplayedMark['setting']> = {}, segment = 1): ReplayedMark => ({
  id: 'mark-1', setting: { kind: 'crack', place: null, wallType: null, framing: null, ...changes }, readings: readings.map(reading => ({ ...reading, segment })),
})
const growing = monthly(13, years => 1 + 4 * years, 0.1)
const jumping = readingsOn([0, 30, 60, 90], [1, 1, 1, 2.5], 0.2)

describe('Walking the past through with other limits', () => {
  it('finds the day a mark was first active, as if each reading had been judged on its day', () => {
    const on = activeFromOn(growing)!
    const upTo = growing.filter(reading => reading.takenOn <= on)
    expect(markActivity(upTo)).toBe('active')
    expect(markActivity(upTo.slice(0, -1))).not.toBe('active')
    expect(replayLimits(markOf(growing), OUR_LIMITS, OUR_LIMITS)).toEqual([{ markId: 'mark-1', segment: 1, rule: 'mark-active', nowOn: on, thenOn: on, change: 'same' }])
    expect(activeFromOn(monthly(13, () => 1))).toBeNull()
  })

  it('a smaller season allowance raises the alarm sooner, a larger one later', () => {
    const sooner = replayLimits(markOf(growing), OUR_LIMITS, { ...OUR_LIMITS, seasonAllowanceMm: 0.3 })
    expect(sooner).toMatchObject([{ rule: 'mark-active', change: 'sooner' }])
    const later = replayLimits(markOf(growing), OUR_LIMITS, { ...OUR_LIMITS, seasonAllowanceMm: 3 })
    expect(later).toMatchObject([{ rule: 'mark-active', change: 'later' }])
  })

  it('a larger jump asked for loses a sudden alarm, a smaller one brings it', () => {
    expect(replayLimits(markOf(jumping), OUR_LIMITS, { ...OUR_LIMITS, leastJumpMm: 2 })).toMatchObject([{ rule: 'mark-sudden', thenOn: null, change: 'gone' }])
    expect(replayLimits(markOf(jumping), { ...OUR_LIMITS, jumpSigmas: 6, leastJumpMm: 2 }, OUR_LIMITS)).toMatchObject([{ rule: 'mark-sudden', nowOn: null, change: 'new' }])
  })

  it('takes jumps within a month as one alarm, as the finding stands for a month', () => {
    const twice = readingsOn([0, 10, 20, 30, 40], [1, 1, 1, 4, 4], 0.2)
    expect(markTrend(twice).suddenRises).toHaveLength(2)
    expect(replayLimits(markOf(twice), OUR_LIMITS, OUR_LIMITS)).toHaveLength(1)
  })

  it('names growth of a sag as such, and leaves counts of pops to their own rule', () => {
    expect(replayLimits(markOf(growing, { kind: 'sag' }), OUR_LIMITS, OUR_LIMITS).map(alarm => alarm.rule)).toEqual(['sag-growing'])
    expect(replayLimits(markOf(growing, { kind: 'nail-pops' }), OUR_LIMITS, OUR_LIMITS)).toEqual([])
  })

  it('walks each segment by itself, so that a repair ends an alarm', () => {
    const mark = markOf(growing)
    const mended = { ...mark, readings: [...mark.readings, ...markOf(jumping, {}, 2).readings] }
    expect(replayLimits(mended, OUR_LIMITS, OUR_LIMITS).map(({ segment, rule }) => [segment, rule])).toEqual([[1, 'mark-active'], [2, 'mark-sudden']])
  })
})

describe('Editable limits', () => {
  it('have defaults within their bounds, and nothing outside them is taken', () => {
    for (const name of LIMIT_NAMES) {
      const { ours, least, most } = MOVEMENT_LIMITS[name]
      expect(ours).toBeGreaterThanOrEqual(least)
      expect(ours).toBeLessThanOrEqual(most)
      expect(LimitsEdit.safeParse({ ...OUR_LIMITS, version: 1, [name]: most * 1.5 + 1 }).success).toBe(false)
      expect(LimitsEdit.safeParse({ ...OUR_LIMITS, version: 1, [name]: least - 0.0001 }).success).toBe(false)
      expect(LimitsEdit.safeParse({ ...OUR_LIMITS, version: 1, [name]: Number.NaN }).success).toBe(false)
    }
    expect(LimitsEdit.safeParse({ ...OUR_LIMITS, version: 1 }).success).toBe(true)
  })

  it('are the limits of the design until somebody changes them', () => {
    expect(OUR_LIMITS).toEqual({
      seasonAllowanceMm: 1.5, trussAllowanceMm: 20, leastReadings: 6, leastDays: 90, pRising: 0.01, dormantWithinMmPerYear: 0.5, leastJumpMm: 1, jumpSigmas: 4, morePops: 3,
    })
  })
})

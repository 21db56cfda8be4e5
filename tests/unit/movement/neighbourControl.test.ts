import { describe, expect, it } from 'vitest'
import { neighbourControl } from '../../../shared/utils/movement/neighbourControl'
import { normalOf, readingsOn, seeded } from './seeded'

const days = Array.from({ length: 9 }, (_, i) => i * 30)
const at = (perYear: number, sigma = 0.1, from = 0) => readingsOn(days.map(day => day + from), days.map(day => 2 + perYear * day / 365.25), sigma)
const neighbour = (markId: string, perYear: number, sigma = 0.1, from = 0) => ({ markId, readings: at(perYear, sigma, from) })
const movements = (...neighbours: ReturnType<typeof neighbour>[]) => neighbourControl(at(4), neighbours).neighbours.map(({ movement }) => movement)

describe('Neighbours’ ceilings in the same months', () => {
  it('a mark moves alone when the others are seen to be still', () => {
    expect(neighbourControl(at(4), [neighbour('a', 0), neighbour('b', 0.2)])).toMatchObject({ verdict: 'moves-alone', fromOn: '2026-01-01', untilOn: '2026-08-29' })
  })

  it('moves with others when at least half of those that tell do so, and some move too below that', () => {
    expect(neighbourControl(at(4), [neighbour('a', 3), neighbour('b', 0)]).verdict).toBe('moves-with-others')
    expect(neighbourControl(at(4), [neighbour('a', 3), neighbour('b', 0), neighbour('c', 0)]).verdict).toBe('some-move-too')
  })

  it('tells same way, other way, still, and what cannot be told', () => {
    expect(movements(neighbour('a', 5), neighbour('b', -5), neighbour('c', 0), neighbour('d', 3, 2))).toEqual(['same-way', 'other-way', 'still', 'cannot-tell'])
  })

  it('looks only at the days the mark itself was read, and wants three readings over 60 days of them', () => {
    const late = neighbourControl(at(4), [neighbour('late', 5, 0.1, 210)]).neighbours[0]!
    expect(late).toMatchObject({ readingCount: 2, slope: null, movement: 'cannot-tell' })
    const few = neighbourControl(at(4), [{ markId: 'few', readings: readingsOn([0, 20, 40], [1, 2, 3]) }]).neighbours[0]!
    expect(few.movement).toBe('cannot-tell')
  })

  it('cannot tell without neighbours, without readings, and for a mark whose own movement is not clear', () => {
    expect(neighbourControl(at(4), []).verdict).toBe('cannot-tell')
    expect(neighbourControl([], [neighbour('a', 5)])).toMatchObject({ verdict: 'cannot-tell', fromOn: null, months: [] })
    expect(neighbourControl(at(2, 2), [neighbour('a', 5)]).verdict).toBe('cannot-tell')
    expect(neighbourControl(at(0), [neighbour('a', 5)]).verdict).toBe('does-not-move')
  })

  it('gives the change of each month beside the median of the others', () => {
    const readings = readingsOn([0, 31, 59, 90], [1, 1.5, 1.25, 2])
    const others = [[2, 2.2, 2.2, 2.2], [2, 2.4, 2.6, 2.4], [2, 2.3, 2.9, 2.1]].map((values, i) => ({ markId: String(i), readings: readingsOn([0, 31, 59, 90], values) }))
    const { months } = neighbourControl(readings, others)
    expect(months.map(({ month, neighbourCount }) => [month, neighbourCount])).toEqual([['2026-02', 3], ['2026-03', 3], ['2026-04', 3]])
    expect(months.map(({ own }) => own)).toEqual([0.5, -0.25, 0.75])
    expect(months.map(({ neighbours }) => Number(neighbours!.toFixed(9)))).toEqual([0.3, 0.2, -0.2])
  })

  it('leaves out the change after a month nobody read', () => {
    expect(neighbourControl(readingsOn([0, 31, 90], [1, 2, 3]), []).months).toEqual([{ month: '2026-02', own: 1, neighbours: null, neighbourCount: 0 }])
  })

  it('under one season for the whole house says together far oftener than alone', () => {
    const uniform = seeded(71)
    const verdicts = Array.from({ length: 300 }, () => {
      const season = (day: number) => 2 * Math.sin(2 * Math.PI * day / 365.25)
      const series = () => readingsOn(days.slice(0, 4), days.slice(0, 4).map(day => 3 + season(day) + 0.1 * normalOf(uniform)), 0.1)
      return neighbourControl(series(), [1, 2, 3].map(n => ({ markId: String(n), readings: series() }))).verdict
    })
    const share = (verdict: string) => verdicts.filter(one => one === verdict).length / verdicts.length
    expect(share('moves-with-others')).toBeGreaterThan(0.9)
    expect(share('moves-alone')).toBeLessThan(0.02)
  })
})

import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { addDays } from '../../../shared/utils/days'
import { CAUSES, CAUSE_CLUES, cluesFor, type CluePattern } from '../../../shared/utils/movement/causeClues'
import { loadLinks } from '../../../shared/utils/movement/loadLink'
import { photoWidth } from '../../../shared/utils/movement/photoScale'
import { readingsOn } from './seeded'

describe('Load above against movement', () => {
  const days = Array.from({ length: 20 }, (_, i) => i * 15)
  const changeDay = 150
  const steps = [{ on: '2026-01-01', totalLb: 100 }, { on: addDays('2026-01-01', changeDay), totalLb: 400 }]

  it('says movement began after a load that a quiet mark got', () => {
    const readings = readingsOn(days, days.map(day => 1 + Math.max(0, day - changeDay) / 365.25 * 12), 0.1)
    expect(loadLinks(readings, steps)).toMatchObject([{ changeLb: 300, verdict: 'began-after', readingsBefore: 11, readingsAfter: 9 }])
  })

  it('says no change where both sides are quiet and sharp enough to tell', () => {
    expect(loadLinks(readingsOn(days, days.map(() => 1), 0.05), steps)[0]!.verdict).toBe('no-change')
  })

  it('cannot tell with coarse readings', () => {
    expect(loadLinks(readingsOn(days, days.map(() => 1), 1), steps)[0]!.verdict).toBe('cannot-tell')
  })

  it('cannot tell with fewer than three readings on a side', () => {
    const late = [{ on: '2026-01-01', totalLb: 0 }, { on: addDays('2026-01-01', 260), totalLb: 400 }]
    expect(loadLinks(readingsOn(days, days.map(() => 1), 0.05), late)[0]).toMatchObject({ verdict: 'cannot-tell', readingsAfter: 2 })
  })

  it('says movement eased after unloading', () => {
    const readings = readingsOn(days, days.map(day => 1 + Math.min(day, changeDay) / 365.25 * 12), 0.1)
    const unload = [{ on: '2026-01-01', totalLb: 400 }, { on: addDays('2026-01-01', changeDay), totalLb: 0 }]
    expect(loadLinks(readings, unload)[0]).toMatchObject({ changeLb: -400, verdict: 'eased-after' })
  })

  it('looks past changes below 50 lb and takes the last step of a day', () => {
    const small = [{ on: '2026-01-01', totalLb: 100 }, { on: '2026-02-01', totalLb: 149 }, { on: '2026-03-01', totalLb: 900 }, { on: '2026-03-01', totalLb: 160 }]
    expect(loadLinks(readingsOn(days, days.map(() => 1)), small)).toEqual([])
  })

  it('refuses a weight that is not one', () => {
    expect(() => loadLinks([], [{ on: '2026-01-01', totalLb: -5 }])).toThrow(RangeError)
    expect(() => loadLinks([], [{ on: '2026-01-01', totalLb: Number.NaN }])).toThrow(RangeError)
  })
})

describe('Width from a photo with a scale', () => {
  const at = (xPx: number, yPx: number) => ({ xPx, yPx })
  const scale = { a: at(0, 0), b: at(300, 400), distanceMm: 50 }
  const stations = [10, 12, 14].map(px => ({ p: at(100, 100), q: at(100, 100 + px) }))

  it('is distance times |PQ| over |AB|, the mean of the stations', () => {
    const width = photoWidth(scale, stations)
    if (width.kind !== 'measured') throw new Error('expected a width')
    expect(width.widthMm).toBeCloseTo(1.2, 12)
    width.stationsMm.forEach((mm, i) => expect(mm).toBeCloseTo([1, 1.2, 1.4][i]!, 12))
  })

  it('asks for at least three stations', () => {
    expect(photoWidth(scale, stations.slice(0, 2))).toEqual({ kind: 'too few stations', needed: 3 })
  })

  it('is never surer than a hand-tapped photo, nor than tilt allows', () => {
    const many = Array.from({ length: 5000 }, () => stations[1]!)
    const few = photoWidth(scale, stations)
    const lots = photoWidth(scale, many)
    if (few.kind !== 'measured' || lots.kind !== 'measured') throw new Error('expected widths')
    expect(few.sigmaMm).toBe(0.18)
    expect(lots.sigmaMm).toBe(0.18)
    const wide = photoWidth(scale, Array.from({ length: 500 }, () => ({ p: at(100, 100), q: at(100, 400) })))
    expect(wide.kind === 'measured' && wide.sigmaMm).toBeGreaterThan(0.015 * 30)
  })

  it('does not depend on the size or the turn of the photo', () => {
    fc.assert(fc.property(fc.double({ min: 0.5, max: 8, noNaN: true }), fc.double({ min: 0, max: 6.28, noNaN: true }), (zoom, turn) => {
      const move = ({ xPx, yPx }: { xPx: number, yPx: number }) => at(
        zoom * (xPx * Math.cos(turn) - yPx * Math.sin(turn)) + 17, zoom * (xPx * Math.sin(turn) + yPx * Math.cos(turn)) - 9)
      const moved = photoWidth({ ...scale, a: move(scale.a), b: move(scale.b) }, stations.map(({ p, q }) => ({ p: move(p), q: move(q) })))
      if (moved.kind === 'measured') expect(moved.widthMm).toBeCloseTo(1.2, 8)
    }))
  })

  it('refuses a scale without length or distance', () => {
    expect(() => photoWidth({ ...scale, b: scale.a }, stations)).toThrow(RangeError)
    expect(() => photoWidth({ ...scale, distanceMm: 0 }, stations)).toThrow(RangeError)
    expect(() => photoWidth(scale, [...stations, { p: at(Number.NaN, 0), q: at(1, 1) }])).toThrow(RangeError)
  })
})

describe('Cause clues', () => {
  const plain: CluePattern = { kind: 'crack', place: null, shape: null, wallType: null, recentEvents: [], mendedBefore: false, widestOnDayOfYear: null }

  it('cover every cause once, each with its source', () => {
    expect(CAUSE_CLUES.map(clue => clue.cause).sort()).toEqual([...CAUSES].sort())
    for (const clue of CAUSE_CLUES) expect(clue.source.length).toBeGreaterThan(5)
  })

  it('a gap at an interior wall corner, widest in January, points to truss uplift (SBCA)', () => {
    const clues = cluesFor({ ...plain, place: 'wall-ceiling-corner', shape: 'gap-along-wall', wallType: 'interior', widestOnDayOfYear: 20 })
    expect(clues[0]!.cause).toBe('truss-uplift')
  })

  it('an outside wall never points to truss uplift', () => {
    const clues = cluesFor({ ...plain, place: 'wall-ceiling-corner', shape: 'gap-along-wall', wallType: 'outside', widestOnDayOfYear: 20 })
    expect(clues.map(clue => clue.cause)).not.toContain('truss-uplift')
  })

  it('a long straight line in the middle points to a board joint', () => {
    expect(cluesFor({ ...plain, place: 'middle', shape: 'straight-line' }).map(clue => clue.cause)).toContain('board-joint')
  })

  it('the season of the widest opening sets truss uplift and a board joint apart', () => {
    const corner = { ...plain, place: 'wall-ceiling-corner', shape: 'straight-line', wallType: 'interior' } as const
    const seam = { ...plain, place: 'middle', shape: 'straight-line' } as const
    expect(cluesFor({ ...corner, widestOnDayOfYear: 20 })[0]!.cause).toBe('truss-uplift')
    const first = (widestOnDayOfYear: number | null) => cluesFor({ ...seam, widestOnDayOfYear }).map(clue => clue.cause).indexOf('board-joint')
    expect(first(200)).toBe(0)
    expect(first(20)).toBeGreaterThan(0)
    expect(first(null)).toBe(first(20))
  })

  it('pops in a row name the board letting go before the harmless cause', () => {
    expect(cluesFor({ ...plain, kind: 'nail-pops', shape: 'bumps-in-a-row' }).map(clue => clue.cause)).toEqual(['board-letting-go', 'fastener-pop'])
  })

  it('a ring after rain points to a leak', () => {
    expect(cluesFor({ ...plain, kind: 'stain', shape: 'ring', recentEvents: ['heavy-rain'] })[0]!.cause).toBe('water-leak')
  })

  it('a mended crack that is back says so first', () => {
    expect(cluesFor({ ...plain, shape: 'straight-line', mendedBefore: true })[0]!.cause).toBe('patch-returning')
  })
})

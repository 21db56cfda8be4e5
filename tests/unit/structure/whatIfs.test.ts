import { describe, expect, it } from 'vitest'
import type { LoadField, PlacedItem } from '../../../shared/types/loadPlan'
import { distanceFromWall } from '../../../shared/utils/structure/distanceFromWall'
import type { DistanceRow } from '../../../shared/utils/structure/distanceFromWall'
import { judgeLoadPlan } from '../../../shared/utils/structure/judgeLoadPlan'
import { loadPlan } from '../../../shared/utils/structure/loadPlan'
import { personOnJoist } from '../../../shared/utils/structure/personOnJoist'
import { sagOverTime, sagTerms } from '../../../shared/utils/structure/sagOverTime'
import { whereMayItGo } from '../../../shared/utils/structure/whereMayItGo'
import type { NewItem, Places } from '../../../shared/utils/structure/whereMayItGo'

const field: LoadField = { spanFt: 14, spacingIn: 16, joistCount: 10, ratedPsf: 20, joistEiLbIn2: 1.4e6 * 47.63, strongbacks: [] }
const member = { depthIn: 7.25, shearLb: 950, bearingLb: 950, deadPsf: 8 }
const box: PlacedItem = { id: 'box', xFt: 6, yFt: 5, lengthFt: 2, widthFt: 2, weightLb: 70 }
const trunk: NewItem = { lengthFt: 3, widthFt: 1.5, weightLb: 80 }

function places(item: NewItem, items: PlacedItem[] = [box]): Places & { kind: 'places' } {
  const answer = whereMayItGo(field, items, item, { member })
  return answer.kind === 'places' ? answer : expect.fail(answer.kind)
}

describe('where an item may go', () => {
  it('tries every half foot and the last place that fits', () => {
    const { spots } = places(trunk)
    expect(new Set(spots.map(spot => spot.xFt)).size).toBe(23)
    expect(Math.max(...spots.map(spot => spot.xFt))).toBe(11)
    expect(Math.max(...spots.map(spot => spot.yFt))).toBe(10.5)
    expect(Math.max(...places({ ...trunk, lengthFt: 2.8 }).spots.map(spot => spot.xFt))).toBeCloseTo(11.2, 12)
  })

  it('each place has the utilisation that the verdict gives when the item stands there', () => {
    for (const spot of places(trunk).spots.filter((_, index) => index % 37 === 0)) {
      const plan = judgeLoadPlan(field, [box, { ...trunk, id: 'new', xFt: spot.xFt, yFt: spot.yFt }], { member })
      const item = plan.kind === 'judged' ? plan.items[1] : expect.fail(plan.kind)
      expect(spot.utilisation).toBeCloseTo(item?.utilisation ?? 0, 10)
      expect(spot.heavyInMiddle).toBe(item?.heavyInMiddle)
    }
  })

  it('suggests free places by the bearing walls that do not overlap', () => {
    const { best, spots } = places(trunk)
    expect(best).toHaveLength(5)
    const least = Math.min(...spots.filter(spot => spot.free && !spot.heavyInMiddle).map(spot => spot.utilisation))
    expect(best[0]?.utilisation).toBe(least)
    for (const spot of best) expect(spot).toMatchObject({ free: true, heavyInMiddle: false, fromWallFt: 0 })
    best.forEach((a, i) => best.slice(i + 1).forEach(b => expect(Math.abs(a.xFt - b.xFt) >= 3 || Math.abs(a.yFt - b.yFt) >= 1.5).toBe(true)))
  })

  it('suggests the same places whether or not the thing stands somewhere already', () => {
    expect(places({ ...trunk, id: 'trunk', xFt: 6, yFt: 6 } as NewItem).best).toEqual(places(trunk).best)
  })

  it('suggests nothing that would bring a joist or the total over', () => {
    expect(places({ lengthFt: 1, widthFt: 1, weightLb: 5000 }).best).toEqual([])
    const full = { ...box, id: 'full', xFt: 0, yFt: 0, lengthFt: 14, widthFt: 12, weightLb: 20 * 14 * 12 }
    expect(places(trunk, [full])).toMatchObject({ best: [] })
    expect(places(trunk, [full]).totalRatio).toBeGreaterThan(1)
  })

  it('answers in words\' stead when the item cannot stand anywhere', () => {
    expect(whereMayItGo(field, [], { ...trunk, lengthFt: 15 })).toEqual({ kind: 'larger-than-field', spanFt: 14, fieldWidthFt: 12 })
    expect(whereMayItGo({ ...field, ratedPsf: 0 }, [], trunk)).toEqual({ kind: 'nothing-allowed' })
    expect(whereMayItGo(field, [], { ...trunk, weightLb: Number.NaN })).toMatchObject({ kind: 'refused' })
    expect(whereMayItGo(field, [{ ...box, xFt: -3 }], trunk)).toMatchObject({ kind: 'refused', problems: [{ at: { id: 'box' } }] })
  })
})

describe('distance from the wall', () => {
  const rows = (on = field): DistanceRow[] => {
    const table = distanceFromWall(on, member)
    return table.kind === 'table' ? table.rows : expect.fail(table.kind)
  }

  it('runs from the wall to mid-span by feet', () => {
    expect(rows().map(row => row.distanceFt)).toEqual([0, 1, 2, 3, 4, 5, 6, 7])
    expect(rows({ ...field, spanFt: 9 }).map(row => row.distanceFt)).toEqual([0, 1, 2, 3, 4, 4.5])
  })

  it('the weight falls with the distance; at the wall it is the bearing that counts', () => {
    const table = rows()
    expect(table[0]).toMatchObject({ limit: 'bearing' })
    // Dead load 8 psf over 16 in and half of 14 ft takes 74.7 lb of the bearing.
    expect(table[0]?.weightLb).toBeCloseTo(950 - 8 * 16 / 12 * 7, 9)
    table.slice(1).forEach((row, index) => expect(row.weightLb).toBeLessThanOrEqual((table[index]?.weightLb ?? 0) + 1e-9))
  })

  // Closed form (AWC Design Aid No. 6): PL/4 = wL²/8 gives P = wL/2, with w = 20 psf x 16 in.
  it('at mid-span half of the joist\'s rated load', () => {
    expect(rows().at(-1)).toEqual({ distanceFt: 7, weightLb: expect.closeTo(20 * 16 / 12 * 14 / 2, 9), limit: 'moment' })
  })

  it('each weight brings its joist to exactly 100 %', () => {
    for (const { distanceFt, weightLb, limit } of rows().filter(row => row.limit === 'moment')) {
      const pile = { id: 'pile', xFt: distanceFt - 5e-4, yFt: 4 * 16 / 12 - 5e-4, lengthFt: 1e-3, widthFt: 1e-3, weightLb }
      expect(loadPlan(field, [pile]).joists[4]?.momentRatio, limit).toBeCloseTo(1, 2)
    }
  })

  it('nothing where nothing is rated, and a field that cannot be is refused', () => {
    expect(distanceFromWall({ ...field, ratedPsf: 0 })).toEqual({ kind: 'nothing-allowed' })
    expect(distanceFromWall({ ...field, spanFt: -1 })).toMatchObject({ kind: 'refused' })
  })
})

describe('a person on a joist', () => {
  const person = (items: PlacedItem[]): ReturnType<typeof personOnJoist> & { kind: 'person' } => {
    const answer = personOnJoist(field, items)
    return answer.kind === 'person' ? answer : expect.fail(answer.kind)
  }

  // Closed forms (AWC Design Aid No. 6), mid-span load: PL/4 over wL²/8, PL³/48 over 5wL⁴/384.
  it('250 lb alone is worst at mid-span', () => {
    const rated = 20 * 16 / 12 * 14
    expect(person([]).personLb).toBe(250)
    expect(person([]).alone.momentRatio).toBeCloseTo(250 * 2 / rated, 10)
    expect(person([]).alone.deflectionRatio).toBeCloseTo(250 * 8 / 5 / rated, 10)
    expect(person([]).alone).toMatchObject({ atFt: 7, share: person([]).alone.momentRatio })
  })

  it('on top of what is stored, the moment is that of the worst of many places', () => {
    const loads = loadPlan(field, [box])
    const { withItems, worstJoist } = person([box])
    let worst = 0
    for (let station = 1; station < 1400; station++) {
      const walker = { id: 'person', xFt: station / 100 - 5e-5, yFt: 4 * 16 / 12 - 5e-5, lengthFt: 1e-4, widthFt: 1e-4, weightLb: 250 }
      worst = Math.max(worst, loadPlan(field, [box, walker]).joists[4]?.momentRatio ?? 0)
    }
    expect(withItems[4]?.momentRatio).toBeCloseTo(worst, 3)
    expect(worstJoist === 4 || worstJoist === 5).toBe(true)
    expect(withItems[4]?.momentRatio).toBeGreaterThan(loads.joists[4]?.momentRatio ?? 1)
  })

  it('is never asked where nothing is rated, and refuses a field that cannot be', () => {
    expect(personOnJoist({ ...field, ratedPsf: 0 }, [])).toEqual({ kind: 'nothing-allowed', personLb: 250 })
    expect(personOnJoist(field, [{ ...box, weightLb: -1 }])).toMatchObject({ kind: 'refused' })
  })
})

describe('sag over time', () => {
  const even: PlacedItem = { id: 'all', xFt: 0, yFt: 0, lengthFt: 14, widthFt: 12, weightLb: 20 * 14 * 12 }

  // Closed form 5wL⁴/384EI and NDS 2018 3.5.2.
  it.each([[false, 1.5], [true, 2]])('green or damp %s: %s times the immediate sag', (greenOrDamp, kcr) => {
    const answer = sagOverTime(field, [even], { deflectionDivisor: 240, greenOrDamp })
    const joist = answer.kind === 'sag' ? answer.joists[4] : undefined
    const immediateIn = 5 * (20 * 16 / 12 / 12) * 168 ** 4 / (384 * field.joistEiLbIn2)
    expect(joist?.immediateIn).toBeCloseTo(immediateIn, 10)
    expect(joist?.longTermIn).toBeCloseTo(kcr * immediateIn, 10)
    expect(answer).toMatchObject({ kcr, finishLimitIn: 168 / 240, visibleLimitIn: 168 / 120 })
    expect(joist?.finishRatio).toBeCloseTo(kcr * immediateIn / 0.7, 10)
    expect(joist?.visibleRatio).toBeCloseTo(kcr * immediateIn / 1.4, 10)
  })

  it('plaster is held to L/360, and wood nobody looked at is taken as damp', () => {
    expect(sagTerms({ ceilingFinish: 'plaster-on-lath', conditions: [] })).toEqual({ deflectionDivisor: 360, greenOrDamp: false })
    expect(sagTerms({ ceilingFinish: 'gypsum-half-inch', conditions: null })).toEqual({ deflectionDivisor: 240, greenOrDamp: true })
    expect(sagTerms({ ceilingFinish: 'wood-boards', conditions: ['wet'] }).greenOrDamp).toBe(true)
    expect(sagTerms({ ceilingFinish: 'wood-boards', conditions: ['notched'] }).greenOrDamp).toBe(false)
  })

  it('refuses a plan that cannot be', () => {
    expect(sagOverTime(field, [{ ...even, lengthFt: 15 }], { deflectionDivisor: 240, greenOrDamp: false })).toMatchObject({ kind: 'refused' })
  })
})

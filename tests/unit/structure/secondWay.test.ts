import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import { stationJoist, stationPlan, stationSpot } from '../../../bench/stationByStation'
import type { LoadField, PlacedItem } from '../../../shared/types/loadPlan'
import { joistLoads } from '../../../shared/utils/structure/itemShares'
import { loadPlan } from '../../../shared/utils/structure/loadPlan'
import { maxDeflection, maxMoment, maxShearLb, shearLbAt, traceSpan } from '../../../shared/utils/structure/spanTrace'
import type { BeamLoad } from '../../../shared/utils/structure/spanTrace'
import { spanSweeper, sweepLoads } from '../../../shared/utils/structure/spanSweep'
import { whereMayItGo } from '../../../shared/utils/structure/whereMayItGo'
import { grillageByElements } from './finiteElements'

/** Two ways to one answer: sums inch by inch, and beam elements. Both must agree with the exact sums within 0.5 %. */
const CLOSE = 0.005

const field: LoadField = { spanFt: 14, spacingIn: 16, joistCount: 11, ratedPsf: 20, joistEiLbIn2: 1.4e6 * 47.63, strongbacks: [] }
const member = { depthIn: 7.25, shearLb: 1200, bearingLb: 1250, deadPsf: 8 }
const widthFt = 10 * 16 / 12
const fraction = fc.double({ min: 0, max: 1, noNaN: true })
const anyItem = fc.record({ x: fraction, y: fraction, lengthFt: fc.double({ min: 1, max: 6, noNaN: true }), widthFt: fc.double({ min: 1, max: 6, noNaN: true }), weightLb: fc.double({ min: 5, max: 400, noNaN: true }) })
  .map(({ x, y, ...rest }): PlacedItem => ({ id: 'box', ...rest, xFt: x * (14 - rest.lengthFt), yFt: y * (widthFt - rest.widthFt) }))
const anyItems = fc.array(anyItem, { minLength: 1, maxLength: 8 })

const agree = (exact: number, other: number, floor: number): void => expect(Math.abs(exact - other)).toBeLessThanOrEqual(CLOSE * Math.abs(exact) + floor)

describe('sums inch by inch', () => {
  it('give the ratios of the load plan', () => {
    fc.assert(fc.property(anyItems, (items) => {
      const plain = stationPlan(field, items)
      loadPlan(field, items).joists.forEach((joist, index) => {
        agree(joist.momentRatio, plain[index]!.momentRatio, 2e-4)
        agree(joist.deflectionRatio, plain[index]!.deflectionRatio, 2e-4)
      })
    }), { numRuns: 40 })
  })

  it('give the reactions and the shear one depth from the support', () => {
    fc.assert(fc.property(anyItems, (items) => {
      const sectionFt = 7 / 12
      joistLoads(field, items).forEach((loads, joist) => {
        const trace = traceSpan(14, loads)
        const plain = stationJoist(field, items, joist, sectionFt)
        agree(Math.max(...trace.reactionsLb), plain.reactionLb, 0.2)
        agree(Math.max(Math.abs(shearLbAt(trace, sectionFt)), Math.abs(shearLbAt(trace, 14 - sectionFt))), plain.shearLb, 0.2)
      })
    }), { numRuns: 20 })
  })

  it('give the utilisation of every place on the map', () => {
    fc.assert(fc.property(anyItems, fraction, (items, pick) => {
      const trunk = { lengthFt: 3, widthFt: 2, weightLb: 90 }
      const places = whereMayItGo(field, items, trunk, { member })
      const spots = places.kind === 'places' ? places.spots : expect.fail(places.kind)
      const spot = spots[Math.min(spots.length - 1, Math.floor(pick * spots.length))]!
      agree(spot.utilisation, stationSpot(field, items, { ...trunk, id: 'new', xFt: spot.xFt, yFt: spot.yFt }, member), 5e-4)
    }), { numRuns: 30 })
  })
})

describe('the sweep behind the map', () => {
  const point = fc.record({ at: fraction, lb: fc.double({ min: 1, max: 500, noNaN: true }) }).map(({ at, lb }): BeamLoad => ({ kind: 'point', lb, atFt: 14 * at }))
  const line = fc.record({ a: fraction, b: fraction, lbPerFt: fc.double({ min: 0.5, max: 200, noNaN: true }) }).filter(({ a, b }) => Math.abs(a - b) > 1e-3)
    .map(({ a, b, lbPerFt }): BeamLoad & { kind: 'uniform' } => ({ kind: 'uniform', lbPerFt, fromFt: 14 * Math.min(a, b), toFt: 14 * Math.max(a, b) }))
  const same = (a: number, b: number): void => expect(Math.abs(a - b)).toBeLessThanOrEqual(1e-8 * Math.max(1, Math.abs(a)))

  it('is the exact sum over one more load, line or point, wherever it stands', () => {
    fc.assert(fc.property(fc.array(fc.oneof(point, line), { maxLength: 10 }), line, point, (loads, another, walker) => {
      for (const extra of [another, walker]) {
        const trace = traceSpan(14, [...loads, extra])
        const sweep = spanSweeper(14, 0.6, loads.length)
        const swept = sweep(sweepLoads(14, loads), extra.kind === 'point'
          ? { lbPerFt: 0, fromFt: extra.atFt, toFt: extra.atFt, pointLb: extra.lb }
          : { ...extra, pointLb: 0 })
        same(swept.momentLbFt, maxMoment(trace).size)
        same(swept.deflectionLbFt3, maxDeflection(trace).size)
        same(swept.reactionLb, Math.max(...trace.reactionsLb))
        same(swept.shearLb, Math.max(Math.abs(shearLbAt(trace, 0.6)), Math.abs(shearLbAt(trace, 13.4))))
        expect(swept.reactionLb).toBeGreaterThanOrEqual(maxShearLb(trace) - 1e-6)
      }
    }))
  })

  it('of nothing is nothing', () => {
    expect(spanSweeper(14, 0.6, 0)(sweepLoads(14, []), { lbPerFt: 0, fromFt: 2, toFt: 3, pointLb: 0 })).toEqual({ momentLbFt: 0, deflectionLbFt3: 0, shearLb: 0, reactionLb: 0 })
  })
})

describe('beam elements', () => {
  it('give the shared ratios of any grillage: one to three strongbacks under any items', () => {
    const ELEMENTS = 28
    const node = fc.integer({ min: 3, max: ELEMENTS - 3 }).map(at => at * 14 / ELEMENTS)
    const strongback = fc.record({ atFt: node, eiLbIn2: fc.double({ min: 5e6, max: 2e8, noNaN: true }) })
    fc.assert(fc.property(fc.uniqueArray(strongback, { minLength: 1, maxLength: 3, selector: one => one.atFt }), anyItems, (strongbacks, items) => {
      const tied: LoadField = { ...field, joistCount: 5, strongbacks }
      const here = items.map(item => ({ ...item, widthFt: Math.min(item.widthFt, 4), yFt: Math.min(item.yFt, 16 / 3 - Math.min(item.widthFt, 4)) }))
      const rated = { moment: 20 * 16 / 12 * 14 ** 2 / 8, deflection: 5 * 20 * 16 / 12 * 14 ** 4 / 384 }
      const found = grillageByElements(tied, joistLoads(tied, here), ELEMENTS)
      loadPlan(tied, here).withStrongbacks.forEach((joist, index) => {
        // A peak between two nodes is missed by less than a hundredth of the rating at this mesh.
        expect(found.maxMomentLbFt[index]! / rated.moment).toBeLessThanOrEqual(joist.momentRatio * (1 + CLOSE) + 1e-6)
        expect(found.maxMomentLbFt[index]! / rated.moment).toBeGreaterThanOrEqual(joist.momentRatio * (1 - CLOSE) - 0.01)
        agree(joist.deflectionRatio, found.maxDeflectionFt[index]! * tied.joistEiLbIn2 / 144 / rated.deflection, 1e-3)
      })
    }), { numRuns: 8 })
  })
})

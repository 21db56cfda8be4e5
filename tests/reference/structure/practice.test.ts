import { describe, expect, it } from 'vitest'
import type { LoadField } from '../../../shared/types/loadPlan'
import { joistLoads } from '../../../shared/utils/structure/itemShares'
import { strongbackForces } from '../../../shared/utils/structure/grillage'
import { loadPlan } from '../../../shared/utils/structure/loadPlan'
import { traceSpan } from '../../../shared/utils/structure/spanTrace'

// Common practice, no source.
describe('what people in this trade reckon', () => {
  const field = (spanFt: number, widthFt: number): LoadField =>
    ({ spanFt, spacingIn: 24, joistCount: widthFt / 2 + 1, ratedPsf: 20, joistEiLbIn2: 1.6e6 * 177.98, strongbacks: [] })

  it('20 ft by 20 ft at 20 psf carries 8,000 lb spread evenly; 10 ft by 10 ft at the same psf 2,000 lb', () => {
    expect(loadPlan(field(20, 20), []).ratedTotalLb).toBe(8000)
    expect(loadPlan(field(10, 10), []).ratedTotalLb).toBe(2000)
  })

  // 80 lb in the middle of 2x12 joists at 24 in, 20 ft, a 2x6 on edge across them at mid-span.
  it('with a strongback the loaded joist keeps about a quarter of 80 lb, and the joists near it take most', () => {
    const plan: LoadField = { ...field(20, 24), strongbacks: [{ atFt: 10, eiLbIn2: 1.4e6 * 20.8 }] }
    const pile = { id: 'pile', xFt: 9.99, yFt: 11.999, lengthFt: 0.02, widthFt: 0.002, weightLb: 80 }
    const traces = joistLoads(plan, [pile]).map(loads => traceSpan(20, loads))
    const kept = strongbackForces(plan, traces).map((forces, joist) =>
      (joist === 6 ? 80 : 0) + forces.reduce((sum, force) => sum + (force.kind === 'point' ? force.lb : 0), 0))
    expect(kept.reduce((sum, lb) => sum + lb, 0)).toBeCloseTo(80, 1)
    expect((kept[6] ?? 0) / 80).toBeGreaterThan(0.2)
    expect((kept[6] ?? 0) / 80).toBeLessThan(0.3)
    const [four] = [kept.slice(5, 9), kept.slice(4, 8)].map(part => part.reduce((sum, lb) => sum + lb, 0) / 80)
    expect(four).toBeGreaterThan(0.7)
  })
})

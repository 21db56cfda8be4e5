import { describe, expect, it } from 'vitest'
import type { LoadField } from '../../../shared/types/loadPlan'
import { distanceFromWall } from '../../../shared/utils/structure/distanceFromWall'
import { joistLoads } from '../../../shared/utils/structure/itemShares'
import { strongbackForces } from '../../../shared/utils/structure/grillage'
import { judgeLoadPlan } from '../../../shared/utils/structure/judgeLoadPlan'
import { loadFieldOf } from '../../../shared/utils/structure/loadField'
import { loadPlan } from '../../../shared/utils/structure/loadPlan'
import { traceSpan } from '../../../shared/utils/structure/spanTrace'
import { joistField, survey } from '../../unit/structure/surveys'

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

  // 80 lb bend a 20 ft span by 400 lb ft of the 2,000 lb ft that 20 psf over 24 in would.
  it('80 lb in the middle of one 2x12 at 24 in over 20 ft is safe on that joist alone', () => {
    const surveyed = joistField({ species: 'Spruce-pine-fir', grade: 'No.2', size: '2x12', spacingIn: 24, spanFt: 20, joistCount: 11, topEdgeBraced: true })
    const answer = loadFieldOf(survey({ joistFields: [surveyed] }), surveyed, 20)
    const { field: attic, member } = answer.kind === 'field' ? answer : expect.fail(answer.kind)
    const plan = judgeLoadPlan(attic, [{ id: 'box', xFt: 9, yFt: 9.999, lengthFt: 2, widthFt: 0.002, weightLb: 80 }], { member })
    const joists = plan.kind === 'judged' ? plan.joists : expect.fail(plan.kind)
    expect(joists[5]).toMatchObject({ state: 'within' })
    expect(joists[5]!.momentRatio).toBeCloseTo(0.19, 2)
    expect(joists[5]!.withStrongbacks.momentRatio).toBe(joists[5]!.momentRatio)
  })

  it.each([[12, '2x8'], [16, '2x10'], [20, '2x12']] as const)('a stack may be several times heavier right at the bearing wall than in the middle of %s ft (%s)', (spanFt, size) => {
    const surveyed = joistField({ size, spanFt, spacingIn: 16 })
    const answer = loadFieldOf(survey({ joistFields: [surveyed] }), surveyed, 20)
    const table = answer.kind === 'field' ? distanceFromWall(answer.field, answer.member) : expect.fail(answer.kind)
    const rows = table.kind === 'table' ? table.rows : expect.fail(table.kind)
    expect(rows[0]!.weightLb / rows.at(-1)!.weightLb).toBeGreaterThan(4)
    expect(rows[1]!.weightLb / rows.at(-1)!.weightLb).toBeGreaterThan(2)
  })
})

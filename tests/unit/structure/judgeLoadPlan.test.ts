import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import type { JudgedPlan, LoadField, PlacedItem } from '../../../shared/types/loadPlan'
import { judgeLoadPlan } from '../../../shared/utils/structure/judgeLoadPlan'
import type { JudgeOptions } from '../../../shared/utils/structure/judgeLoadPlan'
import { loadStateOf } from '../../../shared/utils/structure/loadState'
import { loadPlan } from '../../../shared/utils/structure/loadPlan'

const field: LoadField = { spanFt: 16, spacingIn: 24, joistCount: 9, ratedPsf: 20, joistEiLbIn2: 1.4e6 * 98.93, strongbacks: [] }
const member = { depthIn: 9.25, shearLb: 1200, bearingLb: 950, deadPsf: 10 }
const item = (change: Partial<PlacedItem> = {}): PlacedItem => ({ id: 'box', xFt: 7, yFt: 7, lengthFt: 2, widthFt: 2, weightLb: 60, ...change })

function judged(items: PlacedItem[], options: JudgeOptions = { member }, on = field): JudgedPlan & { kind: 'judged' } {
  const plan = judgeLoadPlan(on, items, options)
  return plan.kind === 'judged' ? plan : expect.fail(plan.kind)
}

describe('load states', () => {
  it('within below 80 %, near from 80 to 100 %, over above', () => {
    expect([0, 0.799, 0.8, 1, 1.0001].map(loadStateOf)).toEqual(['within', 'within', 'near', 'near', 'over'])
  })
})

describe('the verdict on a field', () => {
  it('gives the moments and deflections of the load plan', () => {
    const items = [item(), item({ id: 'trunk', xFt: 1, weightLb: 200 })]
    const plain = loadPlan(field, items).joists
    judged(items).joists.forEach((joist, index) => {
      expect([joist.momentRatio, joist.deflectionRatio]).toEqual([plain[index]?.momentRatio, plain[index]?.deflectionRatio])
      expect(joist.utilisation).toBe(Math.max(joist.momentRatio, joist.deflectionRatio, joist.shearRatio, joist.bearingRatio))
    })
  })

  // Worked by hand: 300 lb on the last foot of one joist. Dead load 10 psf x 2 ft = 20 lb/ft: reaction 160 lb, shear one depth in 144.6 lb.
  it('a heavy thing at the wall is judged by bearing: it bends little', () => {
    const plan = judged([item({ xFt: 15, lengthFt: 1, yFt: 7.999, widthFt: 0.002, weightLb: 300 })])
    const joist = plan.joists[4] ?? expect.fail('no joist')
    expect(joist.bearingRatio).toBeCloseTo(300 * 15.5 / 16 / (950 - 160), 3)
    expect(joist.limit).toBe('bearing')
    expect(joist.momentRatio).toBeLessThan(joist.bearingRatio)
    expect(joist.shearRatio).toBeLessThan(0.2)
    expect(joist.loadLb).toBeCloseTo(300, 0)
  })

  it('shear is looked at one joist depth from the support', () => {
    const depthFt = 9.25 / 12
    const plan = judged([item({ xFt: 0, lengthFt: 16, yFt: 0, widthFt: 16, weightLb: 20 * 256 })])
    expect(plan.joists[4]?.shearRatio).toBeCloseTo(40 * (8 - depthFt) / (1200 - 20 * (8 - depthFt)), 9)
    expect(plan.joists[4]?.bearingRatio).toBeCloseTo(320 / (950 - 160), 9)
  })

  it('a joist whose dead load uses up its strength is over whatever is stored', () => {
    const plan = judged([], { member: { ...member, bearingLb: 150 } })
    expect(plan.joists[4]?.bearingRatio).toBeCloseTo(160 / 150, 9)
    expect(plan.state).toBe('over')
  })

  it('without a joist the weakest is taken, and the answer says so', () => {
    const items = [item({ xFt: 15, lengthFt: 1, weightLb: 150 })]
    const [known, assumed] = [judged(items), judged(items, {})]
    expect([known.memberAssumed, assumed.memberAssumed]).toEqual([false, true])
    expect(assumed.joists[4]?.shearRatio).toBeGreaterThan(known.joists[4]?.shearRatio ?? 1)
  })

  it('names the worst joist, and the attic is as bad as it', () => {
    const plan = judged([item({ id: 'pile', yFt: 3, weightLb: 500 })])
    expect(plan.worstJoist).toBe(2)
    expect(plan.utilisation).toBe(plan.joists[2]?.utilisation)
    expect(plan.state).toBe('over')
    expect(plan.items[0]).toMatchObject({ id: 'pile', worstJoist: 2, state: 'over', utilisation: plan.utilisation })
  })

  it('a total above the rated total is over even with everything at the walls', () => {
    const rows = Array.from({ length: 2 }, (_, i) => item({ id: String(i), xFt: i * 14, yFt: 0, widthFt: 16, weightLb: 2700 }))
    const plan = judged(rows, { member: { ...member, bearingLb: 5000, shearLb: 5000 } })
    expect(plan.totalRatio).toBeCloseTo(5400 / 5120, 12)
    expect(plan.joists.every(joist => joist.utilisation < 1)).toBe(true)
    expect(plan.state).toBe('over')
  })

  it('sharing counts only when it is said to, and never in shear and bearing', () => {
    const tied = { ...field, strongbacks: [{ atFt: 8, eiLbIn2: 2.9e7 }] }
    const items = [item({ yFt: 7.5, widthFt: 1, weightLb: 120 })]
    const [shown, counted] = [judged(items, { member }, tied), judged(items, { member, strongbacksCount: true }, tied)]
    expect([shown.strongbacksCount, counted.strongbacksCount]).toEqual([false, true])
    expect(shown.joists[4]?.withStrongbacks.momentRatio).toBeLessThan(shown.joists[4]?.momentRatio ?? 0)
    expect(counted.joists[4]?.momentRatio).toBe(shown.joists[4]?.withStrongbacks.momentRatio)
    expect(counted.joists[4]?.bearingRatio).toBe(shown.joists[4]?.bearingRatio)
    expect(judged(items, { member, strongbacksCount: true }).strongbacksCount).toBe(false)
  })

  it('more weight never lowers a utilisation', () => {
    const weight = fc.double({ min: 0, max: 500, noNaN: true })
    fc.assert(fc.property(weight, weight, fc.double({ min: 0, max: 14, noNaN: true }), fc.double({ min: 0, max: 14, noNaN: true }), (light, more, xFt, yFt) => {
      const [before, after] = [light, light + more].map(weightLb => judged([item({ xFt, yFt, weightLb })]))
      after?.joists.forEach((joist, index) => expect(joist.utilisation).toBeGreaterThanOrEqual((before?.joists[index]?.utilisation ?? 0) - 1e-9))
    }))
  })
})

describe('heavy in the middle', () => {
  const flag = (change: Partial<PlacedItem>): boolean | undefined => judged([item(change)]).items[0]?.heavyInMiddle

  it('an item denser than the rating is flagged in the middle half, even where the joists pass', () => {
    const plan = judged([item({ lengthFt: 1, widthFt: 1, weightLb: 25 })])
    expect(plan.items[0]).toMatchObject({ heavyInMiddle: true, pressurePsf: 25, state: 'within' })
    expect(flag({ lengthFt: 1, widthFt: 1, weightLb: 20 })).toBe(false)
  })

  it('not in the outer quarters, and the edge of the middle half counts as outside', () => {
    expect(flag({ xFt: 2, weightLb: 100 })).toBe(false)
    expect(flag({ xFt: 12, weightLb: 100 })).toBe(false)
    expect(flag({ xFt: 2.1, weightLb: 100 })).toBe(true)
    expect(flag({ xFt: 11.9, weightLb: 100 })).toBe(true)
  })
})

describe('no verdict', () => {
  it('rated at nothing: what is stored is over, an empty field is within', () => {
    expect(judgeLoadPlan({ ...field, ratedPsf: 0 }, [item()])).toEqual({ kind: 'nothing-allowed', totalLb: 60, itemIds: ['box'], state: 'over' })
    expect(judgeLoadPlan({ ...field, ratedPsf: 0 }, [])).toMatchObject({ state: 'within' })
  })

  it('an item outside the field is refused by value', () => {
    expect(judgeLoadPlan(field, [item({ xFt: 40 })])).toMatchObject({ kind: 'refused', problems: [{ code: 'outside-field', at: { part: 'item', id: 'box' } }] })
  })
})

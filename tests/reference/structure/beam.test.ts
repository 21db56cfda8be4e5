import { describe, expect, it } from 'vitest'
import { simpleSpan } from '../../../shared/utils/structure/beam'
import type { BeamLoad, SimpleSpanEffects } from '../../../shared/utils/structure/beam'

// Published: American Wood Council, Design Aid No. 6, Beam Formulas with Shear and Moment Diagrams (simple span cases).
// w lb/ft, P lb, l ft; EI in lb in2, so deflections take the factor 1728.
const [w, P, l, ei] = [37, 240, 14, 7.6e7]

function expectEffects(loads: BeamLoad[], expected: Partial<Record<'r1' | 'r2' | 'shear' | 'moment' | 'deflection', number>>): SimpleSpanEffects {
  const effects = simpleSpan({ spanFt: l, eiLbIn2: ei }, loads)
  const found = { r1: effects.reactionsLb[0], r2: effects.reactionsLb[1], shear: effects.maxShearLb, moment: effects.maxMomentLbFt, deflection: effects.maxDeflectionIn }
  for (const name of ['r1', 'r2', 'shear', 'moment', 'deflection'] as const) {
    const value = expected[name]
    if (value !== undefined) expect(found[name] / value, name).toBeCloseTo(1, 10)
  }
  return effects
}

const uniform = (fromFt: number, toFt: number, lbPerFt = w): BeamLoad => ({ kind: 'uniform', lbPerFt, fromFt, toFt })
const point = (atFt: number, lb = P): BeamLoad => ({ kind: 'point', lb, atFt })

describe('simple spans against Design Aid No. 6', () => {
  it('uniformly distributed load', () => {
    expectEffects([uniform(0, l)], { r1: w * l / 2, r2: w * l / 2, shear: w * l / 2, moment: w * l ** 2 / 8, deflection: 5 * w * l ** 4 * 1728 / (384 * ei) })
  })

  it('uniform load partially distributed', () => {
    const [a, b, c] = [3, 5, 6]
    const r1 = w * b * (2 * c + b) / (2 * l)
    const r2 = w * b * (2 * a + b) / (2 * l)
    expectEffects([uniform(a, a + b)], { r1, r2, shear: Math.max(r1, r2), moment: r1 * (a + r1 / (2 * w)) })
  })

  it('uniform load partially distributed at one end', () => {
    const a = 4.5
    const r1 = w * a * (2 * l - a) / (2 * l)
    const effects = expectEffects([uniform(0, a)], { r1, r2: w * a ** 2 / (2 * l), shear: r1, moment: r1 ** 2 / (2 * w) })
    // Beyond the load: w a² (l − x)(4xl − 2x² − a²) / 24 EI l, at its peak.
    const deflection = Math.max(...Array.from({ length: 20_001 }, (_, i) => a + (l - a) * i / 20_000)
      .map(x => w * a ** 2 * (l - x) * (4 * x * l - 2 * x ** 2 - a ** 2) * 1728 / (24 * ei * l)))
    expect(effects.maxDeflectionIn / deflection).toBeCloseTo(1, 7)
  })

  it('uniform load partially distributed at each end', () => {
    const [a, c, w2] = [4, 3, 55]
    const r1 = (w * a * (2 * l - a) + w2 * c ** 2) / (2 * l)
    const r2 = (w2 * c * (2 * l - c) + w * a ** 2) / (2 * l)
    expectEffects([uniform(0, a), uniform(l - c, l, w2)], { r1, r2, moment: Math.max(r1 < w * a ? r1 ** 2 / (2 * w) : 0, r2 < w2 * c ? r2 ** 2 / (2 * w2) : 0) })
  })

  it('concentrated load at centre', () => {
    expectEffects([point(l / 2)], { r1: P / 2, r2: P / 2, shear: P / 2, moment: P * l / 4, deflection: P * l ** 3 * 1728 / (48 * ei) })
  })

  it.each([2, 5, 9, 13])('concentrated load at %s ft', (near) => {
    // The published deflection holds for a > b: a is the longer part.
    const [a, b] = near > l / 2 ? [near, l - near] : [l - near, near]
    expectEffects([point(near)], {
      r1: P * (l - near) / l, r2: P * near / l, moment: P * a * b / l,
      deflection: P * a * b * (a + 2 * b) * Math.sqrt(3 * a * (a + 2 * b)) * 1728 / (27 * ei * l),
    })
  })

  it('two equal concentrated loads symmetrically placed', () => {
    const a = 4
    expectEffects([point(a), point(l - a)], { r1: P, r2: P, shear: P, moment: P * a, deflection: P * a * (3 * l ** 2 - 4 * a ** 2) * 1728 / (24 * ei) })
  })

  it('two unequal concentrated loads unsymmetrically placed', () => {
    const [a, b, P2] = [3, 5, 410]
    const r1 = (P * (l - a) + P2 * b) / l
    const r2 = (P * a + P2 * (l - b)) / l
    expectEffects([point(a), point(l - b, P2)], { r1, r2, moment: Math.max(r1 * a, r2 * b), shear: Math.max(r1, r2) })
  })
})

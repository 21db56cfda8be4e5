import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import { SIZES, SPECIES } from '../../../shared/types/attic'
import type { AtticSurvey, JoistField } from '../../../shared/types/attic'
import type { JoistCapacity } from '../../../shared/types/atticRating'
import { joistCapacity } from '../../../shared/utils/structure/joistCapacity'
import { maxJoistSpanIn } from '../../../shared/utils/structure/joistSpan'
import { joistField, survey } from './surveys'

function capacity(field: Partial<JoistField> = {}, attic: Partial<AtticSurvey> = {}, overTenYears = false): JoistCapacity {
  const answer = joistCapacity(joistField(field), survey(attic), { withStorage: true, overTenYears })
  if (answer.kind !== 'capacity') return expect.fail(answer.kind)
  return answer
}

const codes = (answer: JoistCapacity): string[] => answer.assumptions.map(assumption => assumption.code)

describe('what joists can take', () => {
  it('at the span of the code table the joists take the live load of the table', () => {
    for (const size of SIZES) {
      for (const species of SPECIES) {
        const spanIn = maxJoistSpanIn({ species, grade: 'No.2', size, spacingIn: 16, livePsf: 20, deadPsf: 10, deflectionDivisor: 240 })
        // An unnamed ceiling weight brings the allowance of 10 psf into the build-up; fiberglass of unknown depth does so.
        const answer = capacity({ species, size, spanFt: spanIn / 12 }, { deck: 'full', insulation: { material: 'fiberglass', depthIn: null } })
        expect(answer.inputs.deadPsf).toBe(10)
        expect(Math.min(answer.bendingPsf, answer.deflectionPsf)).toBeCloseTo(20, 9)
      }
    }
  })

  // Worked by hand: Fb' = 925 x 1.15 = 1,063.75 psi, S = 13.141 in3, M = 13,979 lb in; 8 M / (144 in)2 x 144 / 16 in = 48.53 psf.
  it('southern pine No. 2 2x8, 12 ft at 16 in: bending 48.5 psf less the built-up dead load', () => {
    const answer = capacity()
    expect(answer.inputs.deadPsf).toBeCloseTo(2.2 + 6 * 0.083 + 2.4 + 1.869, 2)
    expect(answer.bendingPsf + answer.inputs.deadPsf).toBeCloseTo(48.53, 1)
  })

  it('the least of the four limits governs and is named', () => {
    const limits = (answer: JoistCapacity): number[] => [answer.bendingPsf, answer.deflectionPsf, answer.shearPsf, answer.bearingPsf]
    for (const [field, governed] of [[{ grade: 'SS', spanFt: 20 }, 'deflection'], [{ grade: 'No.3', spanFt: 14 }, 'bending'], [{ species: 'Douglas fir-larch', grade: 'SS', size: '2x12', spanFt: 4, bearingLengthIn: 6 }, 'shear'], [{ bearingLengthIn: 0.2 }, 'bearing']] as const) {
      const answer = capacity(field)
      expect(answer.allowedPsf).toBe(Math.min(...limits(answer)))
      expect(answer.governedBy).toBe(governed)
    }
  })

  it('without a stamp the joists are taken as spruce-pine-fir No. 3, and the answer says so', () => {
    for (const field of [{ grade: 'no stamp' }, { grade: 'unknown' }, { species: 'unknown' }] as const) {
      const answer = capacity(field)
      expect(answer.inputs).toMatchObject({ species: 'Spruce-pine-fir', grade: 'No.3' })
      expect(codes(answer)).toContain('no-stamp-weakest-grade')
    }
    expect(capacity({ grade: 'no stamp' }).allowedPsf).toBe(capacity({ species: 'Spruce-pine-fir', grade: 'No.3' }).allowedPsf)
  })

  it('southern pine keeps the lower values unless stamp and date prove it older than June 2013', () => {
    const lower = capacity({ installedBeforeJune2013: false })
    expect(capacity({ installedBeforeJune2013: true }).allowedPsf).toBe(lower.allowedPsf)
    expect(codes(capacity({ installedBeforeJune2013: true }))).toContain('southern-pine-lower-values')
    expect(capacity({ installedBeforeJune2013: false, preJune2013StampProven: true }).allowedPsf).toBe(lower.allowedPsf)
    expect(capacity({ installedBeforeJune2013: true, preJune2013StampProven: true }).bendingPsf).toBeGreaterThan(lower.bendingPsf)
  })

  it('a measured size goes before the nominal one', () => {
    expect(capacity({ breadthIn: 1.75, depthIn: 7.5 }).inputs).toMatchObject({ breadthIn: 1.75, depthIn: 7.5 })
    const rough = capacity({ species: 'Douglas fir-larch', breadthIn: 2, depthIn: 8 })
    expect(rough.factors.cf).toBe(1.2)
    expect(rough.assumptions).toContainEqual({ code: 'size-between-table-sizes', depthIn: 8, takenAs: '2x8', fieldName: 'north' })
    expect(capacity({ species: 'Douglas fir-larch', breadthIn: 2, depthIn: 14 }).factors.cf).toBe(0.9)
  })

  it('neighbours help only where three joists at 24 in or less share a fastened ceiling or deck', () => {
    expect(capacity().factors.cr).toBe(1.15)
    expect(capacity({ spacingIn: 24 }).factors.cr).toBe(1.15)
    expect(capacity({ spacingIn: 24.1 }).factors.cr).toBe(1)
    expect(capacity({ joistCount: 2 }).factors.cr).toBe(1)
    expect(capacity({ joistCount: null }).factors.cr).toBe(1)
    expect(capacity({}, { ceilingFinish: 'unknown', deck: 'none' }).factors.cr).toBe(1)
  })

  it('a deep joist with its top edge free is held back by NDS 3.3.3; 2x8 and smaller are not', () => {
    const free = { topEdgeBraced: false }
    expect(capacity({ ...free, size: '2x8' }).factors.cl).toBe(1)
    const deep = capacity({ ...free, size: '2x12', spanFt: 16 })
    expect(deep.factors.cl).toBeLessThan(0.8)
    expect(codes(deep)).toContain('top-edge-unbraced')
    expect(capacity({ topEdgeBraced: null, size: '2x12' }, { deck: 'full' }).factors.cl).toBe(1)
    expect(capacity({ topEdgeBraced: null, size: '2x12' }, { deck: 'partial' }).factors.cl).toBeLessThan(1)
  })

  it('goods that stand more than ten years lower bending to 0.9', () => {
    const [ten, longer] = [capacity(), capacity({}, {}, true)]
    expect(longer.bendingPsf + longer.inputs.deadPsf).toBeCloseTo(0.9 * (ten.bendingPsf + ten.inputs.deadPsf), 9)
    expect(longer.deflectionPsf).toBe(ten.deflectionPsf)
  })

  it('a heavier ceiling or a wider spacing never raises the answer, and it is never below zero', () => {
    fc.assert(fc.property(
      fc.constantFrom(...SIZES), fc.constantFrom(...SPECIES), fc.double({ min: 3, max: 30, noNaN: true }), fc.double({ min: 8, max: 48, noNaN: true }),
      (size, species, spanFt, spacingIn) => {
        const light = capacity({ size, species, spanFt, spacingIn })
        expect(light.allowedPsf).toBeGreaterThanOrEqual(0)
        expect(capacity({ size, species, spanFt, spacingIn }, { ceilingFinish: 'plaster-on-lath' }).allowedPsf).toBeLessThanOrEqual(light.allowedPsf)
        expect(capacity({ size, species, spanFt, spacingIn: spacingIn * 1.5 }).allowedPsf).toBeLessThanOrEqual(light.allowedPsf)
        expect(capacity({ size, species, spanFt: spanFt * 1.1, spacingIn }).allowedPsf).toBeLessThanOrEqual(light.allowedPsf)
      },
    ))
  })
})

describe('no answer', () => {
  const answer = (field: Partial<JoistField>, attic: Partial<AtticSurvey> = {}): unknown => joistCapacity(joistField(field), survey(attic), { withStorage: true })

  it('when measures are missing, they are listed', () => {
    expect(answer({ size: null, spanFt: null })).toEqual({ kind: 'measures-missing', fieldName: 'north', missing: ['size', 'spanFt'] })
    expect(answer({ size: '2x8', breadthIn: 1.5 })).toMatchObject({ kind: 'measures-missing', missing: ['size'] })
    expect(answer({ spacingIn: 0 })).toMatchObject({ kind: 'measures-missing', missing: ['spacingIn'] })
    expect(answer({ spanFt: Number.NaN })).toMatchObject({ kind: 'measures-missing', missing: ['spanFt'] })
  })

  it('when the member is a timber, a thin board or too slender', () => {
    expect(answer({ breadthIn: 6, depthIn: 8 })).toMatchObject({ kind: 'not-covered', measure: 'breadthIn', limit: 4.5 })
    expect(answer({ breadthIn: 0.5, depthIn: 8 })).toMatchObject({ kind: 'not-covered', measure: 'breadthIn', limit: 0.75 })
    expect(answer({ breadthIn: 2, depthIn: 18 })).toMatchObject({ kind: 'not-covered', measure: 'depthIn', limit: 16 })
    expect(answer({ size: '2x12', spanFt: 28, topEdgeBraced: false })).toMatchObject({ kind: 'not-covered', measure: 'slenderness', limit: 50 })
  })

  it('for trusses and unknown framing, whatever is known of the members', () => {
    expect(answer({}, { framing: 'trusses' })).toEqual({ kind: 'not-joists', fieldName: 'north', framing: 'trusses' })
    expect(answer({}, { framing: 'unknown' })).toEqual({ kind: 'not-joists', fieldName: 'north', framing: 'unknown' })
  })
})

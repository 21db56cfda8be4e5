import { describe, expect, it } from 'vitest'
import { IRC_R301_5, codeClass } from '../../../shared/utils/structure/codeClass'
import { deflectionDivisor } from '../../../shared/utils/structure/joistCapacity'
import { KCR_DRY, KCR_GREEN_OR_DAMP, REPETITIVE } from '../../../shared/utils/structure/ndsFactors'
import { holeLimits, notchLimits } from '../../../shared/utils/structure/notchesAndHoles'
import { survey } from '../../unit/structure/surveys'

// Published: IRC 2018 R502.8.1 and R802.7.1.1: notch d/6 deep and d/3 long, d/4 deep at the ends, hole d/3, 2 in from edges and holes.
describe('notch and hole limits of IRC R502.8 and R802.7', () => {
  it.each([
    { size: '2x6', depthIn: 5.5, notch: 0.9167, end: 1.375, length: 1.8333, hole: 1.8333 },
    { size: '2x8', depthIn: 7.25, notch: 1.2083, end: 1.8125, length: 2.4167, hole: 2.4167 },
    { size: '2x10', depthIn: 9.25, notch: 1.5417, end: 2.3125, length: 3.0833, hole: 3.0833 },
    { size: '2x12', depthIn: 11.25, notch: 1.875, end: 2.8125, length: 3.75, hole: 3.75 },
  ])('$size: notch $notch in deep, $end in at the ends, hole $hole in', ({ depthIn, notch, end, length, hole }) => {
    expect(notchLimits(depthIn).depthIn).toBeCloseTo(notch, 4)
    expect(notchLimits(depthIn).endDepthIn).toBeCloseTo(end, 4)
    expect(notchLimits(depthIn).lengthIn).toBeCloseTo(length, 4)
    expect(holeLimits(depthIn)).toEqual({ diameterIn: expect.closeTo(hole, 4), edgeDistanceIn: 2, betweenHolesIn: 2 })
  })
})

// Published: IRC 2018/2021 Table R301.5.
describe('attic classes of IRC Table R301.5', () => {
  it('carry 30, 20 and 10 psf', () => {
    expect(IRC_R301_5.psf).toEqual({ 'habitable-or-fixed-stairs': 30, 'limited-storage': 20, 'no-storage': 10 })
  })

  it.each([
    ['habitable', { habitable: true }, 30],
    ['fixed stairs, however low', { access: 'fixed-stairs', clearHeightIn: 36 }, 30],
    ['clear height of exactly 42 in and an opening of exactly 20 by 30 in', { clearHeightIn: 42, openingWidthIn: 20, openingLengthIn: 30 }, 20],
    ['the same opening measured the other way', { openingWidthIn: 30, openingLengthIn: 20 }, 20],
    ['clear height below 42 in', { clearHeightIn: 41.9 }, 10],
    ['opening below 20 in', { openingWidthIn: 19.9 }, 10],
    ['opening below 30 in', { openingLengthIn: 29.9 }, 10],
    ['no opening', { access: 'none' }, 10],
  ] as const)('%s', (_name, change, psf) => {
    expect(codeClass(survey(change)).classPsf).toBe(psf)
  })
})

describe('limits for deflection, creep and repetition', () => {
  // Published: IRC 2018 Table R301.7, ceilings with flexible finishes L/240, with plaster L/360.
  it('gypsum L/240, plaster L/360, and a finish nobody named as plaster', () => {
    expect(deflectionDivisor('gypsum-half-inch')).toEqual({ divisor: 240, assumed: false })
    expect(deflectionDivisor('plaster-on-lath')).toEqual({ divisor: 360, assumed: false })
    expect(deflectionDivisor('unknown')).toEqual({ divisor: 360, assumed: true })
  })

  // Published: NDS 2018 3.5.2 and 4.3.9.
  it('creep 1.5 dry and 2.0 green or damp; 1.15 for three members at 24 in', () => {
    expect([KCR_DRY, KCR_GREEN_OR_DAMP]).toEqual([1.5, 2])
    expect(REPETITIVE).toEqual({ cr: 1.15, leastMembers: 3, greatestSpacingIn: 24 })
  })
})

import { describe, expect, it } from 'vitest'
import type { AtticSurvey, JoistField, Strongback } from '../../../shared/types/attic'
import type { LoadFieldAnswer } from '../../../shared/types/loadPlan'
import { joistCapacity } from '../../../shared/utils/structure/joistCapacity'
import { loadFieldOf, weakestMember } from '../../../shared/utils/structure/loadField'
import { joistField, survey } from './surveys'

function ready(field: Partial<JoistField> = {}, attic: Partial<AtticSurvey> = {}): LoadFieldAnswer & { kind: 'field' } {
  const answer = loadFieldOf(survey(attic), joistField(field), 20)
  return answer.kind === 'field' ? answer : expect.fail(answer.kind)
}

const strongback = (change: Partial<Strongback> = {}): Strongback =>
  ({ atFt: 6, size: '2x6', breadthIn: null, depthIn: null, sound: true, engineerAccepts: false, ...change })

describe('a surveyed field made ready for a load plan', () => {
  it('takes over span, spacing, count and rating, and the joists\' own stiffness', () => {
    const { field } = ready()
    const capacity = joistCapacity(joistField(), survey(), { withStorage: true })
    expect(field).toMatchObject({ spanFt: 12, spacingIn: 16, joistCount: 16, ratedPsf: 20, strongbacks: [] })
    expect(capacity.kind === 'capacity' && capacity.eiLbIn2).toBe(field.joistEiLbIn2)
  })

  // Worked by hand: southern pine Fv 175 and Fc-perp 565 psi, 2x8: 2/3 x 175 x 10.875 = 1,269 lb; 565 x 1.5 x 1.5 = 1,271 lb.
  it('gives the joist\'s shear and bearing strength', () => {
    const { member, memberAssumed } = ready()
    expect(member.shearLb).toBeCloseTo(1268.75, 2)
    expect(member.bearingLb).toBeCloseTo(1271.25, 2)
    expect(memberAssumed).toBe(false)
    expect(ready({ bearingLengthIn: 3.5 }).member.bearingLb).toBeCloseTo(565 * 1.5 * 3.5, 6)
    expect(ready({ bearingLengthIn: null }).member.bearingLb).toBeCloseTo(1271.25, 2)
  })

  it('a joist nobody measured, or without a stamp, is taken as the weakest', () => {
    const unmeasured = ready({ size: null })
    expect(unmeasured.memberAssumed).toBe(true)
    expect(unmeasured.member).toMatchObject({ depthIn: 3.5, shearLb: weakestMember().shearLb, bearingLb: weakestMember().bearingLb })
    expect(ready({ grade: 'no stamp' }).member.shearLb).toBeCloseTo(2 / 3 * 135 * 10.875, 9)
    expect(weakestMember().shearLb).toBeCloseTo(2 / 3 * 135 * 5.25, 9)
  })

  it('only a sound strongback that an engineer accepts counts', () => {
    expect(ready({ strongbacks: [strongback()] })).toMatchObject({ strongbacksCount: false, field: { strongbacks: [{ atFt: 6 }] } })
    expect(ready({ strongbacks: [strongback({ engineerAccepts: true })] }).strongbacksCount).toBe(true)
    expect(ready({ strongbacks: [strongback({ engineerAccepts: true, sound: null })] }).strongbacksCount).toBe(false)
    expect(ready({ strongbacks: [strongback({ engineerAccepts: true, sound: false })] }).field.strongbacks).toEqual([])
    const mixed = ready({ strongbacks: [strongback(), strongback({ atFt: 4, engineerAccepts: true })] })
    expect(mixed.field.strongbacks.map(({ atFt }) => atFt)).toEqual([4])
  })

  it('a strongback of unknown size, or beyond the span, is left out', () => {
    expect(ready({ strongbacks: [strongback({ size: null }), strongback({ atFt: 12 }), strongback({ atFt: 0 })] }).field.strongbacks).toEqual([])
  })

  it('says which measures are missing', () => {
    expect(loadFieldOf(survey(), joistField({ spanFt: null, joistCount: 1 }), 20)).toEqual({ kind: 'measures-missing', fieldName: 'north', missing: ['spanFt', 'joistCount'] })
  })

  it.each(['trusses', 'unknown'] as const)('%s: no field, whatever was measured', (framing) => {
    expect(loadFieldOf(survey({ framing }), joistField(), 20)).toEqual({ kind: 'not-joists', fieldName: 'north', framing })
  })
})

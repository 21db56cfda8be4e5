import { describe, expect, it } from 'vitest'
import { DANGER_SIGNS, MARK_KINDS, NOTHING_ASKED, type ObservationAnswers } from '../../../shared/types/mark'
import { dangerSignsIn } from '../../../shared/utils/movement/impliedDanger'
import { reportClass } from '../../../shared/utils/movement/reportClass'

const answers = (more: Partial<ObservationAnswers> = {}): ObservationAnswers => ({ ...NOTHING_ASKED, kind: 'crack', roomId: 'room', ...more })

describe('dangerSignsIn', () => {
  it('finds nothing in a report that says nothing', () => {
    for (const kind of MARK_KINDS) expect(dangerSignsIn(answers({ kind }))).toEqual([])
  })

  it('never drops a sign that was ticked, whatever else is answered', () => {
    for (const sign of DANGER_SIGNS) {
      for (const kind of MARK_KINDS) expect(dangerSignsIn(answers({ kind, dangerSigns: [sign], doors: 'no-change', sounds: 'none', stain: 'dry' }))).toContain(sign)
    }
  })

  it.each<[string, Partial<ObservationAnswers>, string]>([
    ['dripping water', { kind: 'stain', stain: 'dripping' }, 'water-dripping'],
    ['a hanging ceiling that is damp', { kind: 'sag', stain: 'damp' }, 'wet-and-bulging'],
    ['a round bulge', { kind: 'sag', shape: 'round-bulge' }, 'bulge-or-growing-sag'],
    ['sounds again and again', { sounds: 'repeated' }, 'sounds-with-change'],
    ['a crack and a door that will not close', { doors: 'will-not-close' }, 'opening-while-doors-bind'],
    ['three bumps in a row with a sound', { kind: 'nail-pops', shape: 'bumps-in-a-row', popCount: 3, sounds: 'once' }, 'pops-in-a-line-together'],
    ['an earthquake', { recentEvents: ['earthquake'] }, 'after-an-impact'],
    ['a blow', { recentEvents: ['impact'] }, 'after-an-impact'],
  ])('reads %s as danger without its box ticked', (_what, more, sign) => {
    expect(dangerSignsIn(answers(more))).toEqual([sign])
  })
})

describe('reportClass', () => {
  it('is danger with any sign, urgent for what hangs, is damp, jams or sounded, routine otherwise', () => {
    expect(reportClass(answers({ dangerSigns: ['fast-widening'] }))).toBe('danger')
    for (const more of [{ kind: 'sag' }, { stain: 'damp' }, { kind: 'stain', doors: 'will-not-close' }, { sounds: 'once' }] as const) expect(reportClass(answers(more))).toBe('urgent')
    expect(reportClass(answers({ doors: 'stick-a-bit', stain: 'dry' }))).toBe('routine')
  })
})

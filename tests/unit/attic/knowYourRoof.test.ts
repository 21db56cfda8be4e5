// @vitest-environment happy-dom
import { describe, expect, it } from 'vitest'
import { reactive } from 'vue'
import RoofDrawing from '../../../components/attic/RoofDrawing.vue'
import { ROOF_DRAWINGS } from '../../../components/attic/roofDrawings'
import SurveySoFar from '../../../components/attic/SurveySoFar.vue'
import { ROOF_TOPICS, ROOF_WORDS } from '../../../shared/utils/messages/roofWords'
import { ESTIMATE_CAVEAT } from '../../../shared/utils/messages/safety'
import { DRESSED_SIZES } from '../../../shared/utils/structure/lumberValues'
import { CUT_LIMITS } from '../../../shared/utils/structure/notchesAndHoles'
import { field, survey } from './attics'
import { mountAttic, textOf } from './mountAttic'

describe('the words of a roof', () => {
  it.each(ROOF_TOPICS)('%s is drawn, told without the drawing, and says what not knowing does and where it comes from', (topic) => {
    const words = ROOF_WORDS[topic]
    expect(words.notSure).toMatch(/^(Not|No stamp|It is)/)
    expect(words.source).toMatch(/IRC|NDS|Common practice|ours/)
    const drawing = mountAttic(RoofDrawing, { topic })
    expect(drawing.attributes('aria-label')).toBe(words.drawing)
    expect(drawing.findAll('path')).toHaveLength(ROOF_DRAWINGS[topic].drawn.length)
    expect(mountAttic(RoofDrawing, { topic, beside: true }).attributes('aria-hidden')).toBe('true')
  })

  it('keep every line on the sheet', () => {
    for (const topic of ROOF_TOPICS) {
      for (const { d } of ROOF_DRAWINGS[topic].drawn) {
        for (const [, x, y] of d.matchAll(/[ML](\d+(?:\.\d+)?) (\d+(?:\.\d+)?)/g)) {
          expect(Number(x), `${topic}: ${d}`).toBeLessThanOrEqual(160)
          expect(Number(y), `${topic}: ${d}`).toBeLessThanOrEqual(104)
        }
      }
    }
  })

  it('give the figures the calculation uses', () => {
    const sizes = ROOF_WORDS.depth.paragraphs[0]!
    for (const [glyph, inches] of [['3½', 3.5], ['5½', 5.5], ['7¼', 7.25], ['9¼', 9.25], ['11¼', 11.25]] as const) {
      expect(sizes).toContain(glyph)
      expect(Object.values(DRESSED_SIZES).map(size => size.depthIn)).toContain(inches)
    }
    expect(CUT_LIMITS).toMatchObject({ notchDepthShare: 1 / 6, notchLengthShare: 1 / 3, endNotchDepthShare: 1 / 4, holeShare: 1 / 3, holeClearIn: 2 })
    expect(ROOF_WORDS.notch.paragraphs[0]).toMatch(/a sixth of the depth.*a third of the depth long.*a quarter/)
  })
})

describe('what the answers give so far', () => {
  const shown = (answers = survey(), onRecord: { foundOn: string } | null = null) => textOf(mountAttic(SurveySoFar, { survey: reactive(answers), documents: [], onRecord })).replaceAll('\u00A0', ' ')

  it('follows the answers, with its reasons and the whole caution', () => {
    expect(shown()).toContain('20 psf, from the class of attic in the code')
    expect(shown(survey({ conditions: ['wet'] }))).toContain('On hold')
    expect(shown()).toContain(ESTIMATE_CAVEAT)
  })

  it('takes what is no number yet as not answered, never as a number', () => {
    const text = shown(survey({ clearHeightIn: Number.NaN, joistFields: [{ ...field, spanFt: Number.NaN }] }))
    expect(text).toContain('The clear height is not known')
    expect(text).not.toContain('NaN')
  })

  it('stays on hold where an earlier survey found damage', () => {
    expect(shown(survey(), { foundOn: '2026-03-14' })).toContain('Damage was seen on 14 Mar 2026')
  })
})

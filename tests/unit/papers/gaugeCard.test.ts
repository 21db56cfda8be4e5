import { describe, expect, it } from 'vitest'
import { gaugeCheckSentence } from '../../../shared/utils/messages/gaugeCardMessages'
import { COARSE_LINES_MM, FINE_LINES_MM, gaugeCheck, placeLines } from '../../../shared/utils/papers/gaugeCard'

describe('the check line of a gauge card', () => {
  it.each([[100, 'mm'], [99, 'mm'], [101, 'mm'], [4, 'in'], [4.03, 'in'], [3.97, 'in']] as const)('%s %s is true', (measured, unit) => {
    expect(gaugeCheck(measured, unit)).toEqual({ kind: 'true' })
  })

  // "Fit to page" shrinks A4 on Letter to about 94 %, and a browser's default to 93–97 % (common practice, no source).
  it.each([
    [94, 'mm', 'too-small', 0.94], [97, 'mm', 'too-small', 0.97], [98.9, 'mm', 'too-small', 0.989], [103, 'mm', 'too-large', 1.03], [3.76, 'in', 'too-small', 0.94], [4.25, 'in', 'too-large', 1.0625],
  ] as const)('%s %s is refused as %s', (measured, unit, kind, scale) => {
    const check = gaugeCheck(measured, unit)
    expect(check.kind).toBe(kind)
    expect('scale' in check && check.scale).toBeCloseTo(scale)
    expect(gaugeCheckSentence(check, unit)).toMatch(/Do not use it\. Print again at 100 %/)
  })

  it.each([[4, 'mm'], [10, 'mm'], [100, 'in'], [0, 'mm'], [-3, 'in'], [Number.NaN, 'mm'], [Number.POSITIVE_INFINITY, 'in'], [254, 'mm']] as const)('%s %s cannot be that line', (measured, unit) => {
    expect(gaugeCheck(measured, unit)).toEqual({ kind: 'not-that-line' })
  })

  it('one part in a hundred leaves every line truer than the card can be read (σ 0.2 mm)', () => {
    expect(Math.max(...COARSE_LINES_MM) * 0.01).toBeLessThan(0.2)
  })
})

describe('the lines of a gauge card', () => {
  it('rise steadily from fine to coarse, each once, and lie apart on the card', () => {
    const all = [...FINE_LINES_MM, ...COARSE_LINES_MM]
    expect([...all].sort((a, b) => a - b)).toEqual(all)
    for (const widths of [FINE_LINES_MM, COARSE_LINES_MM]) {
      const placed = placeLines(widths, 170)
      expect(placed[0]!.middleMm - placed[0]!.widthMm / 2).toBeGreaterThan(10)
      placed.slice(1).forEach((line, index) => expect(line.middleMm - line.widthMm / 2 - placed[index]!.middleMm - placed[index]!.widthMm / 2).toBeGreaterThan(10))
    }
  })
})

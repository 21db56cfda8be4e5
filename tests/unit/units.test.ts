import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { addDays, addMonths, dayNumber, daysBetween, formatDay, isDay } from '../../shared/utils/days'
import {
  formatArea, formatDensity, formatInches, formatLength, formatLoad, formatNumber, formatRate, formatShare, formatVolume, formatWeight, formatWidth,
  ftToM, inToMm, kgToLb, kpaToPsf, lbToKg, mmToIn, mToFt, psfToKpa,
} from '../../shared/utils/units'

/** Words with plain spaces, for reading in a test. */
const plain = (text: string) => text.replaceAll('\u00A0', ' ')

describe('Conversions (NIST SP 811 appendix B)', () => {
  it.each([
    ['1 ft', ftToM(1), 0.3048], ['1 in', inToMm(1), 25.4], ['1 lb', lbToKg(1), 0.45359237], ['1 psf', psfToKpa(1), 0.04788026],
  ])('%s is what it is defined to be', (_, value, expected) => {
    expect(value).toBeCloseTo(expected, 8)
  })

  it('40 psf is 1.92 kPa (ASCE 7 table 4.3-1 prints both)', () => {
    expect(psfToKpa(40)).toBeCloseTo(1.92, 2)
  })

  it('go there and back', () => {
    fc.assert(fc.property(fc.double({ min: 0, max: 1e6, noNaN: true }), (value) => {
      for (const back of [mToFt(ftToM(value)), mmToIn(inToMm(value)), kgToLb(lbToKg(value)), kpaToPsf(psfToKpa(value))]) {
        expect(Math.abs(back - value)).toBeLessThanOrEqual(1e-9 * Math.max(1, value))
      }
    }))
  })
})

describe('Quantities always carry their unit', () => {
  it.each([
    [formatWeight(1240), '1,240 lb'], [formatWeight(8.25), '8.3 lb'], [formatWeight(100, 'metric'), '45 kg'],
    [formatLength(12.5), '12.5 ft'], [formatLength(10, 'metric'), '3.05 m'], [formatInches(5.5), '5.5 in'], [formatInches(5.5, 'metric'), '140 mm'],
    [formatLoad(20), '20 psf'], [formatLoad(20, 'metric'), '0.96 kPa'], [formatArea(400), '400 ft²'], [formatArea(400, 'metric'), '37.2 m²'],
    [formatVolume(1.5), '1.5 ft³'], [formatVolume(1.5, 'metric'), '0.04 m³'], [formatDensity(7), '7 lb/ft³'], [formatDensity(62.4, 'metric'), '1,000 kg/m³'],
    [formatWidth(0.76), '0.76 mm (0.03 in)'], [formatWidth(12.34, 'metric'), '12.3 mm'], [formatRate(0.8), '0.8 mm a year (0.03 in)'], [formatShare(0.834), '83 %'],
  ])('%s', (text, expected) => {
    expect(plain(text)).toBe(expected)
  })

  it('number and unit never part at the end of a line', () => {
    expect(formatWeight(12)).toBe('12\u00A0lb')
  })

  it('a minus is a minus, and zero has none', () => {
    expect(formatNumber(-1.25, 1)).toBe('−1.3')
    expect(formatNumber(-0.01, 1)).toBe('0')
  })
})

describe('Days', () => {
  it('are written so that they never wrap', () => {
    expect(formatDay('2027-03-14')).toBe('14\u00A0Mar\u00A02027')
    expect(plain(formatDay('2026-12-01'))).toBe('1 Dec 2026')
  })

  it.each(['2026-02-29', '2026-13-01', '2026-1-1', '26-01-01', '', '2026-01-01T00:00:00Z', '2026-00-10'])('%s is no day', (text) => {
    expect(isDay(text)).toBe(false)
    expect(() => dayNumber(text)).toThrow(RangeError)
    expect(() => formatDay(text)).toThrow(RangeError)
  })

  it('a leap year has its day', () => {
    expect(isDay('2028-02-29')).toBe(true)
    expect(daysBetween('2028-02-28', '2028-03-01')).toBe(2)
  })

  it('months keep the day, or end with the month', () => {
    expect(addMonths('2026-01-31', 1)).toBe('2026-02-28')
    expect(addMonths('2026-11-15', 3)).toBe('2027-02-15')
    expect(addMonths('2028-02-29', 12)).toBe('2029-02-28')
    expect(addMonths('2026-03-31', -1)).toBe('2026-02-28')
  })

  it('adding days is undone by counting them', () => {
    fc.assert(fc.property(fc.integer({ min: 0, max: 40_000 }), fc.integer({ min: -5000, max: 5000 }), (start, days) => {
      const on = addDays('1970-01-01', start + 5000)
      expect(daysBetween(on, addDays(on, days))).toBe(days)
    }))
  })
})

import { describe, expect, it } from 'vitest'
import { SIZES } from '../../../shared/types/attic'
import { lumberValues, sectionProperties } from '../../../shared/utils/structure/lumber'
import { DRESSED_SIZES, LUMBER, SOUTHERN_PINE_BEFORE_JUNE_2013 } from '../../../shared/utils/structure/lumberValues'
import { publishedTable } from './publishedTable'

// Published: NDS 2018 Supplement Table 1B, section properties of standard dressed sawn lumber (A in2, Sxx in3, Ixx in4).
const TABLE_1B = [
  { size: '2x4', area: 5.25, s: 3.063, i: 5.359 },
  { size: '2x6', area: 8.25, s: 7.563, i: 20.8 },
  { size: '2x8', area: 10.88, s: 13.14, i: 47.63 },
  { size: '2x10', area: 13.88, s: 21.39, i: 98.93 },
  { size: '2x12', area: 16.88, s: 31.64, i: 178 },
] as const

describe('section properties of dressed sizes against NDS 2018 Supplement Table 1B', () => {
  it.each(TABLE_1B)('$size', ({ size, area, s, i }) => {
    const { areaIn2, sectionModulusIn3, inertiaIn4 } = sectionProperties(DRESSED_SIZES[size].breadthIn, DRESSED_SIZES[size].depthIn)
    expect(areaIn2 / area).toBeCloseTo(1, 3)
    expect(sectionModulusIn3 / s).toBeCloseTo(1, 3)
    expect(inertiaIn4 / i).toBeCloseTo(1, 3)
  })
})

// Published: NDS 2018 Supplement Tables 4A and 4B, and 4B as it was before June 2013.
const published = publishedTable('lumber-design-values.csv').filter(row => /Table 4[AB]/.test(row.set ?? '') && (row.size ?? '').startsWith('2x'))

describe('design values against the NDS Supplement', () => {
  const rowsOf = (species: string, grade: string, before: boolean): Record<string, string>[] => published.filter(row =>
    row.species === species && (row.grade ?? '').split('/').includes(grade) && (row.set ?? '').includes('before') === before)

  it.each([
    ...LUMBER.map(row => ({ row, before: false })),
    ...SOUTHERN_PINE_BEFORE_JUNE_2013.map(row => ({ row, before: true })),
  ])('$row.species $row.grade, before June 2013: $before, has the published values in every size', ({ row, before }) => {
    const rows = rowsOf(row.species, row.grade, before)
    expect(rows.map(entry => entry.size)).toEqual([...SIZES])
    for (const [index, size] of SIZES.entries()) {
      const values = lumberValues(row.species, row.grade, size, before)
      const { fbPsi, cf, fvPsi, fcPerpPsi, ePsi, eminPsi } = values
      const entry = rows[index] ?? {}
      expect([fbPsi, cf, fvPsi, fcPerpPsi, ePsi, eminPsi])
        .toEqual([entry.fb_psi, entry.cf, entry.fv_psi, entry.fc_perp_psi, entry.e_psi, entry.emin_psi].map(Number))
    }
  })

  it('Emin follows from E within its rounding, NDS 2018 appendix D: 1.03 E (1 - 1.645 x 0.25) / 1.66', () => {
    for (const row of [...LUMBER, ...SOUTHERN_PINE_BEFORE_JUNE_2013]) {
      const emin = 1.03 * row.ePsi * (1 - 1.645 * 0.25) / 1.66
      expect(Math.abs(emin - row.eminPsi)).toBeLessThanOrEqual(10_000)
    }
  })
})

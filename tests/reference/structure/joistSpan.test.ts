import { describe, expect, it } from 'vitest'
import { GRADES, SIZES, SPECIES } from '../../../shared/types/attic'
import type { Size, Species, StampedGrade } from '../../../shared/types/attic'
import { maxJoistSpanIn } from '../../../shared/utils/structure/joistSpan'
import { publishedTable } from './publishedTable'

// Published: International Residential Code 2018, Table R802.5.1(2), ceiling joists with limited storage, 19.2 in spacing.
const rows = publishedTable('irc-r802.5.1-2-spans.csv')

const asSpecies = (text: string): Species => SPECIES.find(value => value === text) ?? expect.fail(`species ${text}`)
const asSize = (text: string): Size => SIZES.find(value => value === text) ?? expect.fail(`size ${text}`)
const asGrade = (text: string): StampedGrade => {
  const grade = GRADES.find(value => value === text)
  return grade && grade !== 'no stamp' ? grade : expect.fail(`grade ${text}`)
}

describe('joist spans against IRC 2018 Table R802.5.1(2)', () => {
  it('the copy of the table holds 64 spans', () => {
    expect(rows).toHaveLength(64)
  })

  it.each(rows)('$species $grade $size spans $span_ft ft $span_in in, within half an inch', (row) => {
    const published = Number(row.span_ft) * 12 + Number(row.span_in)
    const computed = maxJoistSpanIn({
      species: asSpecies(row.species ?? ''), grade: asGrade(row.grade ?? ''), size: asSize(row.size ?? ''),
      spacingIn: Number(row.spacing_in), livePsf: Number(row.live_psf), deadPsf: Number(row.dead_psf),
      deflectionDivisor: Number((row.deflection ?? '').replace('L/', '')),
    })
    expect(Math.abs(published - computed)).toBeLessThanOrEqual(0.5)
  })
})

// Published: the two tables of IRC R802.5.1 differ by exactly twice the load (10 + 5 psf, 20 + 10 psf).
describe('the table without storage at twice the spacing is the table with limited storage', () => {
  it.each([12, 16, 19.2, 24])('at %s in', (spacingIn) => {
    for (const size of SIZES) {
      for (const species of SPECIES) {
        const joist = { species, grade: 'No.2', size, deflectionDivisor: 240 } as const
        expect(maxJoistSpanIn({ ...joist, spacingIn: 2 * spacingIn, livePsf: 10, deadPsf: 5 }))
          .toBeCloseTo(maxJoistSpanIn({ ...joist, spacingIn, livePsf: 20, deadPsf: 10 }), 9)
      }
    }
  })
})

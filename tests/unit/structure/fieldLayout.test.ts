import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import { AtticSurveyInput } from '../../../shared/schemas/atticSurvey'
import type { FieldLayout } from '../../../shared/types/attic'
import { fieldRectangle, overlappingFields } from '../../../shared/utils/structure/fieldLayout'
import { joistField, survey } from './surveys'

// 16 joists at 16 in: 20 ft across, 12 ft span.
const at = (layout: FieldLayout | null, name = 'north') => joistField({ name, layout })
const layout = (leftFt: number, frontFt: number, joistsRun: FieldLayout['joistsRun'] = 'left-right'): FieldLayout => ({ leftFt, frontFt, joistsRun })

describe('where fields lie', () => {
  it('a field is as wide as its span where its joists run from left to right, else as deep', () => {
    expect(fieldRectangle(at(layout(2, 3)))).toEqual({ leftFt: 2, frontFt: 3, rightFt: 14, backFt: 23 })
    expect(fieldRectangle(at(layout(2, 3, 'front-back')))).toEqual({ leftFt: 2, frontFt: 3, rightFt: 22, backFt: 15 })
  })

  it('says nothing of fields that are not measured, or whose place nobody told', () => {
    expect(fieldRectangle(at(null))).toBeNull()
    expect(fieldRectangle({ ...at(layout(0, 0)), spanFt: null })).toBeNull()
    expect(overlappingFields([at(layout(0, 0)), at(null), { ...at(layout(0, 0)), joistCount: null }])).toEqual([])
  })

  it('fields may touch, and an inch of tape is no overlap', () => {
    expect(overlappingFields([at(layout(0, 0)), at(layout(12, 0), 'south'), at(layout(0, 20), 'east')])).toEqual([])
    expect(overlappingFields([at(layout(0, 0)), at(layout(11.95, 0), 'south')])).toEqual([])
  })

  it('names the field that lies over an earlier one', () => {
    expect(overlappingFields([at(layout(0, 0)), at(layout(30, 0), 'far'), at(layout(6, 6), 'south')])).toEqual([{ index: 2, otherIndex: 0, otherName: 'north' }])
  })

  it('does not depend on which is named first, nor on where the attic begins', () => {
    const place = fc.record({ leftFt: fc.integer({ min: 0, max: 40 }), frontFt: fc.integer({ min: 0, max: 40 }), joistsRun: fc.constantFrom('left-right' as const, 'front-back' as const) })
    fc.assert(fc.property(place, place, fc.integer({ min: 0, max: 30 }), (a, b, by) => {
      const moved = (one: FieldLayout) => ({ ...one, leftFt: one.leftFt + by, frontFt: one.frontFt + by })
      const found = overlappingFields([at(a), at(b)]).length
      expect(overlappingFields([at(b), at(a)])).toHaveLength(found)
      expect(overlappingFields([at(moved(a)), at(moved(b))])).toHaveLength(found)
    }))
  })
})

describe('a survey with fields in one place', () => {
  const check = (...fields: ReturnType<typeof at>[]) => AtticSurveyInput.safeParse(survey({ joistFields: fields }))

  it('is refused at the second of them, with the name of the first', () => {
    const checked = check(at(layout(0, 0)), at(layout(5, 5), 'south'))
    expect(checked.error?.issues.map(issue => [issue.path.join('.'), issue.message])).toEqual([['joistFields.1.layout', 'It lies over "north". Two groups of joists cannot lie in the same place.']])
    expect(check(at(layout(0, 0)), at(layout(12, 0), 'south')).success).toBe(true)
    expect(check(at(null), joistField({ name: 'south' })).success).toBe(true)
  })

  it.each([[{ leftFt: -1 }, 'leftFt'], [{ leftFt: Number.NaN }, 'leftFt'], [{ frontFt: 500 }, 'frontFt'], [{ joistsRun: 'up' as 'left-right' }, 'joistsRun']] as const)('%j is refused at its box', (change, box) => {
    expect(check(at({ ...layout(0, 0), ...change })).error?.issues.map(issue => issue.path.join('.'))).toEqual([`joistFields.0.layout.${box}`])
  })
})

import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { cursorOf, likeAnywhere, pageOf, readCursor } from '../../../server/utils/cursor'
import { PropertyCreate, PropertyEdit, UnitCreate } from '../../../shared/schemas/home'
import { RoomCreate } from '../../../shared/schemas/room'
import { TenancyCreate } from '../../../shared/schemas/tenancy'
import { pathWith } from '../../../composables/queries/pathWith'

const id = '01a22ffc-2663-71fd-9964-97c5f8cd8759'

describe('a place in a list', () => {
  it('comes back as it was, whatever the name', () => {
    fc.assert(fc.property(fc.string({ unit: 'grapheme' }).filter(name => name.isWellFormed() && !name.includes('\u0000')), (name) => {
      expect(readCursor(cursorOf([name, id]), ['text', 'id'])).toEqual([name, id])
    }))
    expect(readCursor(cursorOf([7]), ['number'])).toEqual([7])
    expect(readCursor(undefined, ['id'])).toBeUndefined()
    expect(readCursor('', ['id'])).toBeUndefined()
  })

  it.each([['not base64 of anything'], [cursorOf(['a'])], [cursorOf(['a', 'no id'])], [cursorOf([1, id])], [cursorOf(['a\u0000', id])], [Buffer.from('null').toString('base64url')]])('is refused when it is not one of ours: %#', (text) => {
    expect(() => readCursor(text, ['text', 'id'])).toThrow(expect.objectContaining({ statusCode: 422 }))
  })

  it('is given only when there is more', () => {
    expect(pageOf([1, 2, 3], 2, value => [value])).toEqual({ rows: [1, 2], next: cursorOf([2]) })
    expect(pageOf([1, 2], 2, value => [value])).toEqual({ rows: [1, 2], next: null })
    expect(pageOf([], 2, () => [0])).toEqual({ rows: [], next: null })
  })
})

it('a search takes the signs of a pattern as themselves', () => {
  expect(likeAnywhere('50% _\\')).toBe('%50\\% \\_\\\\%')
})

it('an address carries only parameters that have a value', () => {
  expect(pathWith('/a', {})).toBe('/a')
  expect(pathWith('/a', { search: 'x y&z', after: undefined, archived: '' })).toBe('/a?search=x+y%26z')
})

describe('what a home may be', () => {
  it('a property is complete with a name; empty address lines are dropped', () => {
    expect(PropertyCreate.parse({ name: ' A ', addressLines: ['1 Road', '', ' '] })).toEqual({ name: 'A', addressLines: ['1 Road'], yearBuilt: null, notes: '', firstUnit: null })
  })

  it('an edit must say everything, so that nothing is emptied by being left out', () => {
    expect(PropertyEdit.safeParse({ name: 'A', version: 1 }).error!.issues.map(issue => issue.path[0])).toEqual(expect.arrayContaining(['addressLines', 'yearBuilt', 'notes']))
  })

  it('a room of which only the name is known has every other answer unknown', () => {
    expect(RoomCreate.parse({ name: 'Hall' })).toEqual({ name: 'Hall', isBedroom: false, lengthFt: null, widthFt: null, ceilingHeightIn: null, ceilingFinish: 'unknown' })
    expect(UnitCreate.parse({ name: 'Flat' })).toMatchObject({ rooms: [], atticName: null })
  })

  it.each([Number.NaN, Infinity, 0, -1, 200.1])('a room is not %s ft long', (lengthFt) => {
    expect(RoomCreate.safeParse({ name: 'Hall', lengthFt }).success).toBe(false)
  })

  it('a tenancy may last one day, and may be open', () => {
    expect(TenancyCreate.safeParse({ tenantName: 'Ada', startsOn: '2026-01-01', endsOn: '2026-01-01' }).success).toBe(true)
    expect(TenancyCreate.parse({ tenantName: 'Ada', startsOn: '2026-01-01' })).toMatchObject({ endsOn: null, notes: '' })
    expect(TenancyCreate.safeParse({ tenantName: 'Ada', startsOn: '2026-01-02', endsOn: '2026-01-01' }).error!.issues[0]!.message).toBe('The last day comes before the first.')
  })
})

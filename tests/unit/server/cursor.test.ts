import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { cursorOf, likeAnywhere, pageOf, readCursor } from '../../../server/utils/cursor'

const refusal = (text: string) => {
  try { return readCursor(text, ['text', 'id']) }
  catch (error) { return (error as { statusCode: number, data: { fields: object } }).data.fields }
}
const ID = '018f0000-0000-7000-8000-000000000001'
/** Text PostgreSQL can keep: no NUL, no half letters. */
const name = fc.string({ unit: 'grapheme', maxLength: 120 }).filter(text => !text.includes('\u0000'))

describe('a cursor', () => {
  it('comes back as it was given, whatever letters the name has', () => {
    fc.assert(fc.property(name, (text) => {
      const cursor = cursorOf([text, ID])
      return /^[\w-]+$/.test(cursor) && JSON.stringify(readCursor(cursor, ['text', 'id'])) === JSON.stringify([text, ID])
    }))
  })

  it('that is absent or empty means the start', () => {
    expect([readCursor(undefined, ['id']), readCursor('', ['id'])]).toEqual([undefined, undefined])
  })

  it.each([
    ['no base64', '%%%'], ['no JSON', 'abc'], ['no list', Buffer.from('{}').toString('base64url')], ['another list\'s', cursorOf([1, 2])], ['too short', cursorOf(['x'])],
    ['too long', cursorOf(['x', ID, 'y'])], ['no id', cursorOf(['x', 'y'])], ['a NUL', cursorOf(['\u0000', ID])], ['half a letter', Buffer.from('["\\ud800","' + ID + '"]').toString('base64url')],
  ])('that is %s is refused at its field', (_what, text) => {
    expect(refusal(text)).toEqual({ after: expect.stringContaining('start from the top') })
  })

  it('never throws anything but that refusal', () => {
    fc.assert(fc.property(fc.string(), text => text === '' || 'after' in (refusal(text) as object) || Array.isArray(refusal(text))))
  })
})

describe('a page', () => {
  it('holds as many rows as asked, with the cursor of the last one where more follow', () => {
    const rows = [1, 2, 3].map(n => ({ n }))
    expect(pageOf(rows, 3, row => [row.n])).toEqual({ rows, next: null })
    expect(pageOf(rows, 2, row => [row.n])).toEqual({ rows: rows.slice(0, 2), next: cursorOf([2]) })
    expect(pageOf([], 2, () => [1])).toEqual({ rows: [], next: null })
  })
})

describe('a search anywhere in a text', () => {
  it('takes the pattern letters of LIKE as themselves', () => {
    expect(likeAnywhere('50 %_\\')).toBe('%50 \\%\\_\\\\%')
  })
})

import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { instantText, timeText } from '../../../components/ui/dayText'
import { fieldId } from '../../../components/ui/fieldContext'
import { quantityFromText, textFromQuantity } from '../../../components/ui/quantityText'
import { messageForIssue } from '../../../composables/formIssue'

describe('reading a quantity that was typed', () => {
  it.each([
    ['12', 12], [' 7.25 ', 7.25], ['.5', 0.5], ['1,940', 1940], ['12,345.5', 12345.5], ['-3', -3], ['−3', -3],
    ['9 1/4', 9.25], ['3/4', 0.75], ['5½', 5.5], ['5 ½', 5.5], ['½', 0.5], ['-1 1/2', -1.5], ['3.', 3],
  ])('%s is %d', (text, value) => {
    expect(quantityFromText(text)).toBe(value)
  })

  it.each(['about 12', '1,5', '12 ft', '1/0', '1.2.3', '5 5', '--3', '9 1/4 1/4', 'NaN', 'Infinity', '1e5', '91/4/2'])('%s is no number', (text) => {
    expect(quantityFromText(text)).toBeNaN()
  })

  it('is nothing when nothing was typed', () => {
    expect([quantityFromText(''), quantityFromText('  ')]).toEqual([null, null])
  })

  it('reads back every plain number that we write', () => {
    fc.assert(fc.property(fc.integer({ min: -1e9, max: 1e9 }).map(n => n / 1000), (value) => {
      expect(quantityFromText(textFromQuantity(value))).toBeCloseTo(value, 9)
    }))
  })

  it('writes nothing for unknown and for no number', () => {
    expect([null, undefined, Number.NaN].map(textFromQuantity)).toEqual(['', '', ''])
  })
})

const plain = (text: string | undefined | null) => text?.replaceAll('\u00A0', ' ')

describe('writing a day', () => {
  it('writes day, month, year, and the form a machine reads', () => {
    const day = timeText('2027-03-14')
    expect([plain(day?.text), day?.machine]).toEqual(['14 Mar 2027', '2027-03-14'])
  })

  it.each(['', 'tomorrow', '2027-13-01', '2027-02-3x'])('has no words for %s', (day) => {
    expect(timeText(day)).toBeNull()
  })

  it('writes an instant by the zone given, on both sides of a change of clocks', () => {
    expect(plain(instantText(new Date('2026-03-08T07:30:00Z'), { timeZone: 'America/New_York', withTime: true }))).toBe('8 Mar 2026, 03:30')
    expect(plain(instantText(new Date('2026-11-01T05:30:00Z'), { timeZone: 'America/New_York', withTime: true }))).toBe('1 Nov 2026, 01:30')
    expect(instantText(new Date('nonsense'))).toBeNull()
  })
})

describe('ids and issues', () => {
  it('makes an id that a link can point to', () => {
    expect(fieldId('joists.0.spanFt')).toBe('field-joists-0-spanFt')
  })

  it('never passes the library\'s own English on', () => {
    const issue = (code: string, more: object = {}) => messageForIssue({ path: ['x'], message: 'Invalid something', code, ...more })
    for (const text of [
      issue('too_small', { origin: 'string', minimum: 8 }), issue('too_small', { origin: 'array', minimum: 1 }), issue('too_small', { origin: 'number', minimum: 0, inclusive: false }),
      issue('too_big', { origin: 'number', maximum: 40 }), issue('too_big', { origin: 'string', maximum: 40 }), issue('too_big', { origin: 'array', maximum: 6 }),
      issue('invalid_format', { format: 'email' }), issue('invalid_format', { format: 'uuid' }), issue('invalid_value'), issue('custom'),
    ]) expect(text).not.toMatch(/Invalid|!/)
    expect(issue('too_small', { origin: 'number', minimum: 0, inclusive: false })).toBe('Use more than 0.')
  })
})

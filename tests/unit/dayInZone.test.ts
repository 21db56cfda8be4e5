import { expect, test } from 'vitest'
import { clockInZone, dayInZone } from '../../shared/utils/dayInZone'

test('one instant is two days, east and west of the date line', () => {
  const at = new Date('2027-03-14T11:30:00Z')
  expect(dayInZone('Pacific/Auckland', at)).toBe('2027-03-15')
  expect(dayInZone('Pacific/Honolulu', at)).toBe('2027-03-14')
})

test('a zone asked again gives the other instant its own day', () => {
  expect(dayInZone('America/Chicago', new Date('2027-03-14T05:59:00Z'))).toBe('2027-03-13')
  expect(dayInZone('America/Chicago', new Date('2027-03-14T06:00:00Z'))).toBe('2027-03-14')
})

test('midnight is hour 00, and summer time moves the clock', () => {
  expect(clockInZone('UTC', new Date('2027-01-01T00:00:59Z'))).toEqual({ day: '2027-01-01', time: '00:00' })
  expect(clockInZone('Europe/Oslo', new Date('2027-07-01T12:05:00Z')).time).toBe('14:05')
  expect(clockInZone('Europe/Oslo', new Date('2027-01-01T12:05:00Z')).time).toBe('13:05')
})

test('a year of three digits is written with four', () => {
  expect(dayInZone('UTC', new Date('0900-06-01T00:00:00Z'))).toBe('0900-06-01')
})

test('an unknown zone and no instant are refused', () => {
  expect(() => dayInZone('Nowhere/None', new Date())).toThrow(RangeError)
  expect(() => dayInZone('UTC', new Date(NaN))).toThrow(RangeError)
})

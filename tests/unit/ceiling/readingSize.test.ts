import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { PhotoMeasure } from '../../../shared/types/readingDetail'
import { refusedReadingSentence } from '../../../shared/utils/messages/readingMessages'
import { pairDiffersTooMuch, readingSize, type FullReading } from '../../../shared/utils/movement/readingSize'
import { personSigma, readingSigma } from '../../../shared/utils/movement/readingSigma'
import { segmentOf } from '../../../shared/utils/movement/segmentOf'

const given = (more: Partial<FullReading>): FullReading => ({ method: 'ruler', value: null, atLeast: null, atMost: null, second: null, sinceSet: null, photo: null, checkRulerMm: null, ...more })
const at = (xPx: number, yPx: number) => ({ xPx, yPx })
/** 10 px a mm: a scale of 40 mm, and a crack of 12 px at each of the places. */
const photo = (more: Partial<PhotoMeasure> = {}): PhotoMeasure => ({
  photoId: 'p', widthPx: 1000, heightPx: 800, a: at(100, 100), b: at(500, 100), distanceMm: 40, stations: [200, 300, 400].map(x => ({ p: at(x, 300), q: at(x, 312) })), ...more,
})
const refusal = (kind: 'crack' | 'stain' | 'sag', more: Partial<FullReading>) => {
  const size = readingSize(kind, given(more))
  return size.kind === 'refused' ? [size.field, size.why] : size.kind
}

describe('readingSize', () => {
  it('takes the mean of a double reading, and keeps both', () => {
    expect(readingSize('crack', given({ value: 1.2, second: 1.4 }))).toMatchObject({ value: expect.closeTo(1.3, 12), first: 1.2, second: 1.4, sigma: 0.4 })
  })

  it('shows the change since pins or a tell-tale were set', () => {
    expect(readingSize('crack', given({ method: 'calipers', sinceSet: { nowMm: 101.4, setMm: 100.2, widthWhenSetMm: 0.8 } }))).toMatchObject({ value: expect.closeTo(2, 9), sigma: 0.1 })
    expect(readingSize('crack', given({ method: 'tell-tale', sinceSet: { nowMm: 0.5, setMm: 0, widthWhenSetMm: 1 } }))).toMatchObject({ value: 1.5, sigma: 0.2 })
    expect(refusal('crack', { method: 'calipers', sinceSet: { nowMm: 99, setMm: 100.2, widthWhenSetMm: 0.8 } })).toEqual(['sinceSet', 'since-set-below-zero'])
    expect(refusal('crack', { sinceSet: { nowMm: 1, setMm: 1, widthWhenSetMm: 1 } })).toEqual(['sinceSet', 'since-set-not-here'])
  })

  it('corrects a card that was printed almost to size, and refuses any other', () => {
    expect(readingSize('crack', given({ method: 'gauge-card', value: 2, checkRulerMm: 100.4 }))).toMatchObject({ value: expect.closeTo(2.008, 9) })
    for (const checkRulerMm of [98.9, 101.1]) expect(refusal('crack', { method: 'gauge-card', value: 2, checkRulerMm })).toEqual(['checkRulerMm', 'card-misprinted'])
    expect(refusal('crack', { value: 2, checkRulerMm: 100 })).toEqual(['checkRulerMm', 'check-ruler-not-here'])
  })

  it('measures in a photo, and is never surer than hand-tapped photos are', () => {
    expect(readingSize('crack', given({ method: 'photo-with-scale', photo: photo() }))).toMatchObject({ value: expect.closeTo(1.2, 9), sigma: 0.18, stationsMm: [1.2, 1.2, 1.2].map(mm => expect.closeTo(mm, 9)) })
    const uneven = readingSize('crack', given({ method: 'photo-with-scale', photo: photo({ stations: [5, 12, 40].map((px, i) => ({ p: at(200 + i, 300), q: at(200 + i, 300 + px) })) }) }))
    expect(uneven.kind === 'measured' && uneven.sigma).toBeGreaterThan(1)
    expect(readingSize('stain', given({ method: 'photo-with-scale', photo: photo() }))).toMatchObject({ sigma: 10 })
  })

  it('refuses points that say nothing', () => {
    const method = 'photo-with-scale'
    expect(refusal('crack', { method, photo: photo({ stations: photo().stations.slice(1) }) })).toEqual(['photo', 'photo-too-few-stations'])
    expect(refusal('crack', { method, photo: photo({ b: at(130, 100) }) })).toEqual(['photo', 'photo-scale-unsound'])
    expect(refusal('crack', { method, photo: photo({ b: at(1001, 100) }) })).toEqual(['photo', 'photo-point-outside'])
    expect(refusal('crack', { photo: photo() })).toEqual(['photo', 'photo-not-here'])
    expect(refusal('sag', { method, photo: photo() })).toEqual(['photo', 'photo-not-here'])
    expect(refusal('crack', { method, photo: photo(), second: 1 })).toEqual(['second', 'second-not-here'])
    expect(refusal('crack', { method, photo: photo({ distanceMm: 3000, stations: [0, 1, 2].map(i => ({ p: at(i, 0), q: at(i, 700) })) }) })).toEqual(['value', 'value-out-of-range'])
  })

  it('takes no second reading beside a range', () => {
    expect(refusal('crack', { method: 'coin-or-card', atLeast: 0.76, second: 1 })).toEqual(['second', 'second-not-here'])
  })

  it('says each refusal in a sentence', () => {
    for (const why of ['second-not-here', 'photo-not-here', 'photo-too-few-stations', 'photo-scale-unsound', 'photo-point-outside', 'since-set-not-here', 'since-set-below-zero', 'check-ruler-not-here', 'card-misprinted'] as const) {
      expect(refusedReadingSentence('crack', why)).toMatch(/^[A-Z].{20,}\.$/)
    }
  })
})

describe('a person\'s own uncertainty', () => {
  const pairs = (difference: number): [number, number][] => Array.from({ length: 6 }, (_, i) => [1, 1 + (i % 2 === 0 ? difference : -difference)])

  it('is the spread of their double readings over √2, once there are five', () => {
    // Differences ±1: standard deviation √(6/5).
    expect(personSigma('crack', 'ruler', pairs(1))).toBeCloseTo(Math.sqrt(6 / 5 / 2), 12)
    expect(personSigma('crack', 'ruler', pairs(1).slice(0, 4))).toBe(readingSigma('crack', 'ruler'))
  })

  it('is never less than half of the method\'s', () => {
    fc.assert(fc.property(fc.double({ min: 0, max: 5, noNaN: true }), d => personSigma('crack', 'ruler', pairs(d)) >= 0.2))
    expect(readingSize('crack', given({ value: 1 }), pairs(0))).toMatchObject({ sigma: 0.2 })
  })

  it('asks about two readings that are too far apart for one size', () => {
    expect([pairDiffersTooMuch(1, 3.2, 0.4), pairDiffersTooMuch(1, 3.3, 0.4), pairDiffersTooMuch(3.3, 1, 0.4)]).toEqual([false, true, true])
  })
})

describe('segmentOf', () => {
  const repairs = [{ repairedOn: '2026-03-01', recordedAt: '2026-03-10T08:00:00Z' }, { repairedOn: '2026-06-01', recordedAt: '2026-06-01T08:00:00Z' }]

  it('goes by the day it was taken, however late it is entered', () => {
    const receivedAt = '2027-01-01T00:00:00Z'
    expect(['2026-02-28', '2026-03-02', '2026-05-31', '2026-06-02'].map(takenOn => segmentOf({ takenOn, receivedAt }, repairs))).toEqual([1, 2, 2, 3])
  })

  it('goes by the order of arrival on the day of a repair', () => {
    expect(segmentOf({ takenOn: '2026-06-01', receivedAt: '2026-06-01T07:00:00Z' }, repairs)).toBe(2)
    expect(segmentOf({ takenOn: '2026-06-01', receivedAt: '2026-06-01T09:00:00Z' }, repairs)).toBe(3)
  })
})

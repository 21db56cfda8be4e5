import { describe, expect, it } from 'vitest'
import { readingExtras } from '../../../components/ceiling/readingExtras'
import type { ReadingRow } from '../../../shared/types/markPage'
import { addDays, formatDay } from '../../../shared/utils/days'
import { movementSentence } from '../../../shared/utils/messages/movementSentence'
import { loadLinks } from '../../../shared/utils/movement/loadLink'
import { markTrend } from '../../../shared/utils/movement/trend'

const series = (count: number, everyDays: number, value: (i: number) => number) => Array.from({ length: count }, (_, i) => ({ takenOn: addDays('2026-01-01', i * everyDays), value: value(i), sigma: 0.1 }))
const plain = (text: string) => text.replaceAll('\u00A0', ' ')

describe('a mark\'s movement in one sentence', () => {
  it('says how fast, since when it is sure, what it followed, and when the season can be told', () => {
    // Still for four readings, then 1 mm a fortnight, after 320 lb went up.
    const readings = series(12, 14, i => i < 4 ? 1 : 1 + (i - 3))
    const changedOn = addDays('2026-01-01', 43)
    const links = loadLinks(readings, [{ on: '2025-06-01', totalLb: 100 }, { on: changedOn, totalLb: 420 }])
    const trend = markTrend(readings)
    const sentence = plain(movementSentence(trend, links, 'crack', 'metric'))
    expect(trend.activity).toBe('active')
    expect(sentence).toMatch(/^Widening about [\d.]+ mm a year, sure of the direction since \d+ \w+ 2026; began after 145(\.\d)? kg were added on 13 Feb 2026; a season cannot be ruled out before 1 Jan 2027\. Jumped from about 7 mm to 9 mm, read on 4 Jun 2026\.$/)
    expect(plain(movementSentence(trend, links, 'crack'))).toContain('began after 320 lb were added')
  })

  it('says nothing of a load that the readings do not tell about', () => {
    const readings = series(12, 14, i => 1 + i)
    expect(movementSentence(markTrend(readings), loadLinks(readings, [{ on: '2025-06-01', totalLb: 100 }, { on: '2025-09-01', totalLb: 500 }]), 'crack')).not.toContain('lb')
  })

  it('says what is not sure, what keeps still, and what is too little', () => {
    expect(movementSentence(markTrend(series(7, 20, i => i % 2)), [], 'sag')).toContain('the direction is not sure; a season cannot be ruled out before')
    expect(plain(movementSentence(markTrend(series(7, 20, i => i % 2)), [], 'sag'))).toContain(`${plain(formatDay('2027-01-01'))} and 1 more reading.`)
    expect(movementSentence(markTrend(series(14, 30, () => 1)), [], 'crack')).toBe('No movement beyond the error of the readings for a year or more.')
    expect(movementSentence(markTrend(series(2, 30, () => 1)), [], 'crack')).toContain('so far.')
  })

  it('says a jump before anything else', () => {
    const jumped = [...series(7, 30, () => 1.2), { takenOn: '2026-08-01', value: 5, sigma: 0.1 }]
    expect(plain(movementSentence(markTrend(jumped), [], 'crack', 'metric'))).toMatch(/^Jumped from about 1.2 mm to 5 mm, read on 1 Aug 2026. Before that and with it: /)
    expect(plain(movementSentence(markTrend(jumped.slice(-2)), [], 'crack', 'metric'))).toMatch(/^Jumped from about 1.2 mm to 5 mm, read on 1 Aug 2026. 2 readings so far/)
  })

  it('says no word of the season once it is separated', () => {
    expect(movementSentence(markTrend(series(16, 30, i => 1 + i)), [], 'crack')).not.toContain('season')
  })
})

describe('what else was said of a reading', () => {
  const row = (more: Partial<ReadingRow>): ReadingRow => ({
    id: 'r', takenOn: '2027-01-01', receivedAt: '2027-01-01T00:00:00Z', takenBy: 'Invented', segment: 1, method: 'ruler', value: 1.3, sigma: 0.4, low: null, high: null, firstValue: null, secondValue: null,
    lengthMm: null, spanMm: null, tip: null, tipPastMm: null, photo: null, stationsMm: null, sinceSet: null, wroteFirst: null, askedAgainstUsual: null, phoneAt: null, cameraOn: null, fromMark: null,
    stainState: null, reportId: null, couldNotMeasureReason: null, note: '', ...more,
  })
  const words = (more: Partial<ReadingRow>, segment = 1) => plain(readingExtras(row(more), 'crack', segment, 'metric'))

  it('is nothing where nothing was', () => expect(words({})).toBe(''))

  it.each<[Partial<ReadingRow>, string]>([
    [{ firstValue: 1.2, secondValue: 1.4 }, 'read twice: 1.2 mm and 1.4 mm'],
    [{ stationsMm: [1.2, 1.25, 1.3] }, '3 places in the photo: 1.2, 1.25, 1.3 mm'],
    [{ sinceSet: { nowMm: 101.2, setMm: 100.5, widthWhenSetMm: 0.6 } }, '101.2 mm now, 100.5 mm when set'],
    [{ wroteFirst: 12 }, 'first wrote 12 mm'],
    [{ askedAgainstUsual: 1.2 }, 'asked, since it was about 1.2 mm before, and confirmed'],
    [{ cameraOn: '2019-05-01', phoneAt: '2019-05-02T10:00:00Z' }, 'the camera says 1 May 2019; the phone’s clock said 2 May 2019'],
    [{ fromMark: 7, tipPastMm: 25, lengthMm: 425 }, '425 mm long; 25 mm past the marks; joined from mark 7'],
  ])('%o', (more, said) => expect(words(more)).toBe(said))

  it('says what was before a repair', () => expect(words({}, 2)).toBe('before the repair'))
})

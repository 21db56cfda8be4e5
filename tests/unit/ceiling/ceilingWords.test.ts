import { describe, expect, it } from 'vitest'
import { firstValues, THICKNESSES, withoutLeftovers } from '../../../components/ceiling/readingValues'
import { chartDataOf, markFacts, markVerdict, widthClassWords } from '../../../components/ceiling/markView'
import { METHODS_BY_KIND, READING_METHODS } from '../../../shared/types/mark'
import type { MarkFacts, ReadingRow } from '../../../shared/types/markPage'
import { addDays } from '../../../shared/utils/days'
import { METHOD_HOW_TO } from '../../../shared/utils/messages/methodMessages'
import { WIDTH_CLASS_CAVEAT } from '../../../shared/utils/messages/safety'
import { COINS_MM } from '../../../shared/utils/movement/widthComparisons'
import { markTrend } from '../../../shared/utils/movement/trend'

const mark = (more: Partial<MarkFacts> = {}): MarkFacts => ({
  id: 'm', organisationId: 'o', unitId: 'u', roomId: 'r', atticId: null, number: 7, kind: 'crack', label: 'Crack, Hall', pinX: 0.5, pinY: 0.5, place: null, shape: null, direction: null,
  firstSeenOn: '2026-01-01', state: 'open', segment: 1, activity: 'too-few-readings', widthClass: null, lastValue: null, lastReadOn: null, slopePerYear: null, nextReadingOn: '2026-02-01', stainState: null,
  notes: '', createdAt: '2026-01-01T00:00:00Z', version: 1, joinedInto: null, ...more,
})
const reading = (takenOn: string, value: number | null, segment = 1): ReadingRow => ({
  id: takenOn, takenOn, receivedAt: `${takenOn}T00:00:00Z`, takenBy: 'Invented', segment, method: value === null ? 'could-not-measure' : 'ruler', value, sigma: value === null ? null : 0.4, low: null, high: null,
  firstValue: null, secondValue: null, lengthMm: null, spanMm: null, tip: null, tipPastMm: null, photo: null, stationsMm: null, sinceSet: null, wroteFirst: null, askedAgainstUsual: null, phoneAt: null, cameraOn: null, fromMark: null,
  stainState: null, reportId: null, couldNotMeasureReason: null, note: '',
})
const readBy = (method: ReadingRow['method']) => ({ ...reading('2026-01-01', 1.5), method })

describe('a mark in words', () => {
  it('says that it cannot tell yet, when, and that a reading is late', () => {
    const words = markVerdict({ mark: mark(), trend: markTrend([{ takenOn: '2026-01-01', value: 1, sigma: 0.4 }]), today: '2026-02-02', loadLinks: [] }, 'us')
    expect(words).toMatchObject({ word: 'Too few readings', tone: 'unknown', says: expect.stringContaining('cannot tell yet'), doNow: expect.stringContaining('was due on 1\u00A0Feb\u00A02026') })
  })

  it('gives the rate of one that moves, and no rate of one that keeps still', () => {
    const series = (perMonth: number) => markTrend(Array.from({ length: 14 }, (_, i) => ({ takenOn: addDays('2025-01-01', 30 * i), value: 1 + perMonth * i, sigma: 0.1 })))
    expect(markVerdict({ mark: mark({ activity: 'active' }), trend: series(1), today: '2026-01-02', loadLinks: [] }, 'metric')).toMatchObject({ word: 'Active', number: expect.stringMatching(/^12.2\smm a year\.$/) })
    expect(markVerdict({ mark: mark({ activity: 'dormant' }), trend: series(0), today: '2026-01-02', loadLinks: [] }, 'us').number).toBeUndefined()
  })

  it('knows repaired and closed', () => {
    const trend = markTrend([])
    expect(markVerdict({ mark: mark({ state: 'repaired' }), trend, today: '2026-01-02', loadLinks: [] }, 'us').word).toBe('Repaired')
    expect(markVerdict({ mark: mark({ state: 'closed' }), trend, today: '2030-01-02', loadLinks: [] }, 'us')).toMatchObject({ word: 'Closed' })
    expect(markVerdict({ mark: mark({ state: 'closed' }), trend, today: '2030-01-02', loadLinks: [] }, 'us').doNow).toBeUndefined()
  })

  it('never shows the width class without its caveat, nor for what is no crack', () => {
    expect(widthClassWords(mark({ lastValue: 2 }))).toContain(WIDTH_CLASS_CAVEAT)
    expect(widthClassWords(mark({ kind: 'sag', lastValue: 20 }))).toBeNull()
    expect(widthClassWords(mark())).toBeNull()
  })

  it('leaves out of the facts what nobody said', () => {
    const around = { room: { id: 'r', name: 'Hall', lengthFt: null, widthFt: null }, unit: { id: 'u', name: 'Flat 1' }, property: { id: 'p', name: 'Row', yearBuilt: null }, attic: null }
    expect(markFacts({ mark: mark(), ...around }, 'us').map(fact => fact.label)).toEqual(['Crack', 'Home', 'Room', 'Last reading', 'First seen', 'Above it'])
    expect(markFacts({ mark: mark({ shape: 'ring', stainState: 'damp' }), ...around }, 'us').map(fact => fact.label)).toContain('Damp')
  })

  it('draws measured readings only, and a break where a repair began', () => {
    const data = chartDataOf({ repairs: [{ id: 'r', repairedOn: '2026-01-20', recordedAt: '2026-01-20T00:00:00Z', reason: 'Filled', recordedBy: 'Invented' }], readings: [reading('2026-01-01', 1), reading('2026-01-08', null), reading('2026-02-01', 0.2, 2)], trend: markTrend([]), loadSteps: [{ on: '2026-01-05', totalLb: 80 }] })
    expect(data.readings).toHaveLength(2)
    expect(data.repairs).toEqual([{ on: '2026-01-20', label: 'Repair' }])
    expect(data.loadSteps).toEqual([{ on: '2026-01-05', weightLb: 80 }])
  })
})

describe('the form of a reading', () => {
  it('offers last time\'s way first where it suits', () => {
    expect(firstValues('crack', '2026-01-01', [readBy('calipers')]).method).toBe('calipers')
    expect(firstValues('crack', '2026-01-01', [reading('2026-01-01', null)]).method).toBe('coin-or-card')
    expect(firstValues('nail-pops', '2026-01-01', []).method).toBe('count')
  })

  it('sends nothing left over from another way', () => {
    const values = { ...firstValues('crack', '2026-01-01', [readBy('ruler')]), value: 2, atLeast: 0.76, atMost: 1.35, reason: 'dark' }
    expect(withoutLeftovers(values)).toMatchObject({ value: 2, atLeast: null, atMost: null, reason: null })
    expect(withoutLeftovers({ ...values, method: 'coin-or-card' })).toMatchObject({ value: null, atLeast: 0.76, atMost: 1.35 })
    expect(withoutLeftovers({ ...values, method: 'could-not-measure' })).toMatchObject({ value: null, atLeast: null, reason: 'dark' })
  })

  it('lists thicknesses from thin to thick (ISO/IEC 7810; US Mint)', () => {
    const values = THICKNESSES.map(entry => entry.value)
    expect(values).toEqual([...values].sort((a, b) => a - b))
    expect(values).toEqual(expect.arrayContaining([0.76, COINS_MM.dime, 3.9]))
  })

  it('has a how-to for every method, which never asks anybody to climb', () => {
    for (const method of READING_METHODS) expect(METHOD_HOW_TO[method]).not.toMatch(/\b(climb|ladder|press|tap|prod|prop)\b/i)
    expect(Object.values(METHODS_BY_KIND).flat().every(method => METHOD_HOW_TO[method].length > 20)).toBe(true)
  })
})

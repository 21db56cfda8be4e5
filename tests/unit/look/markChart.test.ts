import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { activityTone } from '../../../components/ceiling/activityTone'
import { ceilingPinWords, clampPin, movePinByKey, spreadPins } from '../../../components/ceiling/ceilingPinWords'
import { loadChart, readingsChart } from '../../../components/ceiling/markChartOptions'
import { errorBars, loadLine, readingPoints, timeOf, timeRange, trendBand, trendLine } from '../../../components/ceiling/markChartSeries'
import { shapeDrawing } from '../../../shared/utils/report/shapeDrawings'
import { hexFromToken } from '../../../components/ceiling/useTokenColours'
import { MARK_KINDS, MARK_SHAPES } from '../../../shared/types/mark'

const readings = [
  { takenOn: '2026-03-01', value: 1.4, sigma: 0.1, segment: 1 },
  { takenOn: '2026-01-01', value: 1.0, sigma: 0.1, segment: 1 },
  { takenOn: '2026-12-31', value: 2.0, sigma: 0.6, segment: 1 },
]
const trend = { slopePerYear: 1, interval: [0.5, 2] as [number, number], levelAtStart: 1, startOn: '2026-01-01', endOn: '2027-01-01' }
const colours = { paper: '#faf6ee', rule: '#d3c8b4', ink: '#1e282d', graphite: '#4d5b63', slate: '#2b5783', ochre: '#7f5200', madder: '#97291f' }

describe('pins that stand on each other', () => {
  it('are drawn apart, and the first stays where it is', () => {
    const pins = spreadPins(Array.from({ length: 5 }, (_, i) => ({ id: i, pin: { xShare: 0.9, yShare: 0.2 } })))
    expect(pins[0]!.pin).toEqual({ xShare: 0.9, yShare: 0.2 })
    for (const [i, { pin }] of pins.entries()) {
      expect(pin.xShare > 0 && pin.xShare < 1).toBe(true)
      for (const other of pins.slice(i + 1)) expect(Math.hypot(pin.xShare - other.pin.xShare, pin.yShare - other.pin.yShare)).toBeGreaterThan(0.09)
    }
  })
})

describe('the chart of a mark', () => {
  it('draws the readings in the order they were taken', () => {
    expect(readingPoints({ readings }).map(point => point.y)).toEqual([1.0, 1.4, 2.0])
  })

  it('draws each error as 1.96 σ to both sides, never below nothing, and breaks the line between them', () => {
    const bars = errorBars({ readings: [{ takenOn: '2026-01-01', value: 1, sigma: 0.1, segment: 1 }, { takenOn: '2026-02-01', value: 0.5, sigma: 1, segment: 1 }] })
    const heights = bars.filter(point => point.y !== null).map(point => point.y ?? 0)
    expect(Math.min(...heights)).toBe(0)
    expect(heights[0]).toBeCloseTo(0.804, 6)
    expect(heights[4]).toBeCloseTo(1.196, 6)
    expect(bars.filter(point => point.y === null)).toHaveLength(2)
  })

  it('puts the trend where its slope and its first level say', () => {
    const line = trendLine({ readings, trend })
    expect(line[0]).toEqual({ x: timeOf('2026-01-01'), y: 1 })
    expect(line[1]?.y).toBeCloseTo(1 + 365 / 365.25, 9)
  })

  it('keeps the trend line inside its band, which is narrowest in the middle', () => {
    const band = trendBand({ readings, trend })
    const width = band.map(point => point.y[1] - point.y[0])
    expect(width[2]).toBeCloseTo(0, 9)
    expect(width[0]).toBeCloseTo(width[4]!, 9)
    for (const [i, share] of [0, 0.25, 0.5, 0.75, 1].entries()) {
      const onLine = 1 + (365 / 365.25) * share
      expect(band[i]!.y[0]).toBeLessThanOrEqual(onLine + 1e-9)
      expect(band[i]!.y[1]).toBeGreaterThanOrEqual(onLine - 1e-9)
    }
  })

  it('holds each weight until the next, from one end of the axis to the other', () => {
    const data = { readings, loadSteps: [{ on: '2026-05-01', weightLb: 565 }, { on: '2025-01-01', weightLb: 400 }] }
    const line = loadLine(data)
    expect(line.map(point => point.y)).toEqual([400, 565, 565])
    const range = timeRange(data)
    expect(line[0]?.x === range.min && line[2]?.x === range.max).toBe(true)
  })

  it('begins with nothing above when nothing was on record before', () => {
    expect(loadLine({ readings, loadSteps: [{ on: '2026-05-01', weightLb: 90 }] }).map(point => point.y)).toEqual([0, 90, 90])
    expect(loadLine({ readings })).toEqual([])
  })

  it('has every reading and repair on its axis', () => {
    fc.assert(fc.property(fc.array(fc.integer({ min: 0, max: 4000 }), { minLength: 1, maxLength: 20 }), (days) => {
      const data = { readings: days.map(day => ({ takenOn: new Date(Date.UTC(2020, 0, 1 + day)).toISOString().slice(0, 10), value: 1, sigma: 0.1, segment: 1 })) }
      const { min, max } = timeRange(data)
      for (const { x } of [...readingPoints(data), ...errorBars(data)]) expect(x > min && x < max).toBe(true)
    }))
  })

  it('draws both charts on the same days, and names a repair with its day', () => {
    const data = { readings, trend, repairs: [{ on: '2026-06-01', label: 'Filled' }], loadSteps: [{ on: '2026-05-01', weightLb: 90 }] }
    const top = readingsChart(data, colours, true)
    const under = loadChart(data, colours, lb => lb)
    expect([top.options.xaxis?.min, top.options.xaxis?.max]).toEqual([under.options.xaxis?.min, under.options.xaxis?.max])
    expect(JSON.stringify(top.options.annotations).replaceAll('\u00A0', ' ')).toContain('Filled, 1 Jun 2026')
    expect(top.series.map(series => (series as { name: string }).name)).toEqual(['Range of the trend', 'Trend', 'Uncertainty', 'Reading'])
  })

  it('marks the reading that jumped', () => {
    const { options } = readingsChart({ readings, suddenOn: '2026-12-31' }, colours, false)
    expect(options.annotations?.points).toMatchObject([{ x: timeOf('2026-12-31'), y: 2, label: { text: 'jumped', textAnchor: 'end' } }])
    expect(readingsChart({ readings }, colours, false).options.annotations?.points).toEqual([])
  })

  it('draws no trend while there is none', () => {
    expect(readingsChart({ readings, trend: null }, colours, false).series.map(series => (series as { name: string }).name)).toEqual(['Uncertainty', 'Reading'])
  })

  it('shows the weight in the units of the reader', () => {
    const data = { readings, loadSteps: [{ on: '2026-05-01', weightLb: 100 }] }
    expect(JSON.stringify(loadChart(data, colours, lb => lb * 0.45359237).series)).toContain('45.359237')
  })

  it('reads a token as the charting library wants it', () => {
    expect(hexFromToken(' 30 40 45 ')).toBe('#1e282d')
    expect(hexFromToken('')).toBe('#000000')
  })
})

describe('pictures and places of a mark', () => {
  it('has a drawing of its own for every shape, and one for every kind', () => {
    expect(new Set(MARK_SHAPES.map(shape => shapeDrawing(shape).main)).size).toBe(MARK_SHAPES.length)
    for (const kind of MARK_KINDS) expect(shapeDrawing(kind).main).toMatch(/^M/)
  })

  it('says in words where the pin is', () => {
    expect(ceilingPinWords({ xShare: 0.5, yShare: 0.5 })).toBe('in the middle of the ceiling')
    expect(ceilingPinWords({ xShare: 0.5, yShare: 0.95 })).toBe('near the wall with the door')
    expect(ceilingPinWords({ xShare: 0.1, yShare: 0.1 })).toBe('in the corner of the wall across from the door and the wall on the left')
  })

  it('never lets the pin leave the ceiling', () => {
    fc.assert(fc.property(fc.double(), fc.double(), fc.constantFrom('ArrowLeft', 'ArrowRight', 'ArrowUp', 'ArrowDown'), (xShare, yShare, key) => {
      for (const pin of [clampPin({ xShare, yShare }), movePinByKey(clampPin({ xShare, yShare }), key)!]) {
        for (const share of [pin.xShare, pin.yShare]) expect(share >= 0 && share <= 1).toBe(true)
      }
    }))
    expect(movePinByKey({ xShare: 0.5, yShare: 0.5 }, 'Enter')).toBeNull()
  })

  it('draws too few readings as not yet known', () => {
    expect([activityTone('too-few-readings'), activityTone('active')]).toEqual(['unknown', 'active'])
  })
})

import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { clampPoint, insideOf, measureOf, nudge, pointName, toFrame, toPicture, wholePhoto, zoomAbout } from '../../../components/ceiling/photoView'
import { photoWidth } from '../../../shared/utils/movement/photoScale'

const picture = { width: 1200, height: 900 }
const frame = { width: 360, height: 300 }
const at = (xPx: number, yPx: number) => ({ xPx, yPx })

describe('the view of a photo', () => {
  it('shows all of it at first, in the middle of the frame', () => {
    const view = wholePhoto(picture, frame)
    expect(view.zoom).toBeCloseTo(0.3, 12)
    expect([toFrame(view, at(0, 0)), toFrame(view, at(1200, 900))]).toEqual([{ x: 0, y: expect.closeTo(15, 9) }, { x: expect.closeTo(360, 9), y: expect.closeTo(285, 9) }])
  })

  it('keeps the point under the finger where it is, as long as the picture fills the frame', () => {
    fc.assert(fc.property(fc.double({ min: 1, max: 3, noNaN: true }), fc.integer({ min: 0, max: 360 }), fc.integer({ min: 0, max: 300 }), (times, x, y) => {
      const view = { zoom: 1, xPx: 300, yPx: 200 }
      const before = toPicture(view, { x, y })
      const after = toPicture(zoomAbout(view, times, { x, y }, picture, frame), { x, y })
      expect(after.xPx).toBeCloseTo(before.xPx, 6)
      expect(after.yPx).toBeCloseTo(before.yPx, 6)
    }))
  })

  it('never loses the picture, nor comes closer than its dots are worth', () => {
    fc.assert(fc.property(fc.double({ min: 0.01, max: 50, noNaN: true }), fc.double({ min: -9999, max: 9999, noNaN: true }), fc.double({ min: -9999, max: 9999, noNaN: true }), (zoom, xPx, yPx) => {
      const view = insideOf({ zoom, xPx, yPx }, picture, frame)
      expect(view.zoom).toBeGreaterThanOrEqual(0.3 - 1e-12)
      expect(view.zoom).toBeLessThanOrEqual(12)
      const { xPx: left, yPx: top } = toPicture(view, { x: 180, y: 150 })
      return left >= 0 && left <= 1200 && top >= 0 && top <= 900
    }))
  })

  it('goes to the frame and back', () => {
    const view = { zoom: 2.5, xPx: 40, yPx: 60 }
    expect(toPicture(view, toFrame(view, at(123, 456)))).toEqual(at(123, 456))
  })
})

describe('points in a photo', () => {
  it('are the scale first, then pairs across the mark; a half pair waits', () => {
    const points = [at(0, 0), at(100, 0), at(1, 1), at(1, 4), at(9, 9)]
    expect(measureOf(points, 50, { photoId: 'p', widthPx: 1200, heightPx: 900 })).toEqual({ photoId: 'p', widthPx: 1200, heightPx: 900, a: at(0, 0), b: at(100, 0), distanceMm: 50, stations: [{ p: at(1, 1), q: at(1, 4) }] })
    expect(measureOf(points.slice(0, 1), 50, { photoId: 'p', widthPx: 1, heightPx: 1 })).toBeNull()
    for (const distanceMm of [null, 0, Number.NaN]) expect(measureOf(points, distanceMm, { photoId: 'p', widthPx: 1, heightPx: 1 })).toBeNull()
  })

  it('give the same width however the picture was zoomed when they were tapped', () => {
    fc.assert(fc.property(fc.double({ min: 0.3, max: 12, noNaN: true }), (zoom) => {
      const view = { zoom, xPx: 17, yPx: 5 }
      const tapped = [at(100, 100), at(500, 100), at(200, 300), at(200, 312), at(300, 300), at(300, 312), at(400, 300), at(400, 312)].map(point => toPicture(view, toFrame(view, point)))
      const given = measureOf(tapped, 40, { photoId: 'p', widthPx: 1200, heightPx: 900 })!
      const width = photoWidth(given, given.stations)
      if (width.kind === 'measured') expect(width.widthMm).toBeCloseTo(1.2, 8)
    }))
  })

  it('have names, stay inside, and move by a dot or by ten', () => {
    expect([0, 1, 2, 3, 4].map(pointName)).toEqual(['Scale, first end', 'Scale, second end', 'Place 1, one edge', 'Place 1, other edge', 'Place 2, one edge'])
    expect(clampPoint(at(-3, 950), picture)).toEqual(at(0, 900))
    expect([nudge(at(5, 5), 'ArrowUp', false), nudge(at(5, 5), 'ArrowRight', true), nudge(at(5, 5), 'a', false)]).toEqual([at(5, 4), at(15, 5), null])
  })
})

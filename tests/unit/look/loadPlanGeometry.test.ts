import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { fieldDepthFt, joistsUnder, nearerWall, placeInside, sizeInside, stepByKey } from '../../../components/attic/loadPlanGeometry'
import type { LoadPlanItem } from '../../../components/attic/loadPlanTypes'
import { itemWords, joistWords, wallWords } from '../../../components/attic/loadPlanWords'

const field = { spanFt: 14, spacingIn: 16, joistCount: 13 }
const paper: LoadPlanItem = { id: 'p', name: 'Paper', xFt: 6.5, yFt: 9.5, lengthFt: 2.5, widthFt: 1.5, weightLb: 165, state: 'over' }
const walls = { start: 'south wall', end: 'north wall' }
const format = { weight: (lb: number) => `${lb} lb`, length: (ft: number) => `${ft} ft` }

const anyField = fc.record({ spanFt: fc.integer({ min: 4, max: 30 }), spacingIn: fc.constantFrom(12, 16, 24), joistCount: fc.integer({ min: 3, max: 40 }) })
const size = fc.double({ min: 0.25, max: 2, noNaN: true })
const far = fc.double({ min: -100, max: 100, noNaN: true })

describe('the load plan', () => {
  it('is as deep as the joists are apart: 13 joists at 16 in make 16 ft', () => {
    expect(fieldDepthFt(field)).toBe(16)
    expect(fieldDepthFt({ ...field, joistCount: 1 })).toBe(0)
  })

  it('keeps an item inside its field wherever it is dragged', () => {
    fc.assert(fc.property(anyField, size, size, far, far, (f, lengthFt, widthFt, x, y) => {
      const place = placeInside(f, { xFt: 0, yFt: 0, lengthFt, widthFt }, x, y)
      expect(place.xFt).toBeGreaterThanOrEqual(0)
      expect(place.yFt).toBeGreaterThanOrEqual(0)
      expect(place.xFt + lengthFt).toBeLessThanOrEqual(f.spanFt + 1e-9)
      expect(place.yFt + widthFt).toBeLessThanOrEqual(fieldDepthFt(f) + 1e-9)
    }))
  })

  it('keeps an item inside its field however it is stretched, and never smaller than half a foot', () => {
    fc.assert(fc.property(anyField, far, far, (f, lengthFt, widthFt) => {
      const sized = sizeInside(f, { xFt: 1, yFt: 1, lengthFt: 1, widthFt: 1 }, lengthFt, widthFt)
      expect(Math.min(sized.lengthFt, sized.widthFt)).toBeGreaterThanOrEqual(0.5)
      expect(1 + sized.lengthFt).toBeLessThanOrEqual(f.spanFt)
      expect(1 + sized.widthFt).toBeLessThanOrEqual(fieldDepthFt(f) + 1e-9)
    }))
  })

  it('moves by half a foot a press, with Shift sizes by half a foot', () => {
    expect(stepByKey(field, paper, 'ArrowLeft', false)).toEqual({ kind: 'move', xFt: 6, yFt: 9.5 })
    expect(stepByKey(field, paper, 'ArrowDown', false)).toEqual({ kind: 'move', xFt: 6.5, yFt: 10 })
    expect(stepByKey(field, paper, 'ArrowRight', true)).toEqual({ kind: 'resize', lengthFt: 3, widthFt: 1.5 })
    expect(stepByKey(field, paper, 'ArrowUp', true)).toEqual({ kind: 'resize', lengthFt: 2.5, widthFt: 1 })
  })

  it('does nothing at the edge, and nothing for other keys', () => {
    expect(stepByKey(field, { ...paper, xFt: 0 }, 'ArrowLeft', false)).toBeNull()
    expect(stepByKey(field, { ...paper, widthFt: 0.5 }, 'ArrowUp', true)).toBeNull()
    expect(stepByKey(field, paper, 'a', false)).toBeNull()
  })

  it('names the joists an item stands on or between', () => {
    expect(joistsUnder(field, paper)).toEqual({ from: 8, to: 10 })
    expect(joistsUnder(field, { ...paper, yFt: 0, widthFt: 16 / 12 })).toEqual({ from: 1, to: 2 })
    expect(joistWords(field, { ...paper, yFt: 16, widthFt: 0 })).toBe('joist 13')
  })

  it('measures from the nearer wall', () => {
    expect(nearerWall(field, paper)).toEqual({ wall: 'end', distanceFt: 5 })
    expect(wallWords(field, walls, { ...paper, xFt: 0 }, format)).toBe('against the south wall')
    expect(wallWords(field, walls, { ...paper, xFt: 2 }, format)).toBe('2 ft from the south wall')
  })

  it('says in words all that the drawing shows of an item', () => {
    expect(itemWords(field, walls, paper, format)).toBe('Paper, 165 lb, over: 5 ft from the north wall, on joists 8 to 10')
  })
})

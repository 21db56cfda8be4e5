import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { fieldDepthFt, isArrow, isChange, joistsUnder, moveTogether, nearerWall, sizeFromCorner, stepByKey, turnInside } from '../../../components/attic/loadPlanGeometry'
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

  it('keeps everything inside its field wherever it is dragged, and apart as it was', () => {
    fc.assert(fc.property(anyField, fc.array(fc.record({ lengthFt: size, widthFt: size, x: fc.double({ min: 0, max: 1, noNaN: true }), y: fc.double({ min: 0, max: 1, noNaN: true }) }), { minLength: 1, maxLength: 4 }), far, far, (f, list, dx, dy) => {
      const depth = fieldDepthFt(f)
      const items = list.map(({ x, y, ...rest }, index) => ({ id: String(index), ...rest, xFt: x * (f.spanFt - rest.lengthFt), yFt: y * (depth - rest.widthFt) }))
      const moved = moveTogether(f, items, items[0]!, dx, dy)
      moved.forEach((place, index) => {
        const item = items[index]!
        expect(place.xFt!).toBeGreaterThanOrEqual(-1e-9)
        expect(place.yFt!).toBeGreaterThanOrEqual(-1e-9)
        expect(place.xFt! + item.lengthFt).toBeLessThanOrEqual(f.spanFt + 1e-9)
        expect(place.yFt! + item.widthFt).toBeLessThanOrEqual(depth + 1e-9)
        expect(place.xFt! - moved[0]!.xFt!).toBeCloseTo(item.xFt - items[0]!.xFt, 9)
      })
    }))
  })

  it('a single item lands on the half-foot grid, or at the edge', () => {
    expect(moveTogether(field, [paper], paper, 1.1, -0.2)).toEqual([{ id: 'p', xFt: 7.5, yFt: 9.5 }])
    expect(moveTogether(field, [paper], paper, 90, -90)).toEqual([{ id: 'p', xFt: 11.5, yFt: 0 }])
  })

  it('keeps an item inside its field whichever corner is pulled how far, never smaller than half a foot, the other corner where it was', () => {
    const corner = fc.record({ x: fc.constantFrom('start' as const, 'end' as const), y: fc.constantFrom('first' as const, 'last' as const) })
    fc.assert(fc.property(anyField, corner, far, far, (f, pulled, dx, dy) => {
      const before = { xFt: 1, yFt: 1, lengthFt: 1, widthFt: 1 }
      const sized = sizeFromCorner(f, before, pulled, dx, dy)
      expect(Math.min(sized.lengthFt, sized.widthFt)).toBeGreaterThanOrEqual(0.5)
      expect(Math.min(sized.xFt, sized.yFt)).toBeGreaterThanOrEqual(0)
      expect(sized.xFt + sized.lengthFt).toBeLessThanOrEqual(f.spanFt + 1e-9)
      expect(sized.yFt + sized.widthFt).toBeLessThanOrEqual(fieldDepthFt(f) + 1e-9)
      expect(pulled.x === 'end' ? sized.xFt : sized.xFt + sized.lengthFt).toBeCloseTo(pulled.x === 'end' ? 1 : 2, 9)
      expect(pulled.y === 'last' ? sized.yFt : sized.yFt + sized.widthFt).toBeCloseTo(pulled.y === 'last' ? 1 : 2, 9)
    }))
  })

  it('turns an item inside the field, and not where it would not fit', () => {
    expect(turnInside(field, { xFt: 12, yFt: 0, lengthFt: 1, widthFt: 3 })).toEqual({ xFt: 11, yFt: 0, lengthFt: 3, widthFt: 1 })
    expect(turnInside(field, { xFt: 0, yFt: 0, lengthFt: 1, widthFt: 15 })).toBeNull()
  })

  it('moves by half a foot a press, with Shift sizes by half a foot', () => {
    expect(stepByKey(field, [paper], 'ArrowLeft', false)).toEqual([{ id: 'p', xFt: 6, yFt: 9.5 }])
    expect(stepByKey(field, [paper], 'ArrowDown', false)).toEqual([{ id: 'p', xFt: 6.5, yFt: 10 }])
    expect(stepByKey(field, [paper], 'ArrowRight', true)).toEqual([{ id: 'p', lengthFt: 3 }])
    expect(stepByKey(field, [paper], 'ArrowUp', true)).toEqual([{ id: 'p', widthFt: 1 }])
  })

  it('moves several as one: the first that meets a wall stops them all', () => {
    const tools = { ...paper, id: 't', xFt: 0, yFt: 0 }
    expect(stepByKey(field, [paper, tools], 'ArrowRight', false).map(change => change.xFt)).toEqual([7, 0.5])
    expect(stepByKey(field, [paper, tools], 'ArrowLeft', false)).toEqual([])
  })

  it('does nothing at the edge, and nothing for other keys', () => {
    expect(stepByKey(field, [{ ...paper, xFt: 0 }], 'ArrowLeft', false)).toEqual([])
    expect(stepByKey(field, [{ ...paper, widthFt: 0.5 }], 'ArrowUp', true)).toEqual([])
    expect(stepByKey(field, [paper], 'a', false)).toEqual([])
    expect(stepByKey(field, [], 'ArrowUp', false)).toEqual([])
    expect([isArrow('ArrowUp'), isArrow('Enter')]).toEqual([true, false])
    expect(isChange([paper], [{ id: 'p', xFt: 6.5 }])).toBe(false)
    expect(isChange([paper], [{ id: 'other', xFt: 1 }])).toBe(false)
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
    expect(itemWords(field, walls, { ...paper, state: 'near', dense: true }, format)).toBe('Paper, 165 lb, near, too dense for the middle: 5 ft from the north wall, on joists 8 to 10')
    expect(itemWords(field, walls, paper, format)).toBe('Paper, 165 lb, over: 5 ft from the north wall, on joists 8 to 10')
  })
})

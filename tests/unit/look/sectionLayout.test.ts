import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { roofDepthPx, roofYAt } from '../../../components/house/sectionFrame'
import { sectionLayout } from '../../../components/house/sectionLayout'
import { isUnderRoof, overlap } from '../../../components/house/sectionLabels'
import { joinNearest, spread } from '../../../components/house/sectionSpread'
import type { Box, SectionContent, SectionDrawing } from '../../../components/house/sectionTypes'
import { fitText, textWidth } from '../../../components/house/textWidth'

const share = fc.double({ min: 0, max: 1, noNaN: true })
const word = fc.string({ minLength: 1, maxLength: 24 })
const content: fc.Arbitrary<SectionContent> = fc.record({
  rooms: fc.array(fc.record({ name: word, widthShare: fc.double({ min: 0.05, max: 1, noNaN: true }), bearingAfter: fc.boolean() }), { minLength: 1, maxLength: 8 }),
  loads: fc.array(fc.record({
    id: fc.uuid(), label: word, weightText: fc.constant('165 lb'), weightLb: fc.double({ min: 0, max: 3000, noNaN: true }),
    state: fc.constantFrom('within' as const, 'near' as const, 'over' as const), positionShare: share, widthShare: share, ratingShare: fc.double({ min: 0, max: 9, noNaN: true }),
  }), { maxLength: 30 }),
  marks: fc.array(fc.record({
    id: fc.uuid(), label: word, positionShare: share, kind: fc.constantFrom('crack' as const, 'nail-pops' as const, 'sag' as const, 'stain' as const),
    activity: fc.constantFrom('dormant' as const, 'watch' as const, 'active' as const, 'unknown' as const),
  }), { maxLength: 30 }),
})
const widthPx = fc.integer({ min: 300, max: 1200 })

function pairs<T>(things: readonly T[]): [T, T][] {
  return things.flatMap((a, i) => things.slice(i + 1).map(b => [a, b] as [T, T]))
}

const holds = (check: (drawing: SectionDrawing, input: SectionContent) => void) =>
  fc.assert(fc.property(content, widthPx, (input, width) => check(sectionLayout(input, width, 'strip'), input)), { numRuns: 300 })

describe('the section through a home', () => {
  it('never lets two labels overlap, room names included', () => {
    holds((drawing) => {
      const boxes: Box[] = [...drawing.labels, ...drawing.roomNames]
      for (const [a, b] of pairs(boxes)) expect(overlap(a, b)).toBe(false)
    })
  })

  it('never lets a label in the attic touch the roof', () => {
    holds((drawing) => {
      for (const label of drawing.labels.filter(l => l.y < drawing.joistTopY)) {
        expect(isUnderRoof(drawing, label) || label.key).toBe(true)
        expect(label.y).toBeGreaterThanOrEqual(roofYAt(drawing, label.x) - 0.001)
        expect(label.y).toBeGreaterThanOrEqual(roofYAt(drawing, label.x + label.w) - 0.001)
      }
    })
  })

  it('keeps every block under the roof, on the joists and clear of the others', () => {
    holds((drawing) => {
      for (const block of drawing.blocks) {
        expect(block.y + block.h).toBeCloseTo(drawing.joistTopY, 6)
        expect(block.y).toBeGreaterThanOrEqual(Math.max(roofYAt(drawing, block.x), roofYAt(drawing, block.x + block.w)) + roofDepthPx - 0.001)
        expect(block.h).toBeGreaterThan(17)
      }
      for (const [a, b] of pairs(drawing.blocks)) expect(overlap(a, b)).toBe(false)
    })
  })

  it('keeps labels off strokes, walls and the blocks of others', () => {
    holds((drawing) => {
      for (const label of drawing.labels.filter(l => !l.key)) {
        for (const solid of [...drawing.blocks, ...drawing.strokes]) expect(overlap(label, solid)).toBe(false)
        if (label.y > drawing.ceilingY) for (const wall of drawing.walls) expect(label.x < wall.x && wall.x < label.x + label.w).toBe(false)
      }
    })
  })

  it('says every load and mark either in the drawing or in the legend', () => {
    holds((drawing) => {
      const named = drawing.labels.filter(label => !label.key).length
      expect(named + drawing.legend.length).toBe(drawing.blocks.length + drawing.strokes.length)
    })
  })

  it('joins neighbours when there are too many, and loses no weight', () => {
    holds((drawing, input) => {
      const drawn = drawing.blocks.reduce((sum, block) => sum + block.id.split('+').length, 0)
      expect(drawn).toBe(input.loads.length)
    })
  })

  it('stays on the sheet, in both sizes', () => {
    fc.assert(fc.property(content, (input) => {
      for (const drawing of [sectionLayout(input, 344, 'strip'), sectionLayout(input, 186, 'thumb')]) {
        for (const box of [...drawing.blocks, ...drawing.strokes, ...drawing.labels, ...drawing.roomNames]) {
          expect(box.x).toBeGreaterThanOrEqual(0)
          expect(box.x + box.w).toBeLessThanOrEqual(drawing.widthPx)
          expect(box.y).toBeGreaterThanOrEqual(0)
          expect(box.y + box.h).toBeLessThanOrEqual(drawing.heightPx)
        }
      }
    }), { numRuns: 100 })
  })

  it('labels the four loads of an ordinary attic in the drawing itself, at desk width', () => {
    const load = (id: string, label: string, positionShare: number, state: 'within' | 'near' | 'over') => ({ id, label, weightText: '150 lb', weightLb: 150, positionShare, state })
    const drawing = sectionLayout({
      rooms: [{ name: 'Bedroom', widthShare: 1 }],
      loads: [load('a', 'tools', 0.14, 'within'), load('b', 'clothes', 0.28, 'near'), load('c', 'books', 0.38, 'within'), load('d', 'paper', 0.67, 'over')],
      marks: [],
    }, 1080, 'strip')
    expect(drawing.labels.map(label => label.text).sort()).toEqual(['books 150 lb', 'clothes 150 lb', 'paper 150 lb', 'tools 150 lb'])
    expect(drawing.legend).toEqual([])
  })

  it('gives the place in the drawing to what is over before what is within', () => {
    const drawing = sectionLayout({
      rooms: [],
      loads: ['within', 'over', 'within'].map((state, i) => ({ id: String(i), label: `name ${i}`, weightText: '90 lb', weightLb: 90, positionShare: 0.48 + i * 0.02, state: state as 'within' | 'over' })),
      marks: [],
    }, 344, 'strip')
    expect(drawing.labels.find(label => !label.key)?.tone).toBe('over')
  })

  it('draws an empty home as an empty home', () => {
    const drawing = sectionLayout({ rooms: [], loads: [], marks: [] }, 344, 'strip')
    expect([drawing.blocks, drawing.strokes, drawing.labels, drawing.walls]).toEqual([[], [], [], []])
  })
})

describe('spreading along a line', () => {
  it('keeps order, limits and gaps whenever the things fit', () => {
    fc.assert(fc.property(fc.array(fc.record({ x: fc.integer({ min: -50, max: 600 }), w: fc.integer({ min: 1, max: 40 }) }), { maxLength: 10 }), (things) => {
      const out = spread(things, 0, 500, 5)
      for (let i = 0; i < out.length; i++) {
        expect(out[i]!.x).toBeGreaterThanOrEqual(0)
        expect(out[i]!.x + out[i]!.w).toBeLessThanOrEqual(500)
        if (i > 0) expect(out[i]!.x - out[i - 1]!.x - out[i - 1]!.w).toBeGreaterThanOrEqual(5)
      }
    }))
  })

  it('leaves alone what has room already', () => {
    expect(spread([{ x: 10, w: 5 }, { x: 40, w: 5 }], 0, 100, 5)).toEqual([{ x: 10, w: 5 }, { x: 40, w: 5 }])
  })

  it('joins the two nearest first', () => {
    expect(joinNearest([1, 10, 11, 30], 3, n => n, (a, b) => (a + b) / 2)).toEqual([1, 10.5, 30])
  })
})

describe('fitting a text', () => {
  /** Measured in Chromium on a canvas, Nunito Sans 600 as shipped by @fontsource/nunito-sans 5.3.0, in em. */
  it.each([
    ['tools 140 lb', 5.498], ['clothes 150 lb', 6.513], ['winter clothes, 6 totes 1,940 lb', 14.207], ['Living room', 5.353], ['2.1 mm', 3.432],
    ['MMMM', 3.444], ['WWWW', 4.428], ['illicit', 2.173], ['5 pops', 3.094], ['Bathroom', 4.522], ['0123456789', 6],
    ['abcdefghijklmnopqrstuvwxyz', 13.385], ['ABCDEFGHIJKLMNOPQRSTUVWXYZ', 17.338], ['łąßé', 2.215], ['Æ—…·×½', 4.394],
  ])('never thinks "%s" narrower than it is, nor wider by more than half', (text, em) => {
    expect(textWidth(text, 1)).toBeGreaterThanOrEqual(em)
    expect(textWidth(text, 1)).toBeLessThan(em * 1.5)
  })

  it('yields a text that fits, or none', () => {
    fc.assert(fc.property(word, fc.integer({ min: 0, max: 300 }), (text, room) => {
      const fitted = fitText(text, 14, room)
      expect(fitted === '' || textWidth(fitted, 14) <= room).toBe(true)
    }))
  })
})

import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import type { LoadField, PlacedItem } from '../../../shared/types/loadPlan'
import { judgeLoadPlan } from '../../../shared/utils/structure/judgeLoadPlan'
import { suggestMoves } from '../../../shared/utils/structure/suggestMoves'
import type { SuggestedMove } from '../../../shared/utils/structure/suggestMoves'

const field: LoadField = { spanFt: 12, spacingIn: 16, joistCount: 13, ratedPsf: 20, joistEiLbIn2: 1.6e6 * 47.63, strongbacks: [] }
const options = { member: { depthIn: 7.25, shearLb: 1300, bearingLb: 1400, deadPsf: 8 } }
const books: PlacedItem = { id: 'books', xFt: 4.5, yFt: 6, lengthFt: 2.5, widthFt: 3, weightLb: 540 }
const light: PlacedItem = { id: 'light', xFt: 0, yFt: 0, lengthFt: 2, widthFt: 2, weightLb: 20 }

function movesFor(items: PlacedItem[], on = field): SuggestedMove[] {
  const answer = suggestMoves(on, items, options)
  return answer.kind === 'moves' ? answer.moves : expect.fail(answer.kind)
}
const after = (items: PlacedItem[], moves: SuggestedMove[]) => {
  const plan = judgeLoadPlan(field, items.map(item => ({ ...item, ...moves.findLast(move => move.id === item.id) })), options)
  return plan.kind === 'judged' ? plan : expect.fail(plan.kind)
}

describe('what to move where', () => {
  it('an overloaded middle is mended by carrying the heavy thing to a bearing wall', () => {
    const [move, ...more] = movesFor([light, books])
    expect(more).toEqual([])
    expect(move).toMatchObject({ id: 'books', fromWallFt: 0 })
    expect(move!.state).not.toBe('over')
    expect(after([light, books], [move!]).utilisation).toBeCloseTo(move!.utilisation, 10)
  })

  it('two heavy things in the middle take two moves, each told with what stands after it', () => {
    const items = [{ ...books, yFt: 1 }, { ...books, id: 'tools', yFt: 10 }]
    const moves = movesFor(items)
    expect(new Set(moves.map(move => move.id))).toEqual(new Set(['books', 'tools']))
    expect(moves.at(-1)!.state).not.toBe('over')
    expect(moves.at(-1)!.utilisation).toBeLessThanOrEqual(moves[0]!.utilisation)
  })

  it('a thing too dense for the middle is moved although the joists pass', () => {
    const dense = { ...light, id: 'dense', xFt: 5, yFt: 5, lengthFt: 1, widthFt: 1, weightLb: 25 }
    expect(movesFor([dense]).map(move => move.id)).toEqual(['dense'])
  })

  it('a pile too long for the quarter at the wall is turned', () => {
    const [move] = movesFor([{ ...books, lengthFt: 5, widthFt: 3 }])
    expect(move).toMatchObject({ turned: true, lengthFt: 3, widthFt: 5, fromWallFt: 0, itemState: 'within' })
  })

  it('what no place of its own field takes is carried over to another, and only then', () => {
    const long = { ...books, xFt: 0, lengthFt: 12, widthFt: 4, weightLb: 2000 }
    const other = { number: 2, field: { ...field, spanFt: 16, joistCount: 20, ratedPsf: 60 }, items: [], options }
    const answer = suggestMoves(field, [long], options, [other])
    expect(answer).toMatchObject({ kind: 'moves', moves: [{ id: 'books', toField: 2 }] })
    expect(suggestMoves(field, [long], options, [{ ...other, field: { ...field, spanFt: 5 } }])).toEqual({ kind: 'no-better-place' })
    expect(suggestMoves(field, [books], options, [other])).toMatchObject({ moves: [{ toField: null }] })
  })

  it('more than the rated total is carried over to another field, which it may not bring over', () => {
    const piles = Array.from({ length: 8 }, (_, n): PlacedItem => ({ id: `pile ${n}`, xFt: n % 2 === 0 ? 0 : 9, yFt: Math.floor(n / 2) * 4, lengthFt: 3, widthFt: 4, weightLb: 500 }))
    const other = { number: 2, field, items: [], options }
    const answer = suggestMoves(field, piles, options, [other])
    expect(answer).toMatchObject({ kind: 'moves', moves: [{ toField: 2, state: expect.stringMatching(/within|near/) }] })
    expect(suggestMoves(field, piles, options, [{ ...other, items: piles }])).toMatchObject({ kind: 'too-much' })
  })

  it('never makes it worse, and every suggestion can be carried out', () => {
    const item = fc.record({ x: fc.nat(18), y: fc.nat(24), lengthFt: fc.constantFrom(1, 2, 3), widthFt: fc.constantFrom(1, 2, 3), weightLb: fc.integer({ min: 10, max: 500 }) })
      .map(({ x, y, ...rest }): PlacedItem => ({ id: '', ...rest, xFt: x / 2, yFt: y / 2 }))
    fc.assert(fc.property(fc.array(item, { minLength: 1, maxLength: 5 }), (list) => {
      const items = list.map((one, index) => ({ ...one, id: String(index) }))
      const answer = suggestMoves(field, items, options)
      if (answer.kind !== 'moves') return
      const [before, then] = [after(items, []), after(items, answer.moves)]
      const dense = (plan: typeof before) => plan.items.filter(one => one.heavyInMiddle).length
      expect(dense(then) < dense(before) || then.utilisation < before.utilisation).toBe(true)
      expect(then.utilisation).toBeCloseTo(answer.moves.at(-1)!.utilisation, 10)
    }), { numRuns: 30 })
  })

  it('says so where nothing is wrong, nothing helps, or nothing may be stored', () => {
    expect(suggestMoves(field, [light], options)).toEqual({ kind: 'nothing-to-mend' })
    const rated = 20 * 12 * 16
    expect(suggestMoves(field, [{ ...books, weightLb: rated + 100 }], options)).toEqual({ kind: 'too-much', overLb: expect.closeTo(100, 6) })
    expect(suggestMoves(field, [{ ...books, xFt: 0, yFt: 6, lengthFt: 12, widthFt: 4, weightLb: 2000 }], options)).toEqual({ kind: 'no-better-place' })
    expect(suggestMoves({ ...field, ratedPsf: 0 }, [light], options)).toEqual({ kind: 'nothing-allowed' })
    expect(suggestMoves(field, [{ ...light, xFt: -1 }], options)).toMatchObject({ kind: 'refused' })
  })
})

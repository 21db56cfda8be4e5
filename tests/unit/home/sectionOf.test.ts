import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { sectionLayout } from '../../../components/house/sectionLayout'
import { contentsOf, itemVerdicts } from '../../../shared/utils/upkeep/itemVerdicts'
import { markValueWords, sectionOf } from '../../../shared/utils/upkeep/sectionOf'
import { attic, item, mark, parts, room, survey } from './parts'

const plain = (text: string) => text.replaceAll('\u00A0', ' ')

describe('the rooms of a section', () => {
  it('stand side by side in their order, by length', () => {
    expect(sectionOf(parts({ rooms: [room('bed', { lengthFt: 10 }), room('hall', { lengthFt: 30 })] })).rooms).toEqual([{ name: 'bed', widthShare: 0.25 }, { name: 'hall', widthShare: 0.75 }])
  })

  it('take the usual length where nobody has measured, and equal ones where nobody has at all', () => {
    const some = sectionOf(parts({ rooms: [room('a', { lengthFt: 10 }), room('b', { lengthFt: 20 }), room('c', { lengthFt: null, widthFt: null })] })).rooms
    expect(some.map(({ widthShare }) => Number(widthShare.toFixed(4)))).toEqual([0.2222, 0.4444, 0.3333])
    const none = sectionOf(parts({ rooms: [room('a', { lengthFt: null, widthFt: null }), room('b', { lengthFt: null, widthFt: null })] })).rooms
    expect(none.map(({ widthShare }) => widthShare)).toEqual([0.5, 0.5])
    expect(sectionOf(parts({ rooms: [] })).rooms).toEqual([])
  })
})

describe('the loads of a section', () => {
  it('stand by their place across the joists: 11 joists at 24 in are 20 ft', () => {
    const [load] = sectionOf(parts({ attics: [attic({ items: [item('box', { yFt: 4, widthFt: 2 })] })] })).loads
    expect([load!.positionShare, load!.widthShare]).toEqual([0.25, 0.1])
  })

  it('weigh all pieces of their line', () => {
    const [load] = sectionOf(parts({ attics: [attic({ items: [item('books', { quantity: 12, typicalLb: 45 })] })] })).loads
    expect([load!.weightLb, plain(load!.weightText), load!.label]).toEqual([540, '540 lb', 'books'])
    const [metric] = sectionOf(parts({ attics: [attic({ items: [item('books', { quantity: 12, typicalLb: 45 })] })] }), { system: 'metric' }).loads
    expect(plain(metric!.weightText)).toBe('245 kg')
  })

  it('of several fields and attics stand beside each other', () => {
    const field = { spanFt: 12, spacingIn: 24, joistCount: 11 }
    const drawn = sectionOf(parts({ attics: [
      attic({ id: 'one', fields: [field, field], items: [item('a'), item('b', { fieldNumber: 2 })] }),
      attic({ id: 'two', fields: [field, field], items: [item('c'), item('d', { fieldNumber: 2 })] }),
    ] })).loads
    expect(drawn.map(load => load.positionShare)).toEqual([1 / 80, 21 / 80, 41 / 80, 61 / 80])
  })

  it('keep inside the drawing where a field is not measured, or a thing stands beyond it', () => {
    const drawn = sectionOf(parts({ attics: [attic({ fields: [], surveyedOn: null, loadState: 'unsurveyed', items: [item('far', { yFt: 90, widthFt: 4 }), item('third', { fieldNumber: 3 })] })] })).loads
    for (const load of drawn) expect(load.positionShare > 0 && load.positionShare < 1).toBe(true)
  })

  it('carry their attic\'s state: not rated without a survey, over wherever nothing may be stored', () => {
    const state = (changes: Parameters<typeof attic>[0]) => sectionOf(parts({ attics: [attic({ items: [item('box')], ...changes })] })).loads[0]!.state
    expect([state({ loadState: 'within' }), state({ loadState: 'near' }), state({ loadState: 'over' }), state({ loadState: 'hold' }), state({ loadState: 'unsurveyed' }), state({ loadState: null })])
      .toEqual(['within', 'near', 'over', 'over', 'unknown', 'unknown'])
  })

  it('carry their own verdict where the joists were judged: a heavy pile in the middle is over, a box at the wall is not', () => {
    const loaded = attic({ loadState: 'over', utilisation: 1.6, survey: survey(), documents: [], items: [
      item('safe', { typicalLb: 900, lowLb: 900, highLb: 900, xFt: 5, yFt: 15, weightSource: 'weighed' }), item('box', { typicalLb: 30, lowLb: 30, highLb: 30, yFt: 2, weightSource: 'weighed' }),
    ] })
    const verdicts = itemVerdicts([{ attic: loaded, contents: contentsOf(loaded) }])
    const drawn = sectionOf(parts({ attics: [loaded] }), { verdicts }).loads
    expect(drawn.map(load => [load.id, load.state])).toEqual([['safe', 'over'], ['box', 'within']])
    expect(drawn[0]!.ratingShare).toBeGreaterThan(1)
  })

  it('on trusses or under a hold are over without any share of a rating', () => {
    for (const answers of [survey({ framing: 'trusses' }), survey({ conditions: ['wet'] })]) {
      const full = attic({ survey: answers, documents: [], items: [item('box')] })
      expect([...itemVerdicts([{ attic: full, contents: contentsOf(full) }])]).toEqual([['box', { state: 'over', utilisation: null }]])
    }
  })

  it('in an unsurveyed attic have no verdict of their own', () => {
    const unknown = attic({ survey: null, items: [item('box')] })
    expect(itemVerdicts([{ attic: unknown, contents: contentsOf(unknown) }]).size).toBe(0)
  })
})

describe('the marks of a section', () => {
  it('hang in their room where the pin is along it', () => {
    const drawn = sectionOf(parts({ marks: [mark('a', { roomId: 'hall', pinX: 0.5 }), mark('b', { roomId: 'bed', pinX: 0 })] })).marks
    expect(drawn.map(({ positionShare }) => positionShare)).toEqual([0.75, 0])
    expect(drawn[0]!.name).toBe('Crack 1, hall')
  })

  it('are the open ones; one whose room is gone hangs in the middle', () => {
    const drawn = sectionOf(parts({ marks: [mark('a', { state: 'repaired' }), mark('b', { state: 'closed' }), mark('c', { roomId: 'gone' })] })).marks
    expect(drawn.map(({ id, positionShare, name }) => [id, positionShare, name])).toEqual([['c', 0.5, 'Crack 1']])
  })

  it.each([
    [{ kind: 'crack', lastValue: 2.1 }, '2.1 mm'], [{ kind: 'nail-pops', lastValue: 5 }, '5 pops'], [{ kind: 'nail-pops', lastValue: 1 }, '1 pop'], [{ kind: 'sag', lastValue: 12 }, '12 mm'],
    [{ kind: 'stain', lastValue: 300, stainState: 'damp' }, 'damp'], [{ kind: 'stain', lastValue: 300 }, '300 mm'], [{ kind: 'crack', lastValue: null }, 'not read yet'],
  ] as const)('say their last reading: %o', (changes, words) => {
    expect(plain(markValueWords(mark('a', changes)))).toBe(words)
  })
})

describe('a section of any home', () => {
  it('has every share between 0 and 1 and can be laid out', () => {
    const size = fc.option(fc.double({ min: 0.5, max: 200, noNaN: true }), { nil: null })
    const rooms = fc.array(fc.record({ lengthFt: size, widthFt: size }), { maxLength: 6 }).map(list => list.map((sizes, i) => room(`r${i}`, sizes)))
    const items = fc.array(fc.record({ yFt: fc.double({ min: 0, max: 200, noNaN: true }), widthFt: fc.double({ min: 0.1, max: 40, noNaN: true }), fieldNumber: fc.integer({ min: 1, max: 20 }) }), { maxLength: 8 })
      .map(list => list.map((place, i) => item(`i${i}`, place)))
    const marks = fc.array(fc.record({ pinX: fc.double({ min: 0, max: 1, noNaN: true }), roomId: fc.constantFrom('r0', 'r1', 'gone') }), { maxLength: 8 }).map(list => list.map((place, i) => mark(`m${i}`, place)))
    fc.assert(fc.property(rooms, items, marks, (roomList, itemList, markList) => {
      const drawn = sectionOf({ rooms: roomList, attics: [attic({ items: itemList })], marks: markList })
      for (const { positionShare } of [...drawn.loads, ...drawn.marks]) expect(positionShare >= 0 && positionShare <= 1 + 1e-9).toBe(true)
      expect(sectionLayout(drawn, 600, 'strip').blocks.length).toBeLessThanOrEqual(itemList.length)
    }), { numRuns: 60 })
  })
})

import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { readInventoryList, writeInventoryList } from '../../../server/utils/inventoryList'
import type { AtticItemValue } from '../../../shared/schemas/atticItem'
import type { StoredItem } from '../../../shared/types/item'
import { keptDespiteProblem, suspectedContents } from '../../../shared/utils/goods/refusals'
import { leaningSentence } from '../../../shared/utils/messages/goodsMessages'
import { item, survey } from '../attic/attics'

const TODAY = '2026-12-01'
const read = (csv: string, known = { survey: null as ReturnType<typeof survey> | null, today: TODAY }) => readInventoryList(csv, known)
const refusal = (csv: string) => {
  try { read(csv) }
  catch (error) { return (error as { data: { fields: Record<string, string> } }).data.fields.csv }
  return undefined
}
const listed = ({ id: _id, version: _version, removedOn: _removedOn, ...facts }: StoredItem): AtticItemValue => ({ ...facts, photoIds: [] })

describe('a list written out', () => {
  it('reads back exactly, whatever the names and notes are', () => {
    const text = fc.oneof(fc.string({ maxLength: 40 }), fc.constantFrom('=1+1', '@SUM(A1)', '-3 boxes', '+ more', '\'quoted', '\'=x', 'a,b', 'a"b', 'a;b', 'line\nbreak', 'Ærø łódź'))
      .map(value => value.replace(/\p{Cc}/gu, ' ').trim())
    const pound = fc.double({ min: 0.01, max: 900, noNaN: true })
    fc.assert(fc.property(fc.array(fc.record({ name: text.filter(name => name !== ''), notes: text, lb: pound, xFt: fc.double({ min: 0, max: 9, noNaN: true }) }), { minLength: 1, maxLength: 6 }), (things) => {
      const items = things.map(({ name, notes, lb, xFt }) => item({ name, notes, lowLb: lb, typicalLb: lb, highLb: lb, xFt }))
      const back = read(writeInventoryList(items, 'us'))
      expect(back.rows.flatMap(row => row.problems)).toEqual([])
      expect(back.items).toEqual(items.map(listed))
    }), { numRuns: 200, seed: 20261201 })
  })

  it('reads back in metric to a billionth', () => {
    const stored = item({ typicalLb: 37.123456789, lowLb: 30, highLb: 55, weightSource: 'estimate', xFt: 3.3, heightFt: null })
    const [back] = read(writeInventoryList([stored], 'metric')).items
    expect(back).toMatchObject({ name: stored.name, heightFt: null, weightSource: 'estimate' })
    for (const key of ['typicalLb', 'lowLb', 'highLb', 'xFt', 'lengthFt'] as const) expect(back![key]).toBeCloseTo(stored[key], 9)
  })

  it('lets no spreadsheet run what somebody typed', () => {
    const cells = writeInventoryList([item({ name: '=HYPERLINK("x")', notes: '@cmd' })], 'us').split('\r\n')[1]!
    expect(cells).toContain('\'=HYPERLINK')
    expect(cells).toContain('\'@cmd')
  })
})

describe('a list read in', () => {
  it('takes our columns in any order, with comma, semicolon or tab, and a mark at the beginning', () => {
    for (const mark of [',', ';', '\t']) {
      const { items, good } = read(`\uFEFF${['Length_ft', 'name', 'width_ft', 'Weight_lb', 'weight_source'].join(mark)}\r\n${['2', 'Boxes', '2', '30', 'weighed'].join(mark)}\r\n`)
      expect([good, items[0]]).toMatchObject([1, { name: 'Boxes', typicalLb: 30, lowLb: 30, highLb: 30, lengthFt: 2, placedOn: TODAY, belongsTo: 'landlord', quantity: 1 }])
    }
  })

  it('takes each measure in the unit its column says', () => {
    const { items } = read('name,weight_kg,length_cm,width_in\nBox,10,100,24\n')
    expect(items[0]).toMatchObject({ lengthFt: expect.closeTo(3.2808, 4), widthFt: expect.closeTo(2, 9), highLb: expect.closeTo(2 * 22.0462, 3) })
  })

  it('counts a bare weight as a guess, wide and on the safe side', () => {
    const { items } = read('name,weight_lb,length_ft,width_ft\nBox,20,2,2\n')
    expect(items[0]).toMatchObject({ weightSource: 'estimate', lowLb: 16, typicalLb: 24, highLb: 40 })
  })

  it('names every bad row with its line and each column that is wrong, and stores none of them', () => {
    const { rows, good, bad, items } = read([
      'name,weight_lb,length_ft,width_ft,there_since,whose,pieces', 'Fine,20,2,2,2026-11-01,tenant,2', ',20,2,2,2026-11-01,tenant,1', 'Heavy,"1,5",2,2,2026-11-01,tenant,1',
      'Wide,20,-2,2,soon,nobody,1.5', '', 'Late,20,2,2,2027-01-01,landlord,1',
    ].join('\n'))
    expect([good, bad, items.length]).toEqual([1, 4, 1])
    expect(rows.filter(row => row.problems.length > 0).map(row => [row.line, row.problems.map(wrong => wrong.column)])).toEqual([
      [3, ['name']], [4, ['weight_lb']], [5, ['whose', 'pieces', 'length', 'there_since']], [7, ['there_since']],
    ])
  })

  it('refuses what would stand outside the measured joists', () => {
    const { rows } = read('name,weight_lb,length_ft,width_ft,from_wall_ft,across_ft,joists\nBox,20,2,2,11,0,1\nBox,20,2,2,0,15.5,1\nBox,20,2,2,0,0,3\n', { survey: survey(), today: TODAY })
    expect(rows.map(row => row.problems.map(wrong => wrong.column))).toEqual([['from_wall'], ['across'], ['joists']])
  })

  it('asks for a reason where something does not belong in an attic', () => {
    const row = (why: string) => read(`name,weight_lb,length_ft,width_ft,catalogue,kept_despite\nTiles,50,1,1,ceramic-tile-box-for-10-ft2,${why}\n`)
    expect(row('').rows[0]!.problems).toMatchObject([{ column: 'kept_despite' }])
    expect(row('comes down in May').good).toBe(1)
  })

  it.each([
    ['no column called name', 'weight_lb,length_ft,width_ft\n1,1,1\n'],
    ['Write the unit', 'name,weight,length_ft,width_ft\nBox,1,1,1\n'],
    ['stands there twice', 'name,name,weight_lb,length_ft,width_ft\nBox,Box,1,1,1\n'],
    ['no row under', 'name,weight_lb,length_ft,width_ft\n'],
    ['could not be read as CSV', 'name,weight_lb\n"Box,1\n'],
    ['At most 500', `name,weight_lb,length_ft,width_ft\n${'Box,1,1,1\n'.repeat(501)}`],
  ])('is no list: %s', (said, csv) => {
    expect(refusal(csv)).toContain(said)
  })

  it('tells which columns it does not read, and of cells too many', () => {
    const { ignoredColumns, rows } = read('name,weight_lb,length_ft,width_ft,colour\nBox,1,1,1,red,more\n')
    expect(ignoredColumns).toEqual(['colour'])
    expect(rows[0]!.problems[0]!.message).toContain('more cells')
  })
})

describe('what is asked before something goes up', () => {
  it.each([['Box of books', 'books'], ['Old tax documents', 'paper'], ['Toolbox with hand tools', 'tools'], ['Spare tiles', 'tile'], ['Wine', 'liquids'], ['Winter clothes', null]])('%s', (name, contents) => {
    expect(suspectedContents(name)).toBe(contents)
  })

  it('a thing of one\'s own is questioned, not refused', () => {
    expect(keptDespiteProblem({ catalogueKey: null, name: 'Box of tiles', keptDespite: '' })).toEqual({})
    expect(Object.keys(keptDespiteProblem({ catalogueKey: 'piano-spinet', name: 'Piano', keptDespite: ' ' }))).toEqual(['keptDespite'])
  })
})

describe('the guess coach', () => {
  it('says nothing before three weighings, then which way the guesses lean', () => {
    expect(leaningSentence({ count: 2, medianRatio: 1.5 })).toBeNull()
    expect(leaningSentence({ count: 5, medianRatio: 1.4 })).toContain('40\u00A0% heavier')
    expect(leaningSentence({ count: 5, medianRatio: 0.8 })).toContain('20\u00A0% lighter')
    expect(leaningSentence({ count: 5, medianRatio: 1.05 })).toContain('about right')
  })
})

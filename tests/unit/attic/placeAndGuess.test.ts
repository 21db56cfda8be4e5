import { describe, expect, it } from 'vitest'
import { itemFacts, clashRows } from '../../../shared/utils/attic/itemFacts'
import { loadFieldOf } from '../../../shared/utils/structure/loadField'
import { whereMayItGo, type NewItem } from '../../../shared/utils/structure/whereMayItGo'
import type { PlacedItem } from '../../../shared/types/loadPlan'
import { guessSentence } from '../../../shared/utils/messages/goodsMessages'
import { noPlaceSentence, spotWords } from '../../../shared/utils/messages/placeMessages'
import { field, item, survey } from './attics'

const plain = (text: string | null) => text?.replaceAll('\u00A0', ' ') ?? null
const answer = loadFieldOf(survey(), field, 20)
if (answer.kind !== 'field') throw new Error('The field of these tests is measured.')
const places = (one: NewItem, others: PlacedItem[] = [], ratedPsf = 20) => whereMayItGo({ ...answer.field, ratedPsf }, others, one, { member: answer.member })

describe('places for an item in words', () => {
  it('says nothing against a box that has a place, and names the best one by wall, joist and share', () => {
    const found = places({ weightLb: 60, lengthFt: 2, widthFt: 2 })
    expect(noPlaceSentence(found)).toBeNull()
    expect(found.kind === 'places' && plain(spotWords(found.best[0]!))).toMatch(/^at a bearing wall, [\d.]+ ft from joist 1: \d+ % of the joists’ rating$/)
    expect(plain(spotWords({ fromWallFt: 3, yFt: 2, utilisation: 0.5 }, 'metric'))).toBe('0.91 m from a bearing wall, 0.61 m from joist 1: 50 % of the joists’ rating')
  })

  it.each([
    ['larger than the field', places({ weightLb: 10, lengthFt: 13, widthFt: 2 }), /larger than this group/],
    ['nothing is allowed', places({ weightLb: 10, lengthFt: 2, widthFt: 2 }, [], 0), /Nothing may be stored/],
    ['the total would be over', places({ weightLb: 400, lengthFt: 2, widthFt: 2 }, [{ id: 'x', xFt: 0, yFt: 0, lengthFt: 12, widthFt: 13, weightLb: 3700 }]), /rated total/],
    ['too heavy anywhere', places({ weightLb: 3000, lengthFt: 2, widthFt: 2 }), /within the rating/],
    ['dense and too long to leave the middle half out', places({ weightLb: 150, lengthFt: 6, widthFt: 1 }), /middle half/],
    ['every place is taken', places({ weightLb: 10, lengthFt: 2, widthFt: 2 }, [{ id: 'x', xFt: 0, yFt: 0, lengthFt: 12, widthFt: 16, weightLb: 10 }]), /Move something first/],
  ])('says why there is none: %s', (_what, found, words) => {
    expect(noPlaceSentence(found)).toMatch(words)
  })
})

describe('a weighing against the guess before it', () => {
  const guess = { name: 'Box', typicalLb: 40, lowLb: 30, highLb: 60 }

  it.each([
    [40, 'Box weighs 40 lb; 40 lb was taken before. That was right.'],
    [50, 'Box weighs 50 lb; 40 lb was taken before: 25 % too little, still inside the range.'],
    [80, 'Box weighs 80 lb; 40 lb was taken before: 100 % too little, outside the range.'],
    [20, 'Box weighs 20 lb; 40 lb was taken before: 50 % too much, outside the range.'],
  ])('of %d lb', (weighedLb, sentence) => {
    expect(plain(guessSentence(guess, weighedLb))).toBe(sentence)
  })
})

describe('an item as a person may change it', () => {
  it('leaves out what is the server\'s own', () => {
    expect(Object.keys(itemFacts(item()))).not.toEqual(expect.arrayContaining(['id', 'version', 'placedOn', 'removedOn']))
    expect(itemFacts(item())).toMatchObject({ name: 'Invented box', xFt: 0 })
  })

  it('stands beside somebody else\'s version line by line, with units', () => {
    const rows = clashRows(itemFacts(item()), itemFacts(item({ name: 'Theirs', typicalLb: 70, highLb: 70, lowLb: 70 })))
    expect(rows.filter(row => row.mine !== row.theirs).map(row => [row.field, plain(row.mine), plain(row.theirs)])).toEqual([['name', 'Invented box', 'Theirs'], ['typicalLb', '50 lb', '70 lb']])
  })
})

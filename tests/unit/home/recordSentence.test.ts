import { describe, expect, it } from 'vitest'
import { RECORD_SUBJECTS } from '../../../shared/types/record'
import { chainSentence, recordChanges, recordSentence } from '../../../shared/utils/upkeep/recordSentence'
import { fieldWords, RECORD_SUBJECT_WORDS, valueWords } from '../../../shared/utils/upkeep/recordWords'

const plain = (text: string | null) => text?.replaceAll('\u00A0', ' ') ?? null
const entry = (action: string, before: Record<string, unknown> | null, after: Record<string, unknown> | null) => ({ action, actorName: 'Oona Invented', before, after, subjectId: 'room-1' })
const told = (...parts: Parameters<typeof entry>) => recordChanges(entry(...parts)).map(line => [line.field, plain(line.before), plain(line.after)])

describe('an entry as a sentence', () => {
  it.each([
    [entry('room added', null, { name: 'Kitchen' }), 'Room added: Kitchen, by Oona Invented.'],
    [entry('tenancy added', null, { tenantName: 'Ada' }), 'Tenancy added: Ada, by Oona Invented.'],
    [entry('room changed', { name: 'Old' }, { name: 'New' }), 'Room changed: New, by Oona Invented.'],
    [entry('item taken out', { name: 'Paper' }, null), 'Item taken out: Paper, by Oona Invented.'],
    [entry('finding opened', null, { rule: 'joist-over' }), 'Finding opened: A joist carries too much, by Oona Invented.'],
    [entry('reading recorded', null, { markNumber: 12, value: 1.25, quantity: 'width_mm' }), 'Reading recorded: mark 12, 1.25 mm, by Oona Invented.'],
    [entry('reading recorded', null, { markNumber: 12, value: 5, quantity: 'pop_count' }), 'Reading recorded: mark 12, 5 pops, by Oona Invented.'],
    [entry('reading recorded', null, { markNumber: 12, value: null, method: 'could-not-measure' }), 'Reading recorded: mark 12, could not be measured, by Oona Invented.'],
    [entry('unit changed', { notes: '' }, { notes: 'x' }), 'Unit changed, by Oona Invented.'],
  ])('says what and who: %#', (given, sentence) => {
    expect(plain(recordSentence(given))).toBe(sentence)
  })

  it('borrows today\'s name where the entry has none', () => {
    expect(recordSentence(entry('room changed', { lengthFt: 1 }, { lengthFt: 2 }), new Map([['room-1', 'Kitchen']]))).toBe('Room changed: Kitchen, by Oona Invented.')
  })
})

describe('what an entry changed', () => {
  it('stands side by side, with units and in words', () => {
    expect(told('room changed', { lengthFt: 12, ceilingFinish: 'unknown', isBedroom: false, archivedAt: null }, { lengthFt: 14.5, ceilingFinish: 'plaster-on-lath', isBedroom: true, archivedAt: '2026-12-01T05:03:14.765Z' })).toEqual([
      ['length', '12 ft', '14.5 ft'], ['ceiling finish', 'unknown', 'plaster on lath'], ['used as a bedroom', 'no', 'yes'], ['archived', 'nothing', '1 Dec 2026, 05:03 UTC'],
    ])
  })

  it('of something new leaves out what was left empty and ids of other rows', () => {
    expect(told('item put in the attic', null, { name: 'Paper', typicalLb: 45, notes: '', heightFt: null, atticId: 'a', catalogueKey: 'k', photos: [] })).toEqual([['name', null, 'Paper'], ['usual weight', null, '45 lb']])
  })

  it('gives a reading the unit of its quantity, uncertainty too', () => {
    expect(told('reading recorded', null, { value: 0.5, sigma: 0.2, quantity: 'width_mm', takenOn: '2026-11-25' })).toEqual([
      ['value', null, '0.5 mm'], ['uncertainty of the reading', null, '0.2 mm'], ['quantity', null, 'width_mm'], ['taken', null, '25 Nov 2026'],
    ])
  })

  it('shows a thing that ended by what it was', () => {
    expect(told('x', { name: 'Gone' }, null)).toEqual([['name', 'Gone', null]])
    expect(told('x', null, null)).toEqual([])
  })

  it('follows the reader\'s units', () => {
    expect(plain(recordChanges(entry('x', null, { spanFt: 10 }), 'metric')[0]!.after)).toBe('3.05 m')
  })
})

describe('words of fields and values', () => {
  it.each([['lengthFt', 'length'], ['ceilingHeightIn', 'height to the ceiling'], ['startsOn', 'first day'], ['clearHeightIn', 'clear height'], ['writtenOn', 'written'], ['On', 'On'], ['yearBuilt', 'year built']])('%s reads as %s', (key, words) => {
    expect(fieldWords(key)).toBe(words)
  })

  it.each<[string, unknown, string]>([
    ['yearBuilt', 1954, '1954'], ['costCents', 61200, '612'], ['quantity', 1200, '1,200'], ['pinX', 0.25, '25 %'], ['name', 'semi-detached', 'semi-detached'], ['priority', 'urgent', 'urgent'],
    ['addressLines', ['1 Road', 'Town'], '1 Road, Town'], ['photos', [{ id: 'x', sha256: 'y' }], '1'], ['insulation', { material: 'rock-wool', depthIn: 6, note: null }, 'material rock wool; depth 6 in'],
    ['joistFields', [{ name: 'Main', spanFt: 12 }, { name: 'Side', spanFt: 9 }], 'name Main; span 12 ft · name Side; span 9 ft'], ['rule', 'stain-wet', 'Wet stain'], ['empty', {}, 'nothing'], ['none', undefined, 'nothing'],
  ])('%s %o reads as "%s"', (key, value, words) => {
    expect(plain(valueWords(key, value))).toBe(words)
  })

  it('there is a word for every kind of entry', () => {
    expect(RECORD_SUBJECTS.filter(kind => !RECORD_SUBJECT_WORDS[kind])).toEqual([])
  })
})

describe('the state of a chain in words', () => {
  it('says what was checked and found', () => {
    expect(chainSentence({ kind: 'unbroken', entries: 0 })).toEqual({ word: 'Unbroken', sentence: 'There is no entry yet.' })
    expect(chainSentence({ kind: 'unbroken', entries: 1 }).sentence).toMatch(/^The one entry/)
    expect(chainSentence({ kind: 'unbroken', entries: 1218 }).sentence).toMatch(/^All 1,218 entries follow from one another/)
  })

  it('names the entry where it breaks, why, and what still holds', () => {
    const { word, sentence } = chainSentence({ kind: 'broken', seq: 7, why: 'an entry is missing' })
    expect([word, sentence]).toEqual(['Broken', 'The chain breaks at entry 7: an entry is missing. Entries before it still hold. Keep a copy of the database and ask who had access to it.'])
  })
})

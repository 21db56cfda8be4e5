import { describe, expect, it } from 'vitest'
import type { AtticDocument, AtticSurvey } from '../../../shared/types/attic'
import type { StoredItem } from '../../../shared/types/item'
import { judgeContents } from '../../../shared/utils/attic/judgeContents'
import { contentsVerdict, type ContentsVerdict } from '../../../shared/utils/messages/contentsMessages'
import { UNLOAD_FIRST } from '../../../shared/utils/messages/safety'
import { field, item, survey } from './attics'

const say = (surveyed: AtticSurvey | null, items: StoredItem[], documents: AtticDocument[] = []): ContentsVerdict => contentsVerdict(judgeContents({ survey: surveyed, documents, items }))
const heavy = { lowLb: 900, typicalLb: 900, highLb: 900 }
const letter: AtticDocument = { kind: 'engineer-letter', writtenOn: '2026-11-02', writtenBy: 'Edda Invented', attached: true, ratedPsf: 10, liftsHold: false, coversWholeAttic: true, area: '' }
const plain = (text: string) => text.replaceAll('\u00A0', ' ')

describe('the verdict of an attic in words', () => {
  it.each<[string, ContentsVerdict, Partial<ContentsVerdict>]>([
    ['never surveyed', say(null, []), { word: 'Not surveyed', doNow: 'Survey the attic before anything goes up.' }],
    ['never surveyed, loaded', say(null, [item()]), { word: 'Not surveyed', number: '50 lb', doNow: 'Stop adding and survey the attic.' }],
    ['on hold', say(survey({ conditions: ['rotten'] }), []), { word: 'On hold', unloadFirst: false, doNow: 'Have it inspected.' }],
    ['on hold, loaded', say(survey({ conditions: ['rotten'] }), [item()]), { word: 'On hold', number: '50 lb', unloadFirst: true, doNow: 'Then have the attic inspected.' }],
    ['no storage', say(survey({ clearHeightIn: 30 }), []), { word: 'No storage', doNow: null }],
    ['no storage, loaded', say(survey({ clearHeightIn: 30 }), [item()]), { word: 'No storage', number: '50 lb', doNow: 'Take everything out.' }],
    ['empty', say(survey(), []), { word: 'Empty', why: 'It is rated 20 psf.', doNow: null }],
    ['within', say(survey(), [item()]), { word: 'Within', unloadFirst: false, doNow: null }],
    ['over', say(survey(), [item({ ...heavy, xFt: 5 })]), { word: 'Over', unloadFirst: true }],
    ['something outside', say(survey(), [item({ xFt: 11.5 })]), { word: 'Over', number: null, says: ': something stands outside the measured joists.' }],
    ['joists not measured', say(survey({ joistFields: [{ ...field, spanFt: null }] }), [item()]), { word: 'Near', number: null, says: ': the joists are not measured.' }],
    ['trusses with a paper', say(survey({ framing: 'trusses', joistFields: [] }), [item()], [letter]), { word: 'Near', number: null, says: ': this framing is never calculated.' }],
  ])('says %s', (_what, verdict, expected) => {
    const { word, says, number, why, unloadFirst, doNow } = verdict
    const shown = { word, says, number: number && plain(number), why: plain(why), unloadFirst, doNow }
    expect(shown).toMatchObject(expected)
  })

  it('gives the joist, its share, what decides, and the total with its band and unit', () => {
    const { says, number, why } = say(survey(), [item({ ...heavy, xFt: 5 })])
    expect(says).toMatch(/^: joist \d+ carries$/)
    expect(plain(number!)).toMatch(/^\d+ % of its rating$/)
    expect(plain(why)).toMatch(/^Bending decides, on joist \d+ of North\. Stored here: about 900 lb \(most likely between \d+ lb and \d+ lb\) of 3,840 lb rated\.$/)
  })

  it('says the chance of being over when the guesses leave more than one in ten', () => {
    const spread = Array.from({ length: 6 }, (_, i) => item({ id: String(i), weightSource: 'estimate', lowLb: 100, typicalLb: 480, highLb: 1500, xFt: 0.5, yFt: i * 2.5, lengthFt: 11, widthFt: 2.4 }))
    expect(plain(say(survey(), spread).why)).toMatch(/The chance of being over the rating is about \d+ %\.$/)
  })

  it('tells that not all joists are measured where only some are', () => {
    expect(say(survey({ joistFields: [field, { ...field, name: 'South', spanFt: null }] }), [item()])).toMatchObject({
      word: 'Near', why: expect.stringContaining('Not all joists are measured.'), doNow: expect.stringMatching(/all joists are measured|middle half/),
    })
  })

  it('asks for unloading by a flag, so that the whole caution is shown and no shorter one', () => {
    const verdict = say(survey(), [item({ ...heavy, xFt: 5 })])
    expect(verdict.unloadFirst).toBe(true)
    expect([verdict.why, verdict.doNow].join(' ')).not.toContain(UNLOAD_FIRST.split('.')[0])
  })

  it('speaks metric to those who read metric', () => {
    const { why } = contentsVerdict(judgeContents({ survey: survey(), documents: [], items: [item()] }), 'metric')
    expect(plain(why)).toContain('of 1,742 kg rated')
  })
})

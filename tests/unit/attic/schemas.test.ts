import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { AtticDocumentInput, AtticEdit, AtticListQuery } from '../../../shared/schemas/attic'
import { AtticItemEdit, AtticItemInput, AtticItemMoves } from '../../../shared/schemas/atticItem'
import { AtticSurveyInput } from '../../../shared/schemas/atticSurvey'
import { emptyJoistField, emptySurvey } from '../../../shared/utils/attic/emptySurvey'
import { itemFacts } from '../../../shared/utils/attic/itemFacts'
import { item, survey } from './attics'

interface Checked { success: boolean, data?: unknown, error?: { issues: { path: PropertyKey[], message: string }[] } }
const wrong = (checked: Checked) => Object.fromEntries((checked.error?.issues ?? []).map(issue => [issue.path.join('.'), issue.message]))
const newItem = (change: object = {}) => ({ ...itemFacts(item()), placedOn: '2026-11-02', ...change })

describe('a survey as entered', () => {
  it('takes one where nobody knew anything, and one where everything was measured', () => {
    expect(AtticSurveyInput.safeParse(emptySurvey('2026-11-01')).success).toBe(true)
    expect(AtticSurveyInput.safeParse(survey()).success).toBe(true)
    expect(AtticSurveyInput.safeParse(survey({ joistFields: [emptyJoistField('Main')] })).success).toBe(true)
  })

  it('keeps trusses and unknown framing free of joists, whatever they are', () => {
    for (const framing of ['trusses', 'unknown'] as const) {
      expect(wrong(AtticSurveyInput.safeParse(survey({ framing })))).toEqual({ joistFields: expect.stringContaining('never calculated') })
    }
  })

  it.each(['openingWidthIn', 'openingLengthIn', 'clearHeightIn'])('refuses %s of nothing, below zero, not a number or without end, at its own field', (measure) => {
    for (const value of [0, -1, Number.NaN, Number.POSITIVE_INFINITY, 1e9, '12']) {
      expect(Object.keys(wrong(AtticSurveyInput.safeParse({ ...survey(), [measure]: value })))).toEqual([measure])
    }
  })

  it('refuses an engineer\'s acceptance that comes from a form', () => {
    const strongback = { atFt: 6, size: '2x6', breadthIn: null, depthIn: null, sound: true, engineerAccepts: true }
    expect(Object.keys(wrong(AtticSurveyInput.safeParse({ ...survey(), joistFields: [{ ...survey().joistFields[0], strongbacks: [strongback] }] })))).toEqual(['joistFields.0.strongbacks.0.engineerAccepts'])
  })

  it('never throws, whatever arrives', () => {
    fc.assert(fc.property(fc.anything(), value => typeof AtticSurveyInput.safeParse(value).success === 'boolean'), { numRuns: 300 })
  })
})

describe('an item as entered', () => {
  it('takes a sound one, trimmed', () => {
    expect(AtticItemInput.parse(newItem({ name: '  Box ' }))).toMatchObject({ name: 'Box' })
    expect(AtticItemInput.safeParse(newItem({ catalogueKey: null, heightFt: null })).success).toBe(true)
  })

  it.each<[string, object, string]>([
    ['least above usual', { lowLb: 60 }, 'typicalLb'], ['most below usual', { highLb: 40 }, 'typicalLb'], ['a range on a scale', { highLb: 60 }, 'typicalLb'],
    ['no weight', { lowLb: 0, typicalLb: 0, highLb: 0 }, 'typicalLb'], ['a weight that is no number', { lowLb: Number.NaN }, 'lowLb'],
    ['no piece', { quantity: 0 }, 'quantity'], ['a thousand and one pieces', { quantity: 1001 }, 'quantity'], ['a place before the wall', { yFt: -0.1 }, 'yFt'],
    ['a width of nothing', { widthFt: 0 }, 'widthFt'], ['an unknown key', { catalogueKey: 'moon-rock' }, 'catalogueKey'], ['no day', { placedOn: null }, 'placedOn'], ['the 30th of February', { placedOn: '2026-02-30' }, 'placedOn'],
  ])('refuses %s in plain words at its field', (_what, change, field) => {
    const found = wrong(AtticItemInput.safeParse(newItem(change)))
    expect(Object.keys(found)).toEqual([field])
    expect(found[field]).not.toMatch(/Invalid|Expected/)
  })

  it('of a change needs the version and the day of it', () => {
    expect(Object.keys(wrong(AtticItemEdit.safeParse(itemFacts(item())))).sort()).toEqual(['happenedOn', 'version'])
  })

  it('moves each thing once, and at least one', () => {
    const spot = { itemId: '018f0000-0000-7000-8000-000000000001', version: 1, fieldNumber: 1, xFt: 0, yFt: 0, lengthFt: 1, widthFt: 1 }
    expect(AtticItemMoves.safeParse({ happenedOn: '2026-11-02', moves: [spot] }).success).toBe(true)
    expect(wrong(AtticItemMoves.safeParse({ happenedOn: '2026-11-02', moves: [spot, spot] }))).toEqual({ moves: 'Each thing moves once.' })
    expect(wrong(AtticItemMoves.safeParse({ happenedOn: '2026-11-02', moves: [] }))).toEqual({ moves: 'Nothing was moved.' })
  })
})

describe('papers, names and lists', () => {
  const paper = { kind: 'engineer-letter', writtenOn: '2026-11-02', writtenBy: 'Edda Invented', ratedPsf: null, liftsHold: true, coversWholeAttic: true, area: '' }

  it('lets only an engineer or an inspection lift a hold', () => {
    const lifts = (kind: string) => AtticDocumentInput.safeParse({ ...paper, kind }).success
    expect(['engineer-letter', 'inspection-record', 'permit', 'truss-drawing'].map(lifts)).toEqual([true, true, false, false])
  })

  it('asks which part a paper covers that does not cover all', () => {
    expect(wrong(AtticDocumentInput.safeParse({ ...paper, coversWholeAttic: false }))).toEqual({ area: 'Which part does it cover?' })
  })

  it('asks for a name, and takes a page of 50 unless told otherwise', () => {
    expect(Object.keys(wrong(AtticEdit.safeParse({ name: '  ', notes: '', version: 1 })))).toEqual(['name'])
    expect(AtticListQuery.parse({})).toEqual({ limit: 50 })
    expect(AtticListQuery.safeParse({ limit: '201' }).success).toBe(false)
  })
})

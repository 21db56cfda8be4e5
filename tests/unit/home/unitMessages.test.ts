import { describe, expect, it } from 'vitest'
import { ADVICE_CODES } from '../../../shared/types/finding'
import { CEILING_FINISHES } from '../../../shared/types/attic'
import { atticWord, CEILING_FINISH_WORDS, ceilingVerdict, ceilingWord, lastLook, markName, marksByGravity } from '../../../shared/utils/messages/unitMessages'
import { nextStepOf } from '../../../shared/utils/upkeep/nextStep'
import { attic, mark, room } from './parts'

const plain = (text: string | undefined) => text?.replaceAll('\u00A0', ' ')
const rooms = [room('bed', { name: 'Bedroom' })]

describe('words of a unit in a list', () => {
  it.each([['within', 'Within', 'within'], ['near', 'Near', 'near'], ['over', 'Over', 'over'], ['hold', 'On hold', 'over'], ['unsurveyed', 'Not surveyed', 'unknown'], [null, 'Not surveyed', 'unknown']] as const)('an attic that is %s reads "%s"', (loadState, word, tone) => {
    expect(atticWord({ loadState, atticCount: 1 })).toEqual({ word, tone })
  })

  it('tell no attic from one that is empty', () => {
    expect(atticWord({ loadState: null, atticCount: 0 }).word).toBe('No attic entered')
  })

  it('put an active mark before all others', () => {
    expect(ceilingWord({ openMarks: 4, activeMarks: 2 })).toEqual({ word: 'Active: 2', tone: 'active' })
    expect(ceilingWord({ openMarks: 4, activeMarks: 0 }).tone).toBe('watch')
    expect(ceilingWord({ openMarks: 0, activeMarks: 0 }).word).toBe('No marks')
  })
})

describe('the verdict on the ceilings of a unit', () => {
  it('speaks of the gravest mark, with its rate, and counts the others', () => {
    const verdict = ceilingVerdict([mark('a', { number: 3 }), mark('b', { number: 9, activity: 'active', slopePerYear: 2.6 })], rooms)
    expect([verdict.word, verdict.tone, plain(verdict.says), plain(verdict.number)]).toEqual(['Active', 'active', ': Crack 9, Bedroom changes by about', '2.6 mm a year (0.1 in).'])
    expect(plain(verdict.why)).toBe('Last read on 1 Oct 2026. Next reading 1 Dec 2026. 1 more mark followed.')
  })

  it('says that it cannot tell yet rather than that all is well', () => {
    const verdict = ceilingVerdict([mark('a', { activity: 'too-few-readings', lastReadOn: null, nextReadingOn: null })], rooms)
    expect([verdict.word, verdict.tone, verdict.why]).toEqual(['Too few readings', 'unknown', 'Not read yet.'])
    expect(verdict.says).toContain('cannot tell yet')
  })

  it('calls a mark quiet only when it is dormant, and a watched one without a rate watched', () => {
    expect(ceilingVerdict([mark('a', { activity: 'dormant' })], rooms).says).toContain('kept still')
    expect(ceilingVerdict([mark('a', { slopePerYear: null })], rooms).says).toContain('is being followed')
    expect(ceilingVerdict([mark('a', { state: 'closed' })], rooms).word).toBe('No marks')
  })

  it('orders by what moves, then by how fast, then by number', () => {
    const order = marksByGravity([mark('a', { activity: 'dormant' }), mark('b', { number: 5 }), mark('c', { number: 4 }), mark('d', { activity: 'active' }), mark('e', { activity: 'too-few-readings' }), mark('f', { slopePerYear: 3 })])
    expect(order.map(({ id }) => id)).toEqual(['d', 'f', 'c', 'b', 'e', 'a'])
  })

  it('names a mark by kind, number and room', () => {
    expect(markName(mark('a', { kind: 'nail-pops', number: 37 }), rooms)).toBe('Nail pops 37, Bedroom')
    expect(markName(mark('a', { roomId: 'gone' }), rooms)).toBe('Crack 1')
  })
})

describe('the last look', () => {
  it('is the latest of survey, inventory and reading, and says at what', () => {
    expect(lastLook([attic({ surveyedOn: '2026-02-01', inventoryConfirmedOn: '2026-03-01' })], [mark('a', { lastReadOn: '2026-02-15' })])).toEqual({ on: '2026-03-01', at: 'attic' })
    expect(lastLook([attic()], [mark('a', { lastReadOn: '2026-02-15' })])).toEqual({ on: '2026-02-15', at: 'ceiling' })
    expect(lastLook([attic({ surveyedOn: null })], [])).toBeUndefined()
  })
})

describe('the next step of a finding', () => {
  const step = (adviceCode: typeof ADVICE_CODES[number], kind: 'attic' | 'mark' | 'unit' | 'job') => nextStepOf({ adviceCode, subject: { kind, id: 'it' } }, 'unit')

  it('leads to the page where the advice is carried out', () => {
    expect(step('survey-attic', 'attic')?.to).toBe('/attics/it/survey')
    expect(step('stop-adding-and-unload', 'attic')?.to).toBe('/attics/it/load-plan')
    expect(step('confirm-inventory', 'attic')?.to).toBe('/attics/it')
    expect(step('take-reading', 'mark')?.to).toBe('/marks/it/reading')
    expect(step('look-then-engineer', 'mark')?.to).toBe('/marks/it')
    expect(step('finish-job', 'job')?.to).toBe('/jobs/it')
    expect(step('find-contact', 'unit')?.to).toBe('/people/invite?unit=unit')
  })

  it('exists for every advice about an attic, a mark or a job', () => {
    for (const advice of ADVICE_CODES) for (const kind of ['attic', 'mark', 'job'] as const) expect(step(advice, kind)?.label).toBeTruthy()
    expect(step('inspect', 'unit')).toBeUndefined()
  })
})

it('there is a word for every ceiling finish', () => {
  expect(CEILING_FINISHES.filter(finish => !CEILING_FINISH_WORDS[finish])).toEqual([])
})

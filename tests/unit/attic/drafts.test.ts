// @vitest-environment happy-dom
import { createPinia, setActivePinia } from 'pinia'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import { usePlanDraft } from '../../../stores/planDraft'
import { useSurveyDraft } from '../../../stores/surveyDraft'
import { survey } from './attics'

const KEY = 'lathkey.survey-drafts'
/** A store of a page that was opened anew. */
function reopened() {
  setActivePinia(createPinia())
  const store = useSurveyDraft()
  store.load()
  return store
}
beforeEach(() => {
  localStorage.clear()
  setActivePinia(createPinia())
})

describe('a survey begun and not kept', () => {
  it('is there again when the page is opened anew, by its attic', () => {
    useSurveyDraft().keep('one', survey())
    expect(reopened().drafts).toEqual({ one: survey() })
  })

  it('is gone once it was kept or begun anew; others stay', () => {
    const store = useSurveyDraft()
    store.keep('one', survey())
    store.keep('two', survey({ clearHeightIn: 44 }))
    store.drop('one')
    expect(Object.keys(reopened().drafts)).toEqual(['two'])
  })

  it('is a copy: what is typed later does not change it', () => {
    const typed = survey()
    const store = useSurveyDraft()
    store.keep('one', typed)
    typed.clearHeightIn = 1
    expect(store.drafts.one!.clearHeightIn).toBe(60)
  })

  it.each([['nothing', ''], ['no JSON', '{'], ['a list', '[1]'], ['a text', '"x"'], ['null', 'null'], ['a draft that is no survey', '{"one":{"colour":"red"},"two":7,"three":null}']])('starts empty when the browser holds %s', (_what, stored) => {
    localStorage.setItem(KEY, stored)
    expect(reopened().drafts).toEqual({})
  })

  it('of an older version counts what it lacks as not answered', () => {
    localStorage.setItem(KEY, JSON.stringify({ one: { surveyedOn: '2026-11-01', framing: 'trusses', joistFields: [] } }))
    expect(reopened().drafts.one).toMatchObject({ framing: 'trusses', deck: 'unknown', conditions: null })
  })

  it('lives on in memory when the browser keeps nothing', () => {
    vi.spyOn(Storage.prototype, 'setItem').mockImplementation(() => { throw new DOMException('full', 'QuotaExceededError') })
    const store = useSurveyDraft()
    expect(() => store.keep('one', survey())).not.toThrow()
    expect(store.drafts.one).toEqual(survey())
    vi.restoreAllMocks()
  })
})

describe('moves tried out and not saved', () => {
  it('are there again, without anything that is no measure', () => {
    localStorage.setItem('lathkey.plan-drafts', JSON.stringify({ attic: { item: { xFt: 3, weightLb: 1, yFt: 'x' }, other: {}, odd: null }, none: 'x' }))
    const store = usePlanDraft()
    store.load()
    expect(store.drafts).toEqual({ attic: { item: { xFt: 3 } } })
  })
})

import { describe, expect, it } from 'vitest'
import { tenantAtticRule } from '../../../shared/utils/messages/tenantAttic'

const attic = { surveyedOn: '2027-01-01', ratedPsf: 20, onHold: false, basis: 'class', loadState: 'within', storedLb: 0, isTrussed: false } as const
const said = (changes: Partial<Parameters<typeof tenantAtticRule>[0]>, system: 'us' | 'metric' = 'us') => {
  const rule = tenantAtticRule({ ...attic, ...changes }, system)
  return { ...rule, text: rule.sentences.join(' ') }
}

describe('what may go into an attic', () => {
  it('is said with its figure and unit where it is rated', () => {
    expect(said({}).text).toContain('20\u00A0psf')
    expect(said({}, 'metric').text).toContain('0.96\u00A0kPa')
    expect(said({}).cautions).toEqual(['estimate'])
  })

  it('never names a figure for trusses, with or without a paper', () => {
    for (const ratedPsf of [0, 10, 20]) {
      const { text, cautions } = said({ isTrussed: true, ratedPsf, basis: ratedPsf > 0 ? 'document' : 'framing' })
      expect(text).not.toMatch(/\d/)
      expect(cautions).toContain('trusses')
    }
  })

  it('is nothing before a survey, on hold, or where the rating is 0', () => {
    for (const changes of [{ surveyedOn: null, ratedPsf: null }, { onHold: true }, { ratedPsf: 0 }]) {
      expect(said(changes).text).toContain('Keep nothing in it.')
      expect(said(changes).text).not.toMatch(/\d/)
    }
    expect(said({ onHold: true }).cautions).toContain('hold')
  })

  it('comes with unloading first where something is stored that should not be', () => {
    expect(said({ onHold: true, storedLb: 200 }).cautions).toContain('unload-first')
    expect(said({ surveyedOn: null, storedLb: 200 }).cautions).toContain('unload-first')
    expect(said({ loadState: 'over', storedLb: 900 }).cautions).toContain('unload-first')
    expect(said({ loadState: 'over', storedLb: 900 }).text).not.toContain('At most')
  })

  it('stops adding when it is nearly full', () => {
    expect(said({ loadState: 'near', storedLb: 500 }).text).toContain('Add nothing more.')
  })
})

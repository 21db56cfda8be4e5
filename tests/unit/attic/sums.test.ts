// @vitest-environment happy-dom
import { afterEach, describe, expect, it } from 'vitest'
import AtticHistory from '../../../components/attic/AtticHistory.vue'
import AtticRating from '../../../components/attic/AtticRating.vue'
import JoistSums from '../../../components/attic/JoistSums.vue'
import type { JoistCapacity } from '../../../shared/types/atticRating'
import { rateAttic } from '../../../shared/utils/structure/rating'
import { field, survey } from './attics'
import { mountAttic, textOf } from './mountAttic'

afterEach(() => {
  document.body.innerHTML = ''
})

describe('the sums of a group', () => {
  const from = survey({ joistFields: [{ ...field, size: '2x6', bothEndsBear: true }] })
  const rating = rateAttic(from)
  const sums = (system: 'us' | 'metric' = 'us') => textOf(mountAttic(JoistSums, { capacity: rating.joistCheck![0] as JoistCapacity, survey: from, field: from.joistFields[0], withStorage: true, ratedPsf: rating.ratedPsf, system })).replaceAll('\u00A0', ' ')

  it('name the limit that decides, all four formulas, both sag limits, the ten-year figure and sag over the years', () => {
    const text = sums()
    expect(text).toContain('North: ')
    expect(text.match(/decides/g)!.length).toBe(2)
    for (const formula of ['8·Fb′·S·144/(L²·s) − D', '384·E·I·144/(5·n·L³·s)', '(2/3)·Fv′·b·d·144', '2·Fc⊥·b·ℓb·144']) expect(text).toContain(formula)
    expect(text).toMatch(/Sag is held to L\/240 for this ceiling\. At L\/360 it would allow [\d.]+ psf/)
    expect(text).toMatch(/longer than ten years the joists take [\d.]+ psf \(CD 0\.9/)
    expect(text).toMatch(/over the years [\d.]+ in \(1\.5 times as much, NDS 2018 3\.5\.2\)/)
    expect(text).toContain('IRC R502.6')
  })

  it('add metric to the four results for who reads metric', () => {
    expect(sums('metric').match(/kPa/g)!.length).toBeGreaterThanOrEqual(6)
  })
})

describe('ways to the sums and surveys', () => {
  it('stand at the rating and under the history', () => {
    const links = (shown: ReturnType<typeof mountAttic>) => shown.findAllComponents({ name: 'RouterLinkStub' }).map(link => link.props('to') as string)
    expect(links(mountAttic(AtticRating, { rating: rateAttic(survey()), sumsAt: '/attics/x/rating' }))).toEqual(['/attics/x/rating'])
    const row = { id: 's', surveyedOn: '2026-11-01', ratedPsf: 20, onHold: false, basis: 'class' as const, surveyedByName: 'Otis', createdAt: '2026-11-01T00:00:00Z' }
    expect(links(mountAttic(AtticHistory, { atticId: 'x', events: [], surveys: [row] }))).toEqual(['/attics/x/surveys'])
    expect(links(mountAttic(AtticHistory, { atticId: 'x', events: [], surveys: [] }))).toEqual([])
  })
})

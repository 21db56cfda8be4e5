import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import { ACCESSES, CONDITIONS } from '../../../shared/types/attic'
import type { AtticDocument, AtticSurvey, Hole, Notch } from '../../../shared/types/attic'
import { rateAttic } from '../../../shared/utils/structure/rating'
import { joistField, paper, survey } from './surveys'

const rate = (change: Partial<AtticSurvey> = {}, documents: AtticDocument[] = []): ReturnType<typeof rateAttic> => rateAttic(survey(change), documents)
const codesOf = (list: { code: string }[]): string[] => list.map(entry => entry.code)

describe('rating by class and joists', () => {
  it('joists that take more than the class leave the class standing', () => {
    const rating = rate()
    expect(rating).toMatchObject({ ratedPsf: 20, classPsf: 20, atticClass: 'limited-storage', basis: 'class', hold: false })
    expect(codesOf(rating.reasons)).toEqual(['limited-storage', 'joists-hold-class'])
    expect(rating.joistCheck).toHaveLength(1)
  })

  it('joists that take less set the rating, and the limit is named', () => {
    const rating = rate({ joistFields: [joistField({ name: 'south', size: '2x6', spanFt: 14 }), joistField()] })
    const check = rating.joistCheck?.[0]
    if (check?.kind !== 'capacity') return expect.fail('no capacity')
    expect(check.allowedPsf).toBeLessThan(20)
    expect(rating).toMatchObject({ ratedPsf: check.allowedPsf, classPsf: 20, basis: 'joists' })
    expect(rating.reasons).toContainEqual({ code: 'joists-hold-less', psf: check.allowedPsf, classPsf: 20, governedBy: check.governedBy, fieldName: 'south' })
  })

  it('joists nobody measured: the lesser of the class and 10 psf, marked unverified', () => {
    expect(rate({ joistFields: [] })).toMatchObject({ ratedPsf: 10, classPsf: 20, basis: 'unverified' })
    const rating = rate({ joistFields: [joistField(), joistField({ name: 'south', spanFt: null })] })
    expect(rating).toMatchObject({ ratedPsf: 10, basis: 'unverified' })
    expect(rating.reasons).toContainEqual({ code: 'joists-not-measured', psf: 10, classPsf: 20, fieldNames: ['south'] })
    expect(rate({ joistFields: [joistField({ breadthIn: 6, depthIn: 8 })] }).reasons)
      .toContainEqual({ code: 'joists-not-covered', psf: 10, classPsf: 20, fieldNames: ['north'] })
  })

  it('one measured field that takes less than 10 psf holds back an unverified attic', () => {
    const rating = rate({ joistFields: [joistField({ size: '2x4', spanFt: 14 }), joistField({ name: 'south', spanFt: null })] })
    expect(rating.ratedPsf).toBeLessThan(10)
    expect(rating.basis).toBe('unverified')
  })

  it('an attic of the class "no storage" carries 10 psf for access and no goods', () => {
    const rating = rate({ clearHeightIn: 36 })
    expect(rating).toMatchObject({ ratedPsf: 0, classPsf: 10, atticClass: 'no-storage', basis: 'class', hold: false })
    expect(codesOf(rating.reasons)).toEqual(['clear-height-too-low'])
    expect(codesOf(rate({ clearHeightIn: 36, joistFields: [joistField({ size: '2x4', spanFt: 16 })] }).cautions)).toContain('joists-below-access-load')
  })

  it('unknown height and opening give no storage, and both are asked for', () => {
    const rating = rate({ clearHeightIn: null, openingLengthIn: null })
    expect(rating.ratedPsf).toBe(0)
    expect(codesOf(rating.reasons)).toEqual(['clear-height-unknown', 'opening-unknown'])
  })

  it('another code basis of the organisation is used and named', () => {
    const basis = { name: 'City amendment', note: '', psf: { 'habitable-or-fixed-stairs': 40, 'limited-storage': 20, 'no-storage': 10 } }
    const rating = rateAttic(survey({ habitable: true, joistFields: [joistField({ spanFt: 8 })] }), [], basis)
    expect(rating).toMatchObject({ ratedPsf: 40, classPsf: 40 })
    expect(rating.cautions).toContainEqual({ code: 'local-amendments', basisName: 'City amendment' })
  })

  it('every rating says that it is an estimate, and an attic nobody inspected says so', () => {
    for (const framing of ['rafters-and-joists', 'trusses', 'unknown'] as const) expect(codesOf(rate({ framing }).cautions)).toContain('estimate-only')
    expect(codesOf(rate({ conditions: null }).cautions)).toContain('condition-not-inspected')
    expect(codesOf(rate({ conditions: ['wet'] }).cautions)).toContain('estimate-only')
  })

  it('insulation too heavy for the board between joists, or deeper than the joists, is a caution', () => {
    const rating = rate({ insulation: { material: 'cellulose', depthIn: 10 }, joistFields: [joistField({ spacingIn: 24 })] })
    expect(rating.cautions).toContainEqual({ code: 'insulation-heavy-for-board', insulationPsf: 2.5, limitPsf: 1.3, fieldName: 'north' })
    expect(rating.cautions).toContainEqual({ code: 'insulation-covers-joists', insulationDepthIn: 10, joistDepthIn: 7.25, fieldName: 'north' })
  })
})

describe('trusses and unknown framing', () => {
  it.each([['trusses', 'trusses'], ['unknown', 'framing-unknown']] as const)('%s: no storage and no joist calculation', (framing, code) => {
    const rating = rate({ framing })
    expect(rating).toMatchObject({ ratedPsf: 0, classPsf: null, atticClass: null, basis: 'framing', hold: false })
    expect(codesOf(rating.reasons)).toEqual([code])
    expect(rating.joistCheck).toBeUndefined()
  })

  it('never get a joist calculation, whatever else is answered', () => {
    fc.assert(fc.property(
      fc.constantFrom('trusses' as const, 'unknown' as const), fc.constantFrom(...ACCESSES), fc.option(fc.boolean()), fc.subarray([...CONDITIONS]),
      fc.option(fc.double({ min: 0, max: 60, noNaN: true })), fc.constantFrom('engineer-letter' as const, 'permit' as const, 'truss-drawing' as const, 'inspection-record' as const),
      (framing, access, habitable, conditions, ratedPsf, kind) => {
        const rating = rateAttic(survey({ framing, access, habitable, conditions }), [paper({ kind, ratedPsf, liftsHold: true })])
        expect(rating.joistCheck).toBeUndefined()
        expect([0, ratedPsf]).toContain(rating.ratedPsf)
        if (kind === 'permit' || kind === 'inspection-record') expect(rating.ratedPsf).toBe(0)
      },
    ))
  })

  it('take the figure of the truss drawing or the engineer, with the paper attached', () => {
    expect(rate({ framing: 'trusses' }, [paper({ kind: 'truss-drawing', ratedPsf: 20 })])).toMatchObject({ ratedPsf: 20, basis: 'document' })
    const loose = rate({ framing: 'trusses' }, [paper({ kind: 'truss-drawing', ratedPsf: 20, attached: false })])
    expect(loose.ratedPsf).toBe(0)
    expect(loose.cautions).toContainEqual({ code: 'document-not-attached', kind: 'truss-drawing' })
    expect(codesOf(rate({ framing: 'trusses' }, [paper({ kind: 'permit', ratedPsf: 20 })]).cautions)).toContain('document-not-for-framing')
  })
})

describe('a documented rating', () => {
  it('is used as given, above or below the class', () => {
    expect(rate({}, [paper({ ratedPsf: 35 })])).toMatchObject({ ratedPsf: 35, basis: 'document', classPsf: 20 })
    expect(rate({}, [paper({ ratedPsf: 0 })])).toMatchObject({ ratedPsf: 0, basis: 'document' })
  })

  it('the newest paper counts', () => {
    expect(rate({}, [paper({ ratedPsf: 35, writtenOn: '2020-01-01' }), paper({ ratedPsf: 15, writtenOn: '2025-01-01' })]).ratedPsf).toBe(15)
  })

  it('a paper about a part of the attic never raises the rating, and lowers it', () => {
    const part = { coversWholeAttic: false, area: 'over the kitchen' }
    expect(rate({}, [paper({ ratedPsf: 50, ...part })])).toMatchObject({ ratedPsf: 20, basis: 'class' })
    const lower = rate({}, [paper({ ratedPsf: 5, ...part })])
    expect(lower).toMatchObject({ ratedPsf: 5, basis: 'document' })
    expect(lower.reasons[0]).toEqual({ code: 'documented-part', psf: 5, area: 'over the kitchen' })
  })

  it('a figure that is no load is not used', () => {
    expect(rate({}, [paper({ ratedPsf: -5 }), paper({ ratedPsf: Number.NaN })])).toMatchObject({ ratedPsf: 20, basis: 'class' })
  })
})

const notch = (change: Partial<Notch>): Notch => ({ depthIn: 0.5, lengthIn: 1, place: 'outer-third', edge: 'top', ...change })
const hole = (change: Partial<Hole>): Hole => ({ diameterIn: 1, edgeDistanceIn: 3, nearestOtherIn: null, ...change })
const withCuts = (notches: Notch[], holes: Hole[] = []): ReturnType<typeof rateAttic> => rate({ joistFields: [joistField({ size: '2x6', spanFt: 9, notches, holes })] })

describe('a hold', () => {
  it.each(CONDITIONS.filter(condition => condition !== 'notched' && condition !== 'bored'))('%s: nothing stored until inspected, whatever a paper rates', (condition) => {
    const rating = rate({ conditions: [condition] }, [paper({ ratedPsf: 40 })])
    expect(rating).toMatchObject({ ratedPsf: 0, basis: 'hold', hold: true })
    expect(rating.reasons).toEqual([{ code: 'condition', condition }])
    expect(rating.joistCheck).toBeUndefined()
  })

  it.each([
    ['too deep', notch({ depthIn: 2 }), { code: 'notch-too-deep', depthIn: 2, limitIn: 5.5 / 6, fieldName: 'north' }],
    ['too long', notch({ lengthIn: 2 }), { code: 'notch-too-long', lengthIn: 2, limitIn: 5.5 / 3, fieldName: 'north' }],
    ['in the middle third', notch({ place: 'middle-third' }), { code: 'notch-in-middle-third', fieldName: 'north' }],
    ['too deep at the end', notch({ place: 'end', depthIn: 1.5 }), { code: 'notch-too-deep', depthIn: 1.5, limitIn: 1.375, fieldName: 'north' }],
    ['not measured', notch({ depthIn: null }), { code: 'notch-not-measured', fieldName: 'north' }],
  ])('a notch %s', (_name, cut, reason) => {
    const rating = withCuts([cut])
    expect(rating.hold).toBe(true)
    expect(rating.reasons).toEqual([reason])
  })

  it.each([
    ['too large', hole({ diameterIn: 2 }), { code: 'hole-too-large', diameterIn: 2, limitIn: 5.5 / 3, fieldName: 'north' }],
    ['too near an edge', hole({ edgeDistanceIn: 1.5 }), { code: 'hole-near-edge', distanceIn: 1.5, limitIn: 2, fieldName: 'north' }],
    ['too near another', hole({ nearestOtherIn: 1 }), { code: 'hole-near-another', distanceIn: 1, limitIn: 2, fieldName: 'north' }],
    ['not measured', hole({ edgeDistanceIn: null }), { code: 'hole-not-measured', fieldName: 'north' }],
  ])('a hole %s', (_name, cut, reason) => {
    const rating = withCuts([], [cut])
    expect(rating.hold).toBe(true)
    expect(rating.reasons).toEqual([reason])
  })

  it('found by an earlier survey stands in a survey that sees no damage, until a paper of that day or later lifts it', () => {
    const later = { surveyedOn: '2026-10-01', conditions: [], earlierHold: { foundOn: '2026-06-01' } }
    expect(rate(later)).toMatchObject({ ratedPsf: 0, basis: 'hold', hold: true, reasons: [{ code: 'earlier-hold', foundOn: '2026-06-01' }] })
    const record = (writtenOn: string) => paper({ kind: 'inspection-record', ratedPsf: null, liftsHold: true, writtenOn })
    expect(rate(later, [record('2026-05-31')]).hold).toBe(true)
    expect(rate(later, [record('2026-06-01')]).hold).toBe(false)
  })

  it('a notch in the bottom edge of a joist 4 in thick or more', () => {
    const rating = rate({ joistFields: [joistField({ breadthIn: 3.5, depthIn: 7.25, notches: [notch({ edge: 'bottom' })] })] })
    expect(rating.reasons).toEqual([{ code: 'notch-in-bottom-of-thick-joist', breadthIn: 3.5, limitIn: 3.5, fieldName: 'north' }])
  })

  it('notches and holes exactly at the limits do not hold, and are cautioned', () => {
    const rating = withCuts([notch({ depthIn: 5.5 / 6, lengthIn: 5.5 / 3 }), notch({ place: 'end', depthIn: 1.375, lengthIn: null })], [hole({ diameterIn: 5.5 / 3, edgeDistanceIn: 2, nearestOtherIn: 2 })])
    expect(rating.hold).toBe(false)
    expect(codesOf(rating.cautions)).toEqual(expect.arrayContaining(['notched-within-limits', 'bored-within-limits']))
  })

  it('notched or bored without a measure, or on a joist of unknown size, holds', () => {
    expect(rate({ conditions: ['notched', 'bored'] }).reasons).toEqual([{ code: 'notch-not-measured', fieldName: null }, { code: 'hole-not-measured', fieldName: null }])
    expect(rate({ joistFields: [joistField({ size: null, notches: [notch({})], holes: [hole({})] })] }).hold).toBe(true)
  })

  it('is lifted by an inspection record or an engineer, attached, for the whole attic, after the survey', () => {
    for (const kind of ['inspection-record', 'engineer-letter'] as const) {
      const rating = rate({ conditions: ['wet'] }, [paper({ kind, liftsHold: true })])
      expect(rating).toMatchObject({ ratedPsf: 20, hold: false })
      expect(codesOf(rating.cautions)).toContain('hold-lifted')
    }
  })

  it.each([
    ['a permit', { kind: 'permit' }],
    ['a paper not attached', { attached: false }],
    ['a paper about a part', { coversWholeAttic: false }],
    ['a paper older than the survey', { writtenOn: '2026-03-13' }],
    ['a paper that does not say so', { liftsHold: false }],
  ] as const)('is not lifted by %s', (_name, change) => {
    expect(rate({ conditions: ['wet'] }, [paper({ liftsHold: true, ratedPsf: 20, ...change })])).toMatchObject({ ratedPsf: 0, hold: true })
  })

  it('lifted on trusses, the trusses still hold nothing', () => {
    expect(rate({ framing: 'trusses', conditions: ['wet'] }, [paper({ liftsHold: true })])).toMatchObject({ ratedPsf: 0, basis: 'framing' })
  })
})

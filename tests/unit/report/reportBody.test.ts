import { describe, expect, it } from 'vitest'
import { ObservationInput } from '../../../shared/schemas/observation'
import { NOTHING_ASKED } from '../../../shared/types/mark'
import type { DraftPhoto, ReportAnswers } from '../../../shared/types/reportDraft'
import { dangerOf, isReportOfDanger } from '../../../shared/utils/report/dangerOf'
import { problemsOn, reportBody } from '../../../shared/utils/report/reportBody'
import { reportLines } from '../../../shared/utils/report/reportLines'
import { reportNumber } from '../../../shared/utils/report/reportNumber'
import { phoneHref } from '../../../shared/utils/phoneHref'

const roomId = '0190a1de-0000-7000-8000-000000000001'
const photoId = '0190a1de-0000-7000-8000-000000000002'
const answers: ReportAnswers = { ...NOTHING_ASKED, kind: 'crack', roomId }
const photo = (changes: Partial<DraftPhoto>): DraftPhoto => ({ localId: 'x', view: 'wide', name: 'x.jpg', state: 'kept', photoId: null, problem: null, ...changes })
const today = '2027-03-14'
const on = (question: Parameters<typeof problemsOn>[0], changes: Partial<ReportAnswers>) => problemsOn(question, { answers: { ...answers, ...changes } }, today)

describe('what is sent', () => {
  it('is what the server takes, with the least a report can hold', () => {
    const sent = ObservationInput.safeParse(reportBody({ answers, sameAsMarkId: null, photos: [] }))
    expect(sent.success).toBe(true)
  })

  it('is what the server takes, with every answer given', () => {
    const full: ReportAnswers = {
      ...answers, shape: 'wandering-line', pin: { xShare: 0.25, yShare: 1 }, place: 'wall-ceiling-corner', wallType: 'interior', widthComparison: 'card', lengthMm: 1219.2,
      direction: 'slanting', dangerSigns: ['bits-falling'], doors: 'stick-a-bit', sounds: 'once', changeAbove: 'added', recentEvents: ['snow', 'storm'], firstSeenOn: '2027-03-01', note: ' It came overnight. ',
    }
    const sent = ObservationInput.parse(reportBody({ answers: full, sameAsMarkId: roomId, photos: [photo({ state: 'uploaded', photoId })] }))
    expect(sent).toMatchObject({ ...full, note: 'It came overnight.', sameAsMarkId: roomId, photoIds: [photoId] })
  })

  it('leaves behind photos that were refused or not received, and numbers that are none', () => {
    const body = reportBody({ answers: { ...answers, widthMm: Number.NaN, note: '   ' }, sameAsMarkId: null, photos: [photo({}), photo({ state: 'refused' }), photo({ state: 'uploaded', photoId })] })
    expect(body).toMatchObject({ widthMm: null, note: null, photoIds: [photoId] })
  })
})

describe('going on', () => {
  it('needs a room and a kind', () => {
    expect(on('room', { roomId: null })).toHaveProperty('roomId')
    expect(on('look', { kind: null })).toHaveProperty('kind')
    expect(on('room', {})).toEqual({})
    expect(on('look', {})).toEqual({})
  })

  it('refuses a size that is no number, below zero or beyond what the server takes', () => {
    expect(on('size', { widthMm: Number.NaN })).toHaveProperty('widthMm')
    expect(on('size', { widthMm: -1 })).toHaveProperty('widthMm')
    expect(on('size', { widthMm: 301 })).toHaveProperty('widthMm')
    expect(on('size', { widthMm: 300 })).toEqual({})
    expect(on('size', { sagDropMm: 2001 })).toHaveProperty('sagDropMm')
    expect(on('size', { stainSizeMm: 20_001 })).toHaveProperty('stainSizeMm')
    expect(on('size', { popCount: 2.5 })).toHaveProperty('popCount')
    expect(on('size', { popCount: 501 })).toHaveProperty('popCount')
    expect(on('run', { lengthMm: Number.POSITIVE_INFINITY })).toHaveProperty('lengthMm')
  })

  it('holds the same limits as the server', () => {
    for (const changes of [{ widthMm: 300.1 }, { lengthMm: 20_001 }, { sagDropMm: 2000.5 }, { stainSizeMm: 20_001 }, { popCount: 501 }, { note: 'x'.repeat(2001) }] satisfies Partial<ReportAnswers>[]) {
      const question = 'lengthMm' in changes ? 'run' : 'note' in changes ? 'send' : 'size'
      expect(ObservationInput.safeParse(reportBody({ answers: { ...answers, ...changes }, sameAsMarkId: null, photos: [] })).success).toBe(false)
      expect(Object.keys(on(question, changes))).toEqual(Object.keys(changes))
    }
  })

  it('refuses a first day that is still to come', () => {
    expect(on('around', { firstSeenOn: '2027-03-15' })).toHaveProperty('firstSeenOn')
    expect(on('around', { firstSeenOn: today })).toEqual({})
  })

  it('asks for nothing else', () => {
    for (const question of ['shape', 'where', 'wet', 'danger', 'changed', 'photos'] as const) expect(on(question, {})).toEqual({})
  })
})

describe('danger', () => {
  it('is seen in what was ticked and in what other answers amount to', () => {
    expect(isReportOfDanger(answers)).toBe(false)
    expect(dangerOf({ ...answers, dangerSigns: ['board-dropping'] })).toEqual(['board-dropping'])
    expect(dangerOf({ ...answers, kind: 'sag', stain: 'damp' })).toContain('wet-and-bulging')
    expect(dangerOf({ ...answers, kind: 'stain', stain: 'dripping' })).toContain('water-dripping')
    expect(dangerOf({ ...answers, doors: 'will-not-close' })).toContain('opening-while-doors-bind')
    expect(dangerOf({ ...answers, kind: null, recentEvents: ['earthquake'] })).toContain('after-an-impact')
  })
})

describe('the lines of a report', () => {
  it('say every answer with its unit, and "Not said" where there is none', () => {
    const lines = reportLines({ ...answers, shape: 'straight-line', widthMm: 1.5, widthMethod: 'ruler', firstSeenOn: '2027-03-01' }, 'Bedroom')
    const value = (question: string) => lines.find(line => line.question === question)?.value
    expect(value('room')).toBe('Bedroom')
    expect(value('look')).toBe('Crack. One long straight line')
    expect(value('size')).toBe('1.5\u00A0mm (0.059\u00A0in) wide')
    expect(value('where')).toBe('Not said')
    expect(value('around')).toContain('1\u00A0Mar\u00A02027')
  })

  it('have one for each question asked of that kind', () => {
    for (const kind of ['crack', 'nail-pops', 'sag', 'stain'] as const) {
      const asked = reportLines({ ...answers, kind }, 'Hall').map(line => line.question)
      expect(asked.includes('run')).toBe(kind === 'crack')
      expect(asked.includes('wet')).toBe(kind === 'sag' || kind === 'stain')
      expect(asked.includes('shape')).toBe(kind !== 'crack')
    }
    const value = (changes: Partial<ReportAnswers>) => reportLines({ ...answers, ...changes }, 'Hall', 'metric').find(line => line.question === 'size')?.value
    expect(value({ kind: 'nail-pops', popCount: 4 })).toBe('4')
    expect(value({ kind: 'sag', sagDropMm: 12 })).toBe('Hangs about 12\u00A0mm')
    expect(value({ kind: 'stain', stainSizeMm: 270 })).toBe('About 270\u00A0mm across')
    expect(value({ kind: null })).toBe('Not said')
  })
})

it('a report is called by its number in four figures or more', () => {
  expect([7, 412, 12_345].map(reportNumber)).toEqual(['R-0007', 'R-0412', 'R-12345'])
})

it('a telephone number is called by its figures and a leading plus', () => {
  expect(phoneHref('+1 (555) 010-0199')).toBe('tel:+15550100199')
  expect(phoneHref('555 01 01 ext. 7')).toBe('tel:55501017')
})

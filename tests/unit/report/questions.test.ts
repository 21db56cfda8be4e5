import { describe, expect, it } from 'vitest'
import { MARK_KINDS, NOTHING_ASKED } from '../../../shared/types/mark'
import type { ReportAnswers } from '../../../shared/types/reportDraft'
import { chooseLook, isSkippable, lookOf, questionAfter, questionBefore, questionOfField, questionsFor, reachableQuestion, unanswer } from '../../../shared/utils/report/questions'

const blank: ReportAnswers = { ...NOTHING_ASKED, kind: null, roomId: null }
const started: ReportAnswers = { ...blank, roomId: 'a room', kind: 'crack' }

describe('the questions of a report', () => {
  it('begin with the room and the look, and end with looking it over, whatever the kind', () => {
    for (const kind of [null, ...MARK_KINDS]) {
      const questions = questionsFor(kind)
      expect(questions.slice(0, 2)).toEqual(['room', 'look'])
      expect(questions.slice(-2)).toEqual(['photos', 'send'])
      expect(questions).toContain('danger')
      expect(questions.length).toBeLessThanOrEqual(11)
    }
  })

  it('ask for length and direction of a crack only, and whether it is wet of sags and stains only', () => {
    expect(questionsFor('crack')).toContain('run')
    expect(questionsFor('crack')).not.toContain('shape')
    expect(questionsFor('crack')).not.toContain('wet')
    expect(questionsFor('nail-pops')).not.toContain('run')
    expect(questionsFor('sag')).toContain('wet')
    expect(questionsFor('stain')).toContain('wet')
  })

  it('lead forward and back over the same screens', () => {
    for (const kind of MARK_KINDS) {
      const questions = questionsFor(kind)
      for (const [index, question] of questions.entries()) {
        expect(questionBefore(question, kind)).toBe(questions[index - 1] ?? null)
        if (question !== 'send') expect(questionBefore(questionAfter(question, kind), kind)).toBe(question)
      }
      expect(questionAfter('send', kind)).toBe('send')
    }
  })

  it('let nobody past the room or the kind, by whatever address', () => {
    expect(reachableQuestion('send', blank)).toBe('room')
    expect(reachableQuestion('send', { ...blank, roomId: 'a room' })).toBe('look')
    expect(reachableQuestion('send', started)).toBe('send')
    expect(reachableQuestion('room', started)).toBe('room')
    expect(reachableQuestion('wet', started)).toBe('look')
  })

  it('begin at the room where the address names no question, however much was answered', () => {
    for (const asked of [undefined, 'no such question', ['where'], null]) expect(reachableQuestion(asked, started)).toBe('room')
  })

  it('may all be skipped but room, look and send', () => {
    expect(questionsFor('sag').filter(question => !isSkippable(question))).toEqual(['room', 'look', 'send'])
  })

  it('find the screen of a field that was refused', () => {
    expect(questionOfField('widthMm', 'crack')).toBe('size')
    expect(questionOfField('shape', 'crack')).toBe('look')
    expect(questionOfField('shape', 'stain')).toBe('shape')
    expect(questionOfField('photoIds', 'crack')).toBe('photos')
    expect(questionOfField('sameAsMarkId', 'crack')).toBe('send')
    expect(questionOfField('stain', 'crack')).toBe('send')
  })
})

describe('one picture', () => {
  it('decides kind and shape of a crack', () => {
    const answers = chooseLook(blank, 'gap-along-wall')
    expect(answers).toMatchObject({ kind: 'crack', shape: 'gap-along-wall' })
    expect(lookOf(answers)).toBe('gap-along-wall')
  })

  it('may leave the shape open', () => {
    expect(chooseLook(chooseLook(blank, 'straight-line'), 'crack')).toMatchObject({ kind: 'crack', shape: null })
    expect(lookOf({ kind: 'crack', shape: null })).toBe('crack')
    expect(lookOf(chooseLook(blank, 'sag'))).toBe('sag')
    expect(lookOf(blank)).toBeNull()
  })

  it('takes back what only another kind has, and keeps the rest', () => {
    const crack: ReportAnswers = { ...started, shape: 'straight-line', widthComparison: 'card', lengthMm: 900, direction: 'slanting', place: 'middle', pin: { xShare: 0.2, yShare: 0.3 }, doors: 'stick-a-bit' }
    expect(chooseLook(crack, 'stain')).toEqual({ ...crack, kind: 'stain', shape: null, widthComparison: null, lengthMm: null, direction: 'not-known' })
    const stain: ReportAnswers = { ...started, kind: 'stain', shape: 'ring', stain: 'damp', stainSizeMm: 270 }
    expect(chooseLook(stain, 'slanting-line')).toMatchObject({ shape: 'slanting-line', stain: 'none', stainSizeMm: null })
  })

  it('chosen again changes nothing', () => {
    const stain: ReportAnswers = { ...started, kind: 'stain', shape: 'ring', stain: 'damp' }
    expect(chooseLook(stain, 'stain')).toEqual(stain)
  })
})

describe('not sure', () => {
  it('takes back the answers of that screen and of no other', () => {
    const answers: ReportAnswers = { ...started, place: 'middle', pin: { xShare: 0, yShare: 1 }, doors: 'will-not-close', sounds: 'once', recentEvents: ['snow'] }
    expect(unanswer('where', answers)).toEqual({ ...answers, place: null, pin: null })
    expect(unanswer('changed', answers)).toEqual({ ...answers, doors: 'not-known', sounds: 'none' })
    expect(unanswer('around', answers)).toEqual({ ...answers, recentEvents: [] })
    expect(unanswer('photos', answers)).toEqual(answers)
  })

  it('never takes back the room or the kind', () => {
    expect(unanswer('room', started)).toEqual(started)
    expect(unanswer('look', started)).toEqual(started)
  })
})

import { describe, expect, it } from 'vitest'
import { MARK_KINDS, SHAPES_BY_KIND } from '../../../shared/types/mark'
import { REPORT_QUESTIONS } from '../../../shared/types/reportDraft'
import * as markWords from '../../../shared/utils/messages/markMessages'
import { FORM_ORDER, reportForm, type FormPart } from '../../../shared/utils/papers/reportForm'
import { LOOKS } from '../../../shared/utils/report/looks'
import { SAGS_BY_EYE, STAINS_BY_EYE } from '../../../shared/utils/report/sizesByEye'

const form = reportForm({ rooms: ['Bedroom', 'Hall'], system: 'us' })
const textOf = (part: FormPart) => part.kind === 'ticks' ? part.choices : part.kind === 'pictures' ? part.choices.map(({ label }) => label) : part.kind === 'blanks' ? part.labels : [part.label ?? '']
const all = form.flatMap(block => block.parts.flatMap(textOf))

describe('the report form on paper', () => {
  it('asks every question of the phone’s report once, danger first, the rest in the same order', () => {
    expect(form.map(block => block.question)).toEqual(FORM_ORDER)
    expect(FORM_ORDER[0]).toBe('danger')
    expect(FORM_ORDER.slice(1)).toEqual(REPORT_QUESTIONS.filter(question => question !== 'danger'))
  })

  it.each([
    'DANGER_SIGN_WORDS', 'MARK_PLACE_WORDS', 'WALL_TYPE_WORDS', 'WIDTH_COMPARISON_WORDS', 'DIRECTION_WORDS', 'STAIN_STATE_WORDS', 'DOOR_STATE_WORDS', 'SOUND_STATE_WORDS', 'CHANGE_ABOVE_WORDS', 'RECENT_EVENT_WORDS',
  ] as const)('offers every answer of %s', (words) => {
    for (const label of Object.values(markWords[words])) expect(all).toContain(label)
  })

  it('offers the home’s rooms and room for another, and every size by eye in the reader’s units', () => {
    expect(form.find(block => block.question === 'room')!.parts.flatMap(textOf)).toEqual(['Bedroom', 'Hall', 'or another room'])
    for (const { label, us } of [...SAGS_BY_EYE, ...STAINS_BY_EYE]) expect(all).toContain(`${label}, ${us.replaceAll(' ', '\u00A0')}`)
    const metric = reportForm({ rooms: [], system: 'metric' }).flatMap(block => block.parts.flatMap(textOf))
    for (const { label, metric: size } of SAGS_BY_EYE) expect(metric).toContain(`${label}, ${size.replaceAll(' ', '\u00A0')}`)
  })

  it('shows our drawing of every look and of every shape of bumps, sags and stains', () => {
    const drawn = form.flatMap(block => block.parts.flatMap(part => part.kind === 'pictures' ? part.choices.map(({ shape }) => shape) : []))
    for (const { value } of LOOKS) if (value !== 'crack') expect(drawn).toContain(value)
    for (const kind of MARK_KINDS) if (kind !== 'crack') for (const shape of SHAPES_BY_KIND[kind]) expect(drawn).toContain(shape)
  })

  it('asks nobody to climb, to stand under a sag or to go into the attic', () => {
    const leads = form.flatMap(block => [block.lead ?? '', ...block.parts.map(part => 'label' in part ? part.label ?? '' : '')]).join(' ')
    expect(leads).toContain('never stand under a sag')
    expect(leads).toContain('Nobody asks you to go into the attic')
    expect(leads).toContain('Never go back under a dangerous ceiling')
  })
})

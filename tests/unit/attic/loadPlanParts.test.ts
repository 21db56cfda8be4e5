// @vitest-environment happy-dom
import { enableAutoUnmount, flushPromises } from '@vue/test-utils'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import LoadPlanAdvice from '../../../components/attic/LoadPlanAdvice.vue'
import LoadPlanFields from '../../../components/attic/LoadPlanFields.vue'
import LoadPlanItemFacts from '../../../components/attic/LoadPlanItemFacts.vue'
import LoadPlanKey from '../../../components/attic/LoadPlanKey.vue'
import LoadPlanNewThing from '../../../components/attic/LoadPlanNewThing.vue'
import LoadPlanNudge from '../../../components/attic/LoadPlanNudge.vue'
import LoadPlanNumbers from '../../../components/attic/LoadPlanNumbers.vue'
import LoadPlanProblems from '../../../components/attic/LoadPlanProblems.vue'
import LoadPlanRule from '../../../components/attic/LoadPlanRule.vue'
import LoadPlanShadeWords from '../../../components/attic/LoadPlanShadeWords.vue'
import { shadesOf } from '../../../components/attic/loadPlanShades'
import { judgeContents, placedItem } from '../../../shared/utils/attic/judgeContents'
import { whereMayItGo } from '../../../shared/utils/structure/whereMayItGo'
import { field, item, survey } from './attics'
import { mountAttic, textOf } from './mountAttic'

enableAutoUnmount(afterEach)
const plain = (text: string) => text.replaceAll('\u00A0', ' ')

const books = item({ id: 'books', name: 'Books', xFt: 5, yFt: 8, quantity: 6 })
const strongback = { atFt: 6, size: '2x6' as const, breadthIn: null, depthIn: null, sound: true, engineerAccepts: false }
function standing(items = [books], one = survey()) {
  const [first] = judgeContents({ survey: one, documents: [], items }).fields
  if (first?.answer.kind !== 'field' || first.plan?.kind !== 'judged') return expect.fail('no plan')
  return { answer: first.answer, plan: first.plan, placed: items.map(placedItem), survey: one }
}

describe('the first rule', () => {
  it('is said before any number, and names what breaks it', async () => {
    const { plan } = standing()
    const shown = mountAttic(LoadPlanRule, { ratedPsf: 20, items: [books], judged: plan.items })
    expect(plain(textOf(shown))).toContain('nothing may press more than 20 psf')
    expect(plain(textOf(shown))).toContain('Books presses 75 psf in the middle half.')
    await shown.get('button').trigger('click')
    expect(shown.emitted('choose')).toEqual([['books']])
    const quiet = standing([item({ xFt: 0 })])
    expect(mountAttic(LoadPlanRule, { ratedPsf: 20, items: [item()], judged: quiet.plan.items }).findAll('li')).toHaveLength(0)
  })
})

describe('several groups of joists', () => {
  it('each say how they stand, and are chosen by a press', async () => {
    const contents = judgeContents({ survey: survey({ joistFields: [field, { ...field, name: 'South', spanFt: null }] }), documents: [], items: [books] })
    const shown = mountAttic(LoadPlanFields, { modelValue: 1, fields: contents.fields, joistFields: [field] })
    expect(shown.findAll('button').map(button => plain(button.text().replace(/\s+/g, ' ')))).toEqual([expect.stringMatching(/^North over, \d+ %$/), 'South not measured'])
    await shown.findAll('button')[1]!.trigger('click')
    expect(shown.emitted('update:modelValue')).toEqual([[2]])
  })
})

describe('the key to several groups', () => {
  const lying = (name: string, leftFt: number, joistsRun: 'left-right' | 'front-back' = 'left-right') => ({ ...field, name, layout: { leftFt, frontFt: 0, joistsRun } })

  it('draws them where they lie, the chosen one heavier, their joists as they run', () => {
    const shown = mountAttic(LoadPlanKey, { joistFields: [lying('North', 0), lying('South', 12, 'front-back')], chosen: 2 })
    expect(shown.get('svg').attributes('viewBox')).toBe('-1 -1 30 18')
    expect(shown.findAll('rect').map(rect => [rect.attributes('width'), rect.attributes('stroke-width')])).toEqual([['12', '1.5'], ['16', '3']])
    expect(shown.findAll('path').map(path => /H/.test(path.attributes('d') ?? ''))).toEqual([true, false])
  })

  it('draws nothing where fewer than two are told', () => {
    expect(mountAttic(LoadPlanKey, { joistFields: [lying('North', 0), field], chosen: 1 }).find('svg').exists()).toBe(false)
  })
})

describe('what to move', () => {
  beforeEach(() => { vi.useFakeTimers() })
  afterEach(() => { vi.useRealTimers() })
  const advice = async (items: typeof books[]) => {
    const { answer, placed } = standing(items)
    const shown = mountAttic(LoadPlanAdvice, { plan: { field: answer.field, items: placed, options: { member: answer.member }, others: [] }, items, fields: [{ number: 1, name: 'North', spanFt: 12 }, { number: 2, name: 'South', spanFt: 16 }] })
    await vi.runAllTimersAsync()
    await flushPromises()
    return shown
  }

  it('is looked for after a rest, told with what stands after it, and done by one tap', async () => {
    const shown = await advice([books])
    expect(plain(textOf(shown))).toMatch(/1 · Books, at the (left|right) wall, [\d.]+ ft from joist 1: then within, \d+ %/)
    await shown.get('button').trigger('click')
    expect(shown.emitted('change')).toMatchObject([[[{ id: 'books', lengthFt: 2, widthFt: 2 }]]])
  })

  it('of several moves all can be made at once', async () => {
    const shown = await advice([books, { ...books, id: 'paper', name: 'Paper', yFt: 2 }])
    expect(shown.findAll('li')).toHaveLength(2)
    await shown.findAll('button').at(-1)!.trigger('click')
    expect((shown.emitted('change')?.[0]?.[0] as { id: string }[]).map(move => move.id).sort()).toEqual(['books', 'paper'])
  })

  it('is carried over to other joists where its own have no place for it', async () => {
    const { answer, placed } = standing([item({ id: 'books', name: 'Books', xFt: 0, lengthFt: 12, widthFt: 4, quantity: 40 })])
    const others = [{ number: 2, field: { ...answer.field, spanFt: 16, joistCount: 20, ratedPsf: 60 }, items: [], options: { member: answer.member } }]
    const shown = mountAttic(LoadPlanAdvice, { plan: { field: answer.field, items: placed, options: { member: answer.member }, others }, items: [{ ...books, id: 'books' }], fields: [{ number: 2, name: 'South', spanFt: 16 }] })
    await vi.runAllTimersAsync()
    await flushPromises()
    expect(plain(textOf(shown))).toMatch(/1 · Books over to South, /)
    await shown.get('button').trigger('click')
    expect(shown.emitted('change')).toMatchObject([[[{ id: 'books', fieldNumber: 2 }]]])
  })

  it('says how much has to go where no move can help', async () => {
    const shown = await advice([item({ quantity: 80, xFt: 0, yFt: 0, lengthFt: 12, widthFt: 16 })])
    expect(plain(textOf(shown))).toContain('carry 160 lb more than their rated total')
    expect(shown.findAll('button')).toHaveLength(0)
  })

  it('is silent where nothing is wrong', () => {
    expect(mountAttic(LoadPlanAdvice, { plan: null, items: [], fields: [] }).text()).toBe('')
  })
})

describe('the chosen thing', () => {
  const facts = (change: object = {}) => {
    const { answer, plan } = standing()
    const places = whereMayItGo(answer.field, [], placedItem(books), { member: answer.member })
    return mountAttic(LoadPlanItemFacts, {
      item: books, judged: plan.items[0], joist: plan.joists[plan.worstJoist], places, editable: true, ratedPsf: 20,
      fields: [{ number: 1, name: 'North', spanFt: 12 }, { number: 2, name: 'South', spanFt: 10 }], ...change,
    })
  }

  it('moves to a better place by one tap, to other joists by a choice, and off the plan for a look', async () => {
    const shown = facts()
    expect(plain(textOf(shown))).toMatch(/1 · at the (left|right) wall, [\d.]+ ft from joist 1: \d+ % of the joists’ rating.*3 · /)
    await shown.findAll('button')[0]!.trigger('click')
    expect(shown.emitted('change')).toMatchObject([[[{ id: 'books' }]]])
    await shown.get('select').setValue('2')
    expect(shown.emitted('toField')).toEqual([[2]])
    await shown.findAll('button').at(-1)!.trigger('click')
    expect(shown.emitted('aside')).toEqual([['books']])
  })

  it('is only looked at by those who may not move it', () => {
    expect(facts({ editable: false }).findAll('button')).toHaveLength(0)
  })
})

describe('something new', () => {
  const { answer } = standing([])
  const type = async (weight: string, length: string, width: string, member: unknown = answer.member) => {
    const shown = mountAttic(LoadPlanNewThing, { field: answer.field, member, others: [] })
    for (const [index, text] of [weight, length, width].entries()) await shown.findAll('input')[index]!.setValue(text)
    await shown.get('form').trigger('submit')
    return shown
  }

  it('is given the best place, and put there on trial', async () => {
    const shown = await type('60', '2', '2')
    expect(plain(textOf(shown))).toMatch(/Best place: at the (left|right) wall/)
    await shown.get('button').trigger('click')
    expect(shown.emitted('add')).toMatchObject([[{ name: expect.stringContaining('60'), weightLb: 60, lengthFt: 2, widthFt: 2 }]])
  })

  it.each([['', '2', '2', 'new-weight'], ['-5', '2', '2', 'new-weight'], ['60', '13', '2', 'new-length'], ['60', '2', '0', 'new-width'], ['60', '2', 'x', 'new-width']])('%s lb on %s by %s ft is refused at its box', async (weight, length, width, box) => {
    const shown = await type(weight, length, width)
    expect(shown.findAll('[aria-invalid=true]').map(input => input.attributes('name'))).toEqual([box])
    expect(shown.emitted('add')).toBeUndefined()
  })

  it('says so where nothing takes it', async () => {
    expect(plain(textOf(await type('3000', '2', '2')))).toContain('No place over these joists takes it')
  })
})

describe('the plan in numbers', () => {
  const numbers = async (question: string, one = survey(), documents: object[] = []) => {
    const { answer, plan, placed } = standing([books], one)
    const shown = mountAttic(LoadPlanNumbers, { survey: one, documents, answer, plan, items: placed })
    await shown.findAll('[role=group] button').find(button => button.text() === question)!.trigger('click')
    return plain(textOf(shown))
  }

  it('begins with how heavy how far from the wall', async () => {
    expect(await numbers('How heavy, how far from the wall')).toMatch(/Over the wall.*1 ft.*6 ft, mid-span/)
  })

  it('shows all four limits of every joist', async () => {
    expect(await numbers('Every joist')).toMatch(/Bending.*Sag.*Shear.*On the wall.*AWC Design Aid No. 6/)
  })

  it('tells sag over the years against L/240 and L/120', async () => {
    expect(await numbers('Sag over the years')).toMatch(/about 1.5 times .*dry wood.*L\/240.*L\/120/)
    expect(await numbers('Sag over the years', survey({ ceilingFinish: 'plaster-on-lath', conditions: null }))).toMatch(/about 2 times.*L\/360/)
  })

  it('adds a person of 250 lb to no verdict', async () => {
    expect(await numbers('A person on the joists')).toMatch(/not added to any verdict: one person of 250 lb.*Step on joists or decking only/)
  })

  it('shows strongbacks beside the verdict, and says why they do not count', async () => {
    expect(await numbers('With strongbacks')).toContain('shows no strongback')
    const tied = survey({ joistFields: [{ ...field, strongbacks: [strongback] }] })
    expect(await numbers('With strongbacks', tied)).toMatch(/does not count\. A ceiling of gypsum board never counts\..*Joist8On its own100 %With strongback43 %/)
    const letter = { kind: 'engineer-letter', writtenOn: '2026-10-01', writtenBy: 'Edda Invented', attached: true, ratedPsf: null, liftsHold: false, acceptsStrongbacks: true, coversWholeAttic: true, area: '' }
    expect(await numbers('With strongbacks', tied, [letter])).toContain('is older than the survey')
  })
})

describe('by single presses', () => {
  it('everything moves as by a drag, and one thing is turned', async () => {
    const shown = mountAttic(LoadPlanNudge, { count: 1, turnable: true })
    const buttons = shown.findAll('button')
    expect(buttons.map(button => plain(button.attributes('aria-label') ?? button.text()))).toEqual(['0.5 ft towards the left wall', '0.5 ft towards the right wall', '0.5 ft towards joist 1', '0.5 ft towards the last joist', 'Turn it'])
    await buttons[1]!.trigger('click')
    await buttons[4]!.trigger('click')
    expect([shown.emitted('step'), shown.emitted('turn')]).toEqual([[['ArrowRight']], [[]]])
    expect(mountAttic(LoadPlanNudge, { count: 2, turnable: false }).findAll('button')).toHaveLength(4)
  })
})

describe('where it may go, hatched', () => {
  const { answer } = standing([])
  const places = whereMayItGo(answer.field, [], { lengthFt: 2, widthFt: 2, weightLb: 300 }, { member: answer.member })
  const spots = places.kind === 'places' ? places.spots : []

  it('covers exactly the places that would be near or over, and not the walls', () => {
    const shades = shadesOf(answer.field, spots, { lengthFt: 2, widthFt: 2 })
    const covers = (spot: { xFt: number, yFt: number }) => shades.filter(({ x, y, w, h }) => {
      const [cx, cy] = [(spot.xFt + 1) / 12, (spot.yFt + 1) / 16]
      return cx > x - 1e-9 && cx < x + w + 1e-9 && cy > y - 1e-9 && cy < y + h + 1e-9
    }).map(shade => shade.tone)
    for (const spot of spots) {
      const tone = spot.state === 'over' || spot.heavyInMiddle ? 'over' : spot.state
      expect(covers(spot).includes(tone as 'over')).toBe(tone !== 'within')
    }
    expect(shades.some(shade => shade.tone === 'over')).toBe(true)
    expect(Math.min(...shades.map(shade => shade.x))).toBeGreaterThan(1 / 12)
  })

  it('says the same in words', () => {
    const text = plain(textOf(mountAttic(LoadPlanShadeWords, { name: 'the chest', spots, drawn: true })))
    expect(text).toMatch(/^Tried every 0.5 ft: \d+ of 609 places take the chest within the rating, \d+ near it, \d+ would be over or too dense\./)
    expect(text).toContain('Hatched: keep its middle')
  })
})

describe('a plan that cannot be worked out', () => {
  const problem = (code: string, measure: string, limit: number | null, at: object = { part: 'item', id: 'books' }) => ({ code, at, measure, value: 400, limit })

  it('says at which thing and why, and brings it inside by one tap', async () => {
    const shown = mountAttic(LoadPlanProblems, {
      editable: true, names: new Map([['books', 'Books']]),
      problems: [problem('outside-field', 'xFt', 12), problem('outside-field', 'yFt', 0), problem('negative', 'weightLb', null), problem('span-too-long', 'spanFt', 40, { part: 'field' }), problem('spacing-not-plausible', 'spacingIn', 96, { part: 'field' }), problem('outside-span', 'atFt', 12, { part: 'strongback', index: 0 })],
    })
    expect(shown.findAll('li').map(li => plain(li.text().replace(/\s+/g, ' ')).replace(' Bring it inside', ''))).toEqual([
      'Books: it sticks out past the wall; the span is 12 ft.', 'Books: it stands before the first joist.', 'Books: its weight has to be a number, and not below zero.',
      'A span above 40 ft is never calculated. Is it in the right unit?', 'Joists do not stand 400 in apart. Is it in the right unit?', 'A strongback has to lie between the two walls.',
    ])
    await shown.get('button').trigger('click')
    expect(shown.emitted('inside')).toEqual([['books']])
  })
})

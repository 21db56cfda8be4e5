// @vitest-environment happy-dom
import { enableAutoUnmount, mount } from '@vue/test-utils'
import { createPinia, setActivePinia } from 'pinia'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { defineComponent, nextTick, reactive, ref } from 'vue'
import AtticPaperSays from '../../../components/attic/AtticPaperSays.vue'
import LoadPlanKeep from '../../../components/attic/LoadPlanKeep.vue'
import LoadPlanTools from '../../../components/attic/LoadPlanTools.vue'
import SurveyFieldLayout from '../../../components/attic/SurveyFieldLayout.vue'
import { useBestPlaces } from '../../../components/attic/useBestPlaces'
import { useTrialPlan } from '../../../components/attic/useTrialPlan'
import type { AtticDetail } from '../../../shared/types/atticDetail'
import type { PlacedItem } from '../../../shared/types/loadPlan'
import { judgeContents } from '../../../shared/utils/attic/judgeContents'
import { loadFieldOf } from '../../../shared/utils/structure/loadField'
import { field, item, survey } from './attics'
import { mountAttic, textOf } from './mountAttic'

enableAutoUnmount(afterEach)
beforeEach(() => {
  localStorage.clear()
  setActivePinia(createPinia())
})
const plain = (text: string) => text.replaceAll('\u00A0', ' ')

const books = item({ id: 'books', name: 'Books', xFt: 0, yFt: 8, quantity: 6 })
const detail: AtticDetail = {
  today: '2026-11-20', attic: { id: 'attic', name: 'Loft', notes: '', inventoryConfirmedOn: null, version: 1, archivedAt: null },
  unit: { id: 'u', name: 'Flat' }, property: { id: 'p', name: '1 Plumb Lane', yearBuilt: null, codeBasis: null },
  survey: survey(), surveys: [], documents: [], items: [books], events: [], itemPhotos: [], guesses: { count: 0, medianRatio: null }, contents: judgeContents({ survey: survey(), documents: [], items: [books] }), abilities: ['edit attic'],
}
function trialOf() {
  let trial!: ReturnType<typeof useTrialPlan>
  mount(defineComponent({
    setup() {
      trial = useTrialPlan(() => detail, () => true)
      return () => null
    },
  }))
  return trial
}

describe('a trial and what is saved', () => {
  const keep = (trial: ReturnType<typeof useTrialPlan>, props: object = {}) => mountAttic(LoadPlanKeep, { detail, trial, saving: false, said: '', trouble: '', ...props })

  it('stand side by side, and only Save asks to save', async () => {
    const trial = trialOf()
    const shown = keep(trial)
    expect(textOf(shown)).toBe('')
    trial.change([{ id: 'books', xFt: 5 }])
    await nextTick()
    expect(plain(textOf(shown))).toMatch(/^As saved: within, \d+ %\. On trial: (near|over), \d+ %\./)
    const [save, undo] = shown.findAll('button')
    expect(save!.text()).toContain('Save this move')
    await save!.trigger('click')
    expect(shown.emitted('save')).toHaveLength(1)
    await undo!.trigger('click')
    expect(textOf(shown)).toBe('')
  })

  it('things left out or only looked at are told, with the way to make it true; they are no move to save', async () => {
    const trial = trialOf()
    trial.setAside('books')
    trial.add({ name: '60 lb on trial', weightLb: 60, fieldNumber: 1, xFt: 0, yFt: 0, lengthFt: 2, widthFt: 2 })
    const shown = keep(trial)
    expect(textOf(shown)).toMatch(/Without Books\..*note that it was taken out.*With 60 lb on trial, which is not in the inventory/)
    expect(shown.findAllComponents({ name: 'RouterLinkStub' }).map(link => link.props('to'))).toEqual(['/attics/attic/items/books', '/attics/attic/items/new'])
    expect(textOf(shown)).not.toContain('Save')
    await shown.findAll('button')[0]!.trigger('click')
    await shown.findAll('button')[0]!.trigger('click')
    expect(trial.isTrial.value).toBe(false)
  })

  it('what went wrong is said above', () => {
    expect(textOf(keep(trialOf(), { trouble: 'Books: It would stick out.' }))).toContain('Books: It would stick out.')
  })

  it('steps back and forth by the tools', async () => {
    const trial = trialOf()
    const shown = mountAttic(LoadPlanTools, { trial, several: false, shaded: true, asTable: false, canShade: true, editable: true })
    expect(shown.findAll('button').map(button => button.text())).toEqual(['As a table', 'Choose several', 'Show where it may go'])
    trial.change([{ id: 'books', xFt: 5 }])
    await nextTick()
    await shown.findAll('button').find(button => button.text() === 'Undo')!.trigger('click')
    expect(trial.isTrial.value).toBe(false)
    await shown.findAll('button').find(button => button.text() === 'Do it again')!.trigger('click')
    expect(trial.isTrial.value).toBe(true)
    await shown.findAll('button')[1]!.trigger('click')
    expect(shown.emitted('update:several')).toEqual([[true]])
    await shown.setProps({ several: true })
    await shown.findAll('button')[2]!.trigger('click')
    expect(shown.emitted('all')).toHaveLength(1)
  })
})

describe('those who may not move anything', () => {
  it('still choose between drawing and table, and see where things may go', () => {
    const shown = mountAttic(LoadPlanTools, { trial: trialOf(), several: false, shaded: true, asTable: false, canShade: true, editable: false })
    expect(shown.findAll('button').map(button => button.text())).toEqual(['As a table', 'Show where it may go'])
  })
})

describe('where a thing may go', () => {
  it('is not worked out again while only that thing moves', () => {
    const answer = loadFieldOf(survey(), field, 20)
    if (answer.kind !== 'field') throw new Error('The field of these tests is measured.')
    const thing = ref<PlacedItem>({ id: 'books', xFt: 0, yFt: 0, lengthFt: 2, widthFt: 2, weightLb: 60 })
    const others = ref<PlacedItem[]>([])
    const places = useBestPlaces(() => ({ field: answer.field, member: answer.member, others: others.value, thing: thing.value }))
    const first = places.value
    thing.value = { ...thing.value, xFt: 5, yFt: 3 }
    expect(places.value).toBe(first)
    thing.value = { ...thing.value, weightLb: 90 }
    const heavier = places.value
    expect(heavier).not.toBe(first)
    others.value = [{ ...thing.value, id: 'other' }]
    expect(places.value).not.toBe(heavier)
  })
})

describe('what a paper says', () => {
  it('of strongbacks is asked only of an engineer\'s letter, and forgotten with another kind', async () => {
    const says = reactive({ kind: 'engineer-letter', liftsHold: false, acceptsStrongbacks: true, coversWholeAttic: true, area: '' })
    const shown = mountAttic(AtticPaperSays, { modelValue: says, errors: {} })
    expect(textOf(shown)).toContain('lets them share the load')
    says.kind = 'permit'
    await nextTick()
    expect(says.acceptsStrongbacks).toBe(false)
    expect(textOf(shown)).not.toContain('lets them share the load')
  })
})

describe('where a group of joists lies', () => {
  it('is told or left open, and an empty box is no place', async () => {
    const shown = mountAttic(SurveyFieldLayout, { modelValue: null, path: 'joistFields.0.layout', errors: { 'joistFields.0.layout': 'It lies over "North".' } })
    expect(textOf(shown)).toContain('It lies over "North".')
    await shown.get('input[type=checkbox]').setValue(true)
    expect(shown.emitted('update:modelValue')).toEqual([[{ leftFt: 0, frontFt: 0, joistsRun: 'left-right' }]])
    await shown.setProps({ modelValue: { leftFt: 2, frontFt: 3, joistsRun: 'left-right' } })
    await shown.findAll('input[type=text]')[0]!.setValue('')
    expect((shown.emitted('update:modelValue')!.at(-1)![0] as { leftFt: number }).leftFt).toBeNaN()
    await shown.get('select').setValue('front-back')
    expect(shown.emitted('update:modelValue')!.at(-1)).toMatchObject([{ frontFt: 3, joistsRun: 'front-back' }])
  })
})

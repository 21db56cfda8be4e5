// @vitest-environment happy-dom
import { mount } from '@vue/test-utils'
import { createPinia, setActivePinia } from 'pinia'
import { beforeEach, describe, expect, it } from 'vitest'
import { defineComponent, nextTick, ref } from 'vue'
import { useTrialPlan } from '../../../components/attic/useTrialPlan'
import type { AtticDetail } from '../../../shared/types/atticDetail'
import { judgeContents } from '../../../shared/utils/attic/judgeContents'
import { item, survey } from './attics'

const books = item({ id: 'books', name: 'Books', xFt: 5, yFt: 8, quantity: 6 })
const tools = item({ id: 'tools', name: 'Tools', xFt: 0, yFt: 0 })

function detailOf(items = [books, tools]): AtticDetail {
  const one = survey()
  return {
    today: '2026-11-20', attic: { id: 'attic', name: 'Loft', notes: '', inventoryConfirmedOn: null, version: 1, archivedAt: null },
    unit: { id: 'u', name: 'Flat' }, property: { id: 'p', name: '1 Plumb Lane', yearBuilt: null, codeBasis: null },
    survey: one, surveys: [], documents: [], items, events: [], itemPhotos: [], guesses: { count: 0, medianRatio: null }, contents: judgeContents({ survey: one, documents: [], items }), abilities: ['edit attic'],
  }
}

function trialOf(detail = ref(detailOf()), editable = true) {
  let trial!: ReturnType<typeof useTrialPlan>
  mount(defineComponent({
    setup() {
      trial = useTrialPlan(() => detail.value, () => editable)
      return () => null
    },
  }))
  return trial
}
const placeOf = (trial: ReturnType<typeof useTrialPlan>, id: string) => trial.items.value.find(one => one.id === id)

beforeEach(() => {
  localStorage.clear()
  setActivePinia(createPinia())
})

describe('a plan on trial', () => {
  it('judges what is moved at once, and leaves what is saved alone', () => {
    const detail = ref(detailOf())
    const trial = trialOf(detail)
    expect(trial.contents.value.state).toBe('over')
    trial.change([{ id: 'books', xFt: 0 }])
    expect(trial.contents.value.state).not.toBe('over')
    expect(detail.value.contents.state).toBe('over')
    expect(trial.changed.value.map(one => [one.id, one.xFt, one.version])).toEqual([['books', 0, 1]])
  })

  it('a moved thing put back where it stood is no change', () => {
    const trial = trialOf()
    trial.change([{ id: 'books', xFt: 0 }])
    trial.change([{ id: 'books', xFt: 5 }])
    expect(trial.changed.value).toEqual([])
    expect(trial.isTrial.value).toBe(false)
  })

  it('undoes and does again step by step; one gesture is one step', () => {
    const trial = trialOf()
    for (const xFt of [4.5, 4, 3.5]) trial.change([{ id: 'books', xFt }], 'drag 1')
    trial.change([{ id: 'tools', yFt: 2 }], 'drag 2')
    trial.undo()
    expect([placeOf(trial, 'books')?.xFt, placeOf(trial, 'tools')?.yFt]).toEqual([3.5, 0])
    trial.undo()
    expect(placeOf(trial, 'books')?.xFt).toBe(5)
    expect([trial.canUndo.value, trial.canRedo.value]).toEqual([false, true])
    trial.redo()
    trial.redo()
    expect([placeOf(trial, 'books')?.xFt, placeOf(trial, 'tools')?.yFt]).toEqual([3.5, 2])
    trial.undo()
    trial.change([{ id: 'tools', yFt: 6 }])
    expect(trial.canRedo.value).toBe(false)
  })

  it('the same gesture after an undo is a new step', () => {
    const trial = trialOf()
    trial.change([{ id: 'books', xFt: 4 }], 'keys books')
    trial.undo()
    trial.change([{ id: 'books', xFt: 3 }], 'keys books')
    trial.undo()
    expect(placeOf(trial, 'books')?.xFt).toBe(5)
  })

  it('shows the plan without a thing, and with one that is not up there; neither is a move to save', () => {
    const trial = trialOf()
    trial.setAside('books')
    expect(trial.items.value.map(one => one.id)).toEqual(['tools'])
    expect(trial.contents.value.state).toBe('within')
    const id = trial.add({ name: '90 lb on trial', weightLb: 90, fieldNumber: 1, xFt: 0, yFt: 4, lengthFt: 2, widthFt: 2 })
    trial.change([{ id, xFt: 1 }])
    expect(placeOf(trial, id)).toMatchObject({ xFt: 1, typicalLb: 90, quantity: 1 })
    expect(trial.contents.value.totalLb).toBe(140)
    expect(trial.changed.value).toEqual([])
    expect(trial.isTrial.value).toBe(true)
    trial.setAside(id)
    trial.putBack('books')
    expect(trial.items.value.map(one => one.id)).toEqual(['books', 'tools'])
  })

  it('undo all can itself be undone', () => {
    const trial = trialOf()
    trial.change([{ id: 'books', xFt: 0 }])
    trial.undoAll()
    expect(trial.isTrial.value).toBe(false)
    trial.undo()
    expect(placeOf(trial, 'books')?.xFt).toBe(0)
  })

  it('keeps its moves in this browser until they are saved', async () => {
    trialOf().change([{ id: 'books', xFt: 0, fieldNumber: 1 }])
    setActivePinia(createPinia())
    const again = trialOf()
    await nextTick()
    expect(placeOf(again, 'books')?.xFt).toBe(0)
    again.saved()
    expect(again.isTrial.value).toBe(false)
    expect(again.canUndo.value).toBe(false)
    expect(localStorage.getItem('lathkey.plan-drafts')).toBe('{}')
  })

  it('forgets moves of things that are gone, and shows no draft to those who may not edit', async () => {
    localStorage.setItem('lathkey.plan-drafts', JSON.stringify({ attic: { gone: { xFt: 3 }, tools: { yFt: 3 } } }))
    const trial = trialOf()
    await nextTick()
    expect(trial.changed.value.map(one => one.id)).toEqual(['tools'])
    expect(trialOf(ref(detailOf()), false).changed.value).toEqual([])
  })
})

// @vitest-environment happy-dom
import { enableAutoUnmount } from '@vue/test-utils'
import { afterEach, describe, expect, it } from 'vitest'
import { nextTick } from 'vue'
import LoadPlan from '../../../components/attic/LoadPlan.vue'
import type { LoadPlanChange } from '../../../components/attic/loadPlanTypes'
import LoadPlanTable from '../../../components/attic/LoadPlanTable.vue'
import CeilingPlan from '../../../components/ceiling/CeilingPlan.vue'
import MarkChartTable from '../../../components/ceiling/MarkChartTable.vue'
import MarkShapeDrawing from '../../../components/ceiling/MarkShapeDrawing.vue'
import HouseSection from '../../../components/house/HouseSection.vue'
import { unitSystemKey } from '../../../composables/useUnits'
import { mountUi } from './mountUi'

enableAutoUnmount(afterEach)

const plain = (text: string | undefined) => (text ?? '').replaceAll('\u00A0', ' ').replace(/\s+/g, ' ').trim()

const plan = {
  field: { spanFt: 14, spacingIn: 16, joistCount: 4 },
  items: [
    { id: 'p', name: 'Paper', xFt: 6, yFt: 1, lengthFt: 2.5, widthFt: 1.5, weightLb: 165, state: 'over' },
    { id: 't', name: 'Tools', xFt: 0, yFt: 0, lengthFt: 2, widthFt: 2, weightLb: 140, state: 'within' },
  ],
  joists: [{ utilisation: 0.2, state: 'within' }, { utilisation: 0.86, state: 'near' }, { utilisation: 1.28, state: 'over' }, { utilisation: 0.1, state: 'within' }],
  walls: { start: 'south wall', end: 'north wall' },
  editable: true,
}

function boxed(wrapper: ReturnType<typeof mountUi>) {
  const sheet = wrapper.get('[role=group]').element
  sheet.getBoundingClientRect = () => ({ left: 0, top: 0, width: 560, height: 160, x: 0, y: 0, right: 560, bottom: 160, toJSON: () => ({}) })
  return wrapper
}

const changesOf = (wrapper: { emitted: (name: string) => unknown[][] | undefined }) => (wrapper.emitted('change') ?? []).map(([changes]) => changes as LoadPlanChange[])

describe('the load plan on screen', () => {
  it('names every item with its weight, state and place, and every joist with its share in words', () => {
    const drawing = mountUi(LoadPlan, { props: plan })
    expect(drawing.findAll('button').map(button => plain(button.attributes('aria-label')))).toEqual([
      'Paper, 165 lb, over: 5.5 ft from the north wall, on joists 1 to 3', 'Tools, 140 lb, within: against the south wall, on joists 1 to 3',
    ])
    expect(drawing.findAll('ol li').map(li => plain(li.text()))).toEqual(['1 · 20 % within', '2 · 86 % near', '3 · 128 % over', '4 · 10 % within'])
  })

  it('moves and sizes an item by arrow keys, and says where it stands now', async () => {
    const drawing = mountUi(LoadPlan, { props: { ...plan, selectedIds: ['p'] } })
    const paper = drawing.get('button')
    await paper.trigger('keydown', { key: 'ArrowRight' })
    await paper.trigger('keydown', { key: 'ArrowLeft', shiftKey: true })
    expect(changesOf(drawing)).toEqual([[{ id: 'p', xFt: 6.5, yFt: 1 }], [{ id: 'p', lengthFt: 2 }]])
    expect(plain(drawing.get('[role=status]').text())).toContain('Paper, 165 lb')
  })

  it('selects the item that has the focus, and lets go with Escape', async () => {
    const drawing = mountUi(LoadPlan, { props: plan })
    await drawing.get('button').trigger('focus')
    await drawing.get('button').trigger('keydown', { key: 'Escape' })
    expect(drawing.emitted('select')).toEqual([[['p']], [[]]])
  })

  it('follows a drag by half feet, all of it one step to undo', async () => {
    const drawing = boxed(mountUi(LoadPlan, { props: plan }))
    await drawing.get('button').trigger('pointerdown', { button: 0, clientX: 250, clientY: 60 })
    for (const clientX of [252, 270, 271, 290]) await drawing.get('[role=group]').trigger('pointermove', { clientX, clientY: 60 })
    await drawing.get('[role=group]').trigger('pointerup')
    await drawing.get('[role=group]').trigger('pointermove', { clientX: 400, clientY: 60 })
    expect(changesOf(drawing)).toEqual([[{ id: 'p', xFt: 6.5, yFt: 1 }], [{ id: 'p', xFt: 7, yFt: 1 }]])
    expect(new Set(drawing.emitted('change')?.map(([, gesture]) => gesture)).size).toBe(1)
  })

  it('Escape on the way puts a dragged item back', async () => {
    const drawing = boxed(mountUi(LoadPlan, { props: plan }))
    await drawing.get('button').trigger('pointerdown', { button: 0, clientX: 250, clientY: 60 })
    await drawing.get('[role=group]').trigger('pointermove', { clientX: 290, clientY: 60 })
    await drawing.get('button').trigger('keydown', { key: 'Escape' })
    expect(changesOf(drawing).at(-1)).toEqual([{ id: 'p', xFt: 6, yFt: 1, lengthFt: 2.5, widthFt: 1.5 }])
  })

  it('moves all that are chosen together, by drag and by keys', async () => {
    const drawing = boxed(mountUi(LoadPlan, { props: { ...plan, selectedIds: ['p', 't'] } }))
    await drawing.get('button').trigger('keydown', { key: 'ArrowRight' })
    expect(changesOf(drawing)[0]?.map(change => change.id)).toEqual(['p', 't'])
    await drawing.get('button').trigger('pointerdown', { button: 0, clientX: 250, clientY: 60 })
    await drawing.get('[role=group]').trigger('pointermove', { clientX: 290, clientY: 60 })
    expect(changesOf(drawing)[1]?.map(change => change.id)).toEqual(['p', 't'])
  })

  it('adds to what is chosen with Ctrl, with Ctrl-A takes all, and with taps where several are asked for', async () => {
    const drawing = boxed(mountUi(LoadPlan, { props: { ...plan, selectedIds: ['p'] } }))
    const [paper, tools] = drawing.findAll('button')
    await tools!.trigger('pointerdown', { button: 0, ctrlKey: true })
    await tools!.trigger('keydown', { key: 'a', ctrlKey: true })
    expect(drawing.emitted('select')).toEqual([[['p', 't']], [['p', 't']]])
    await drawing.setProps({ several: true })
    await paper!.trigger('pointerdown', { button: 0 })
    await drawing.get('[role=group]').trigger('pointerup')
    expect(drawing.emitted('select')?.at(-1)).toEqual([[]])
    await tools!.trigger('click', { detail: 0 })
    expect(drawing.emitted('select')?.at(-1)).toEqual([['p', 't']])
  })

  it('sizes an item by each of its four corners', async () => {
    const drawing = boxed(mountUi(LoadPlan, { props: { ...plan, selectedIds: ['p'] } }))
    await drawing.get('.corner.end.last').trigger('pointerdown', { button: 0, clientX: 340, clientY: 100 })
    await drawing.get('[role=group]').trigger('pointermove', { clientX: 380, clientY: 100 })
    await drawing.get('[role=group]').trigger('pointerup')
    await drawing.get('.corner.start.first').trigger('pointerdown', { button: 0, clientX: 240, clientY: 40 })
    await drawing.get('[role=group]').trigger('pointermove', { clientX: 280, clientY: 40 })
    expect(changesOf(drawing)).toEqual([[{ id: 'p', xFt: 6, yFt: 1, lengthFt: 3.5, widthFt: 1.5 }], [{ id: 'p', xFt: 7, yFt: 1, lengthFt: 1.5, widthFt: 1.5 }]])
    expect(drawing.findAll('.corner')).toHaveLength(4)
    await drawing.setProps({ selectedIds: ['p', 't'] })
    expect(drawing.findAll('.corner')).toHaveLength(0)
  })

  it('that is only shown does not move', async () => {
    const drawing = boxed(mountUi(LoadPlan, { props: { ...plan, editable: false } }))
    await drawing.get('button').trigger('pointerdown', { button: 0, clientX: 0, clientY: 0 })
    await drawing.get('[role=group]').trigger('pointermove', { clientX: 200, clientY: 0 })
    await drawing.get('button').trigger('keydown', { key: 'ArrowRight' })
    expect(drawing.emitted('change')).toBeUndefined()
  })

  it('hatches where the chosen item may not go, and draws strongbacks across', () => {
    const drawing = mountUi(LoadPlan, { props: { ...plan, selectedIds: ['p'], strongbacksAtFt: [7], shades: [{ x: 0.25, y: 0, w: 0.5, h: 0.5, tone: 'over' }] } })
    const rect = drawing.get('.shades rect')
    expect(rect.attributes()).toMatchObject({ x: '25.000%', width: '50.000%' })
    expect(rect.attributes('fill')).toMatch(/shade-over/)
    expect(drawing.get('.strongback').attributes('style')).toContain('50')
    expect(drawing.find('.centre').exists()).toBe(true)
  })

  it('draws a field without items, and with a single joist', () => {
    const drawing = mountUi(LoadPlan, { props: { ...plan, items: [], field: { ...plan.field, joistCount: 1 }, joists: [{ utilisation: 0, state: 'within' }] } })
    expect(drawing.get('[role=group]').attributes('aria-label')).toContain('0 items on 1 joist,')
  })
})

describe('the load plan as a table', () => {
  it('moves and sizes an item as the drawing does', async () => {
    const table = mountUi(LoadPlanTable, { props: plan })
    const box = (label: string) => table.get(`input[aria-label="${label}"]`)
    await box('Paper, from the south wall, ft').setValue('11.5')
    await box('Paper, along the joists, ft').setValue('3 1/2')
    expect(changesOf(table)).toEqual([[{ id: 'p', xFt: 11.5 }], [{ id: 'p', lengthFt: 3.5 }]])
  })

  it('refuses a place outside the field at the box, and keeps what was typed', async () => {
    const table = mountUi(LoadPlanTable, { props: plan })
    const box = table.get('input[aria-label="Paper, from the south wall, ft"]')
    await box.setValue('40')
    expect(table.emitted('change')).toBeUndefined()
    expect(box.attributes('aria-invalid')).toBe('true')
    expect(document.getElementById(box.attributes('aria-describedby') ?? '')?.textContent).toBe('Between 0 and 11.5 ft.')
    expect(box.element).toHaveProperty('value', '40')
  })

  it('reads and writes metres for those who read metres', async () => {
    const table = mountUi(LoadPlanTable, { props: plan, global: { provide: { [unitSystemKey as symbol]: 'metric' } } })
    expect(plain(table.text())).toContain('75 kg')
    await table.get('input[aria-label="Paper, from the south wall, m"]').setValue('3.048')
    expect(changesOf(table)[0]?.[0]?.xFt).toBeCloseTo(10, 9)
  })
})

describe('the ceiling plan', () => {
  const room = { roomName: 'the bedroom', editable: true, marks: [{ id: 'm', label: 'Crack', kind: 'crack', activity: 'active', pin: { xShare: 0.9, yShare: 0.5 } }, { id: 'n', label: 'Stain', kind: 'stain', activity: 'too-few-readings', pin: null }] }

  it('places the pin where it is tapped', async () => {
    const ceiling = boxed(mountUi(CeilingPlan, { props: room }))
    await ceiling.get('[role=group]').trigger('click', { clientX: 140, clientY: 120 })
    expect(ceiling.emitted('update:pin')).toEqual([[{ xShare: 0.25, yShare: 0.75 }]])
  })

  it('can be used by keys alone', async () => {
    const ceiling = mountUi(CeilingPlan, { props: room })
    await ceiling.get('figcaption button').trigger('click')
    await nextTick()
    const pin = ceiling.get('button[aria-label^="Your pin"]')
    expect(document.activeElement).toBe(pin.element)
    await pin.trigger('keydown', { key: 'ArrowUp' })
    expect(ceiling.emitted('update:pin')?.at(-1)).toEqual([{ xShare: 0.5, yShare: 0.45 }])
    expect(ceiling.get('[role=status]').text()).toBe('The pin is in the middle of the ceiling.')
  })

  it('tells where each mark is, and says when nobody gave its place', async () => {
    const ceiling = mountUi(CeilingPlan, { props: room })
    expect(ceiling.findAll('li').map(li => plain(li.text()))).toEqual(['1 Crack, near the wall on the right', '2 Stain, place not given'])
    await ceiling.get('button[aria-label^="Crack"]').trigger('click')
    expect(ceiling.emitted('select')).toEqual([['m']])
  })
})

describe('the section on screen', () => {
  const home = {
    rooms: [{ name: 'Bedroom', widthShare: 1 }, { name: 'Hall', widthShare: 1 }],
    loads: [{ id: 'p', label: 'paper', weightText: '165 lb', weightLb: 165, state: 'over', positionShare: 0.7 }],
    marks: [{ id: 'm', label: '2.1 mm', name: 'crack', positionShare: 0.2, kind: 'crack', activity: 'active' }],
  }

  it('says in a sentence and a table what it draws', () => {
    const section = mountUi(HouseSection, { props: home })
    expect(section.get('figcaption .sr-only').text()).toBe('Section through the home, from left to right Bedroom and Hall: 1 load is stored above the ceiling, 1 over; 1 mark is being followed, 1 active.')
    const rows = section.findAll('tbody tr').map(row => row.findAll('td > span:last-child').map(cell => plain(cell.text())))
    expect(rows).toEqual([['above the ceiling', 'paper', '165 lb', 'Hall', 'over'], ['on the ceiling', 'crack', '2.1 mm', 'Bedroom', 'active']])
  })

  it('draws active marks double and heavy loads cross-hatched', () => {
    const svg = mountUi(HouseSection, { props: home }).get('svg')
    expect(svg.findAll('g[class*=madder] > path').length).toBeGreaterThanOrEqual(2)
    expect(svg.get('rect').attributes('fill')).toMatch(/-over\)$/)
  })

  it('as a thumb is one picture with the sentence as its name', () => {
    const thumb = mountUi(HouseSection, { props: { ...home, size: 'thumb' } })
    expect(thumb.get('[role=img]').attributes('aria-label')).toContain('1 over')
    expect(thumb.findAll('text')).toHaveLength(0)
  })
})

describe('marks', () => {
  it('the table of a chart tells readings, repairs and weights, newest first', () => {
    const table = mountUi(MarkChartTable, { props: { unit: 'mm', data: {
      readings: [{ takenOn: '2026-01-05', value: 1.25, sigma: 0.1, segment: 1 }], repairs: [{ on: '2026-03-01', label: 'Filled' }], loadSteps: [{ on: '2026-02-01', weightLb: 165 }],
    } } })
    const rows = table.findAll('tbody tr').map(row => row.findAll('td > span:last-child').map(cell => plain(cell.text())))
    expect(rows).toEqual([
      ['1 Mar 2026', 'Filled: readings start anew', '', ''],
      ['1 Feb 2026', 'Weight above from this day', '165 lb', ''],
      ['5 Jan 2026', 'Reading', '1.25 mm', '± 0.2 mm'],
    ])
  })

  it('a picture of a shape is silent, since its words stand beside it', () => {
    expect(mountUi(MarkShapeDrawing, { props: { shape: 'ring' } }).get('svg').attributes('aria-hidden')).toBe('true')
  })
})

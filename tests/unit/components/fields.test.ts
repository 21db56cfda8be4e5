// @vitest-environment happy-dom
import { afterEach, describe, expect, it } from 'vitest'
import { enableAutoUnmount } from '@vue/test-utils'
import { defineComponent, h, nextTick, ref } from 'vue'
import UiCheckbox from '../../../components/ui/UiCheckbox.vue'
import UiChoice from '../../../components/ui/UiChoice.vue'
import UiChoiceMany from '../../../components/ui/UiChoiceMany.vue'
import UiDate from '../../../components/ui/UiDate.vue'
import UiErrorSummary from '../../../components/ui/UiErrorSummary.vue'
import UiField from '../../../components/ui/UiField.vue'
import UiInput from '../../../components/ui/UiInput.vue'
import UiNumber from '../../../components/ui/UiNumber.vue'
import UiSelect from '../../../components/ui/UiSelect.vue'
import UiTextarea from '../../../components/ui/UiTextarea.vue'
import { mountUi } from './mountUi'

enableAutoUnmount(afterEach)

const controls = { UiInput, UiNumber, UiTextarea, UiDate, UiSelect } as const

describe('a field', () => {
  for (const [name, control] of Object.entries(controls)) {
    it(`ties its label, hint and error to ${name}`, () => {
      const field = mountUi(UiField, {
        props: { name: 'joists.0.spanFt', label: 'Span', hint: 'Between the walls.', error: 'Use more than 0.' },
        slots: { default: () => h(control as typeof UiInput, { options: [] } as never) },
      })
      const box = field.get('input, textarea, select').element
      expect(field.get('label').attributes('for')).toBe(box.id)
      expect(box.id).toBe('field-joists-0-spanFt')
      expect(box.getAttribute('aria-invalid')).toBe('true')
      const described = (box.getAttribute('aria-describedby') ?? '').split(' ').map(id => document.getElementById(id)?.textContent)
      expect(described.join(' ')).toContain('Between the walls.')
      expect(described.join(' ')).toContain('Use more than 0.')
    })
  }

  it('says nothing of errors while there are none', () => {
    const field = mountUi(UiField, { props: { name: 'name', label: 'Name' }, slots: { default: () => h(UiInput) } })
    expect(field.get('input').attributes('aria-invalid')).toBeUndefined()
    expect(field.get('input').attributes('aria-describedby')).toBeUndefined()
    expect(field.get('input').attributes('aria-required')).toBe('true')
  })

  it('that may stay empty says so in words', () => {
    const field = mountUi(UiField, { props: { name: 'name', label: 'Name', optional: true }, slots: { default: () => h(UiInput) } })
    expect(field.get('label').text()).toContain('can stay empty')
    expect(field.get('input').attributes('aria-required')).toBeUndefined()
  })
})

describe('UiNumber', () => {
  function numberBox(start: number | null = null, extra: object = {}) {
    const value = ref<number | null>(start)
    const wrapper = mountUi(defineComponent(() => () => h(UiNumber, { 'modelValue': value.value, 'onUpdate:modelValue': (v: number | null | undefined) => (value.value = v ?? null), ...extra })))
    return { value, wrapper }
  }

  it('gives the number that was typed and keeps the text as typed', async () => {
    const { value, wrapper } = numberBox()
    await wrapper.get('input').setValue('7.50')
    expect(value.value).toBe(7.5)
    expect(wrapper.get('input').element.value).toBe('7.50')
  })

  it('gives NaN for what is no number, so that a schema refuses it', async () => {
    const { value, wrapper } = numberBox()
    await wrapper.get('input').setValue('about ten')
    expect(value.value).toBeNaN()
    expect(wrapper.get('input').element.value).toBe('about ten')
  })

  it('lets "I cannot say" be an answer', async () => {
    const { value, wrapper } = numberBox(12, { unknown: 'Not measured', unit: 'ft' })
    await wrapper.get('input[type=checkbox]').setValue(true)
    expect(value.value).toBeNull()
    expect(wrapper.get('input[type=text]').element).toHaveProperty('value', '')
    await wrapper.get('input[type=text]').setValue('14')
    expect(wrapper.get('input[type=checkbox]').element).toHaveProperty('checked', false)
  })

  it('reads its unit with the number', () => {
    const { wrapper } = numberBox(12, { unit: 'ft' })
    const unitId = wrapper.get('input').attributes('aria-describedby') ?? ''
    expect(document.getElementById(unitId)?.textContent).toBe('ft')
  })

  it('follows a value set from outside', async () => {
    const { value, wrapper } = numberBox(12)
    value.value = 3
    await nextTick()
    expect(wrapper.get('input').element.value).toBe('3')
  })
})

describe('choices', () => {
  const options = [{ value: 'a', label: 'A straight line', description: 'often along a joint' }, { value: 'b', label: 'A wandering line' }]

  it('stand in one named group, each with its own label', () => {
    const set = mountUi(UiChoice, { props: { name: 'shape', label: 'What does it look like?', options, modelValue: null, error: 'Choose one of these.' } })
    expect(set.get('legend').text()).toBe('What does it look like?')
    const radios = set.findAll('label input[type=radio]')
    expect(radios.map(radio => radio.attributes('name'))).toEqual(['shape', 'shape'])
    const describedBy = set.get('fieldset').attributes('aria-describedby') ?? ''
    expect(document.getElementById(describedBy)?.textContent).toContain('Choose one of these.')
  })

  it('give the chosen value', async () => {
    const set = mountUi(UiChoice, { props: { name: 'shape', label: 'Shape', options, modelValue: null } })
    await set.findAll('input')[1]!.setValue()
    expect(set.emitted('update:modelValue')).toEqual([['b']])
  })

  it('show a drawing where one is given', () => {
    const set = mountUi(UiChoice, { props: { name: 'shape', label: 'Shape', options, modelValue: null }, slots: { drawing: ({ value }: { value: unknown }) => h('svg', { 'data-shape': String(value) }) } })
    expect(set.findAll('svg').map(svg => svg.attributes('data-shape'))).toEqual(['a', 'b'])
  })

  it('let "none of these" clear the others, and the others clear it', async () => {
    const chosen = ref<string[]>(['a'])
    const many = mountUi(defineComponent(() => () => h(UiChoiceMany<string>, {
      'name': 'signs', 'label': 'Signs', 'none': 'none', 'options': [...options, { value: 'none', label: 'None of these' }],
      'modelValue': chosen.value, 'onUpdate:modelValue': (value: string[]) => (chosen.value = value),
    })))
    await many.findAll('input')[2]!.setValue(true)
    expect(chosen.value).toEqual(['none'])
    await many.findAll('input')[1]!.setValue(true)
    expect(chosen.value).toEqual(['b'])
    await many.findAll('input')[1]!.setValue(false)
    expect(chosen.value).toEqual([])
  })

  it('of a select give back the value in its own type', async () => {
    const select = mountUi(UiSelect, { props: { options: [{ value: 16, label: '16 in' }, { value: 24, label: '24 in' }], modelValue: null } })
    await select.get('select').setValue('24')
    expect(select.emitted('update:modelValue')).toEqual([[24]])
  })
})

describe('a checkbox', () => {
  it('is named by its label and described by its error', async () => {
    const box = mountUi(UiCheckbox, { props: { name: 'agreed', label: 'I have read this', error: 'Please tick this.', modelValue: false } })
    expect(box.get('label').attributes('for')).toBe(box.get('input').element.id)
    expect(document.getElementById(box.get('input').attributes('aria-describedby') ?? '')?.textContent).toContain('Please tick this.')
    await box.get('input').setValue(true)
    expect(box.emitted('update:modelValue')).toEqual([[true]])
  })
})

describe('a day box', () => {
  it('gives null when it is emptied', async () => {
    const box = mountUi(UiDate, { props: { modelValue: '2027-03-14' } })
    await box.get('input').setValue('')
    expect(box.emitted('update:modelValue')).toEqual([[null]])
  })
})

describe('the error summary', () => {
  it('takes the focus when something is refused, and leads to the field', async () => {
    const page = mountUi(defineComponent({
      components: { UiErrorSummary, UiField, UiInput },
      props: { items: { type: Array as () => { field: string, message: string }[], default: () => [] } },
      template: '<div />',
      setup: props => () => h('div', [h(UiErrorSummary, { items: props.items }), h(UiField, { name: 'email', label: 'E-mail' }, () => h(UiInput))]),
    }))
    expect(page.find('[role=alert]').exists()).toBe(false)
    await page.setProps({ items: [{ field: 'email', message: 'Write an e-mail address.' }] })
    await nextTick()
    await nextTick()
    expect(document.activeElement).toBe(page.get('[role=alert]').element)
    expect(page.get('[role=alert] a').attributes('href')).toBe('#field-email')
    await page.get('[role=alert] a').trigger('click')
    expect(document.activeElement).toBe(page.get('input').element)
  })

  it('leads into a group of choices', async () => {
    const options = [{ value: 'a', label: 'A' }]
    const page = mountUi(defineComponent(() => () => h('div', [
      h(UiErrorSummary, { items: [{ field: 'shape', message: 'Choose one.' }] }), h(UiChoice, { name: 'shape', label: 'Shape', options }),
    ])))
    await page.get('[role=alert] a').trigger('click')
    expect(document.activeElement).toBe(page.get('input[type=radio]').element)
  })
})

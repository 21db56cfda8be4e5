import { mount } from '@vue/test-utils'
// @vitest-environment happy-dom
import { describe, expect, it } from 'vitest'
import { measureFromText, textFromMeasure } from '../../../components/ui/measureText'
import UiMeasure from '../../../components/ui/UiMeasure.vue'
import { unitSystemKey } from '../../../composables/useUnits'

const ft = (text: string, system: 'us' | 'metric' = 'us') => measureFromText(text, 'ft', system)

describe('a length somebody typed', () => {
  it.each([
    ['12', 12], ['12.5 ft', 12.5], ['12 ft 6 in', 12.5], ['12\' 6"', 12.5], ['12′ 6½″', 12 + 6.5 / 12], ['150 in', 12.5], ['12 feet 6 1/2 inches', 12 + 6.5 / 12],
    ['3.048 m', 10], ['304.8 cm', 10], ['3048mm', 10], ['1,200 mm', 1200 / 304.8],
  ])('%s is kept in feet', (text, feet) => {
    expect(ft(text)).toBeCloseTo(feet, 9)
  })

  it('without a unit is in the one shown beside the box', () => {
    expect([ft('3.048', 'us'), ft('3.048', 'metric')]).toEqual([3.048, expect.closeTo(10, 9)])
    expect(measureFromText('254', 'in', 'metric')).toBeCloseTo(10, 9)
  })

  it.each(['12 lb', 'wide', '12 ft x', '6 ft 2', '--3', '1,5 m'])('%s is not taken for one', (text) => {
    expect(ft(text)).toBeNaN()
  })

  it('is nothing when empty', () => {
    expect(ft('  ')).toBeNull()
  })
})

describe('a weight somebody typed', () => {
  it.each([['40 kg', 40 / 0.45359237], ['40 lbs', 40], ['500 g', 0.5 / 0.45359237], ['3 lb 8 oz', 3.5]])('%s', (text, lb) => {
    expect(measureFromText(text, 'lb', 'us')).toBeCloseTo(lb, 9)
  })
})

describe('a kept quantity', () => {
  it('is shown in the person\'s unit and reads back within a thousandth of it', () => {
    expect([textFromMeasure(12.5, 'ft', 'us'), textFromMeasure(12.5, 'ft', 'metric'), textFromMeasure(16, 'in', 'metric'), textFromMeasure(40, 'lb', 'metric')])
      .toEqual(['12.5', '3.81', '406.4', '18.14'])
    expect(measureFromText(textFromMeasure(11.37, 'ft', 'metric'), 'ft', 'metric')).toBeCloseTo(11.37, 2)
  })
})

describe('the box', () => {
  const box = (system: 'us' | 'metric', modelValue: number | null = null) => mount(UiMeasure, { props: { of: 'ft', name: 'span', modelValue }, global: { provide: { [unitSystemKey as symbol]: system } } })

  it('tells feet whatever is typed, and keeps the text that is no length', async () => {
    const wrapper = box('metric', 10)
    const input = wrapper.get('input')
    expect([input.element.value, wrapper.text()]).toEqual(['3.048', 'm'])
    await input.setValue('12 ft 6 in')
    expect(wrapper.emitted('update:modelValue')?.at(-1)).toEqual([12.5])
    await input.setValue('twelve')
    expect(wrapper.emitted('update:modelValue')?.at(-1)).toEqual([Number.NaN])
    expect(input.element.value).toBe('twelve')
  })
})

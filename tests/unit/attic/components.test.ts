// @vitest-environment happy-dom
import { flushPromises } from '@vue/test-utils'
import { afterEach, describe, expect, it } from 'vitest'
import { reactive } from 'vue'
import AtticItems from '../../../components/attic/AtticItems.vue'
import AtticRating from '../../../components/attic/AtticRating.vue'
import AtticVerdict from '../../../components/attic/AtticVerdict.vue'
import ItemBestPlace from '../../../components/attic/ItemBestPlace.vue'
import ItemWeightFields from '../../../components/attic/ItemWeightFields.vue'
import type { StoredItem } from '../../../shared/types/item'
import { ITEM_CATALOGUE } from '../../../shared/utils/goods/itemCatalogue'
import { itemFacts } from '../../../shared/utils/attic/itemFacts'
import { judgeContents } from '../../../shared/utils/attic/judgeContents'
import { ESTIMATE_CAVEAT, HOLD_CAUTION, TRUSS_CAUTION, UNLOAD_FIRST } from '../../../shared/utils/messages/safety'
import { rateAttic } from '../../../shared/utils/structure/rating'
import { field, item, survey } from './attics'
import { mountAttic, textOf } from './mountAttic'

const judge = (items: StoredItem[], surveyed = survey()) => judgeContents({ survey: surveyed, documents: [], items })
afterEach(() => {
  document.body.innerHTML = ''
})

describe('the verdict of an attic', () => {
  it('says the whole caution to unload first when it is over, and only then', () => {
    expect(textOf(mountAttic(AtticVerdict, { contents: judge([item({ lowLb: 900, typicalLb: 900, highLb: 900, xFt: 5 })]) }))).toContain(UNLOAD_FIRST)
    expect(textOf(mountAttic(AtticVerdict, { contents: judge([item({ lowLb: 30, typicalLb: 30, highLb: 30 })]) }))).not.toContain('Unload')
  })
})

describe('the rating of an attic', () => {
  it('says where the figure comes from, that it is an estimate, and the four limits of each group of joists', () => {
    const text = textOf(mountAttic(AtticRating, { rating: rateAttic(survey()) }))
    expect(text).toContain('20 psf from the class of attic in the code')
    expect(text).toContain(ESTIMATE_CAVEAT)
    for (const limit of ['Bending', 'Sag', 'Shear', 'Bearing']) expect(text).toContain(limit)
    expect(text).toContain('National Design Specification')
  })

  it('says the whole caution on a hold and on trusses, and shows no joist there', () => {
    expect(textOf(mountAttic(AtticRating, { rating: rateAttic(survey({ conditions: ['rotten'] })) }))).toContain(HOLD_CAUTION)
    const trusses = textOf(mountAttic(AtticRating, { rating: rateAttic(survey({ framing: 'trusses', joistFields: [] })) }))
    expect(trusses).toContain(TRUSS_CAUTION)
    expect(trusses).not.toContain('Bending')
  })
})

describe('the list of what is stored', () => {
  const items = [item({ name: 'Books', quantity: 3, weightSource: 'estimate', lowLb: 30, typicalLb: 40, highLb: 50, belongsTo: 'tenant' }), item({ id: 'b', name: 'Astray', xFt: 11.5 })]

  it('gives total weights with their range, place, owner and what is wrong with a place', () => {
    const text = textOf(mountAttic(AtticItems, { atticId: 'x', items, contents: judge(items), editable: false })).replaceAll('\u00A0', ' ')
    expect(text).toContain('Books × 3')
    expect(text).toContain('120 lb')
    expect(text).toContain('90 lb to 150 lb')
    expect(text).toContain('at the wall')
    expect(text).toContain('Tenant')
    expect(text).toContain('outside the measured joists')
  })

  it('offers changing and taking out, each named by its item, only to those who may', async () => {
    const shown = mountAttic(AtticItems, { atticId: 'x', items, contents: judge(items), editable: true })
    const out = shown.findAll('button').filter(button => button.text().startsWith('Take out'))
    expect(out.map(button => button.text().replace(/\s+/g, ' '))).toEqual(['Take out Books', 'Take out Astray'])
    await out[1]!.trigger('click')
    expect(shown.emitted('remove')).toEqual([[items[1]]])
    expect(shown.findAllComponents({ name: 'RouterLinkStub' }).map(link => link.props('to'))).toEqual(['/attics/x/items/a', '/attics/x/items/b'])
    expect(mountAttic(AtticItems, { atticId: 'x', items, contents: judge(items), editable: false }).findAll('button')).toHaveLength(0)
  })
})

describe('ways to a weight', () => {
  const mountWeights = (facts: ReturnType<typeof itemFacts>, props: object = {}) => {
    const model = reactive(facts)
    return { model, shown: mountAttic(ItemWeightFields, { modelValue: model, errors: {}, ...props }) }
  }
  const choose = async (shown: ReturnType<typeof mountAttic>, value: string) => {
    await shown.find(`input[value="${value}"]`).setValue(true)
    await flushPromises()
  }

  it('take the catalogue\'s three weights for a thing of the catalogue', () => {
    const row = ITEM_CATALOGUE[0]!
    const { model } = mountWeights(itemFacts(item({ catalogueKey: row.key, weightSource: 'estimate' })))
    expect(model).toMatchObject({ weightSource: 'catalogue', lowLb: row.lowLb, typicalLb: row.typicalLb, highLb: row.highLb })
  })

  it('keep what was noted until another way is chosen; a scale has one weight, a guess is widened', async () => {
    const { model, shown } = mountWeights(itemFacts(item({ weightSource: 'estimate', lowLb: 30, typicalLb: 40, highLb: 60 })), { kept: true })
    expect(model).toMatchObject({ lowLb: 30, typicalLb: 40, highLb: 60, weightSource: 'estimate' })
    await choose(shown, 'scale')
    expect(model.typicalLb).toBe(0)
    await shown.find('input[type="text"]').setValue('52')
    expect(model).toMatchObject({ lowLb: 52, typicalLb: 52, highLb: 52, weightSource: 'weighed' })
    await choose(shown, 'guess')
    // Large boxes are guessed at down to half of what they weigh (published; calculations of goodsDensities).
    expect(model).toMatchObject({ weightSource: 'estimate', highLb: 104 })
    await choose(shown, 'kept')
    expect(model).toMatchObject({ lowLb: 30, typicalLb: 40, highLb: 60 })
  })

  it('weigh by size and contents: 7 lb a cubic foot for mixed things, per piece', async () => {
    const { model, shown } = mountWeights(itemFacts(item({ quantity: 2, lengthFt: 2, widthFt: 2, heightFt: 2 })))
    await choose(shown, 'contents')
    expect(model.typicalLb).toBeCloseTo(8 * 7 / 2, 9)
  })
})

describe('the best place', () => {
  it('is offered with its share and taken by one press; an item that stands there is told so', async () => {
    const { fields } = judge([])
    const shown = mountAttic(ItemBestPlace, { item: itemFacts(item({ xFt: 5 })), others: [], fields, system: 'us' })
    await shown.find('button').trigger('click')
    const [[spot]] = shown.emitted('take') as [[{ xFt: number, yFt: number }]]
    expect([0, 10]).toContain(spot.xFt)
    expect(textOf(mountAttic(ItemBestPlace, { item: itemFacts(item(spot)), others: [], fields, system: 'us' }))).toMatch(/^It stands at the best free place/)
  })

  it('is not guessed where the joists are not measured', () => {
    const { fields } = judge([], survey({ joistFields: [{ ...field, spanFt: null }] }))
    expect(textOf(mountAttic(ItemBestPlace, { item: itemFacts(item()), others: [], fields, system: 'us' }))).toBe('')
  })
})

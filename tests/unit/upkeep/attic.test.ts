import { describe, expect, it } from 'vitest'
import type { AtticItem } from '../../../shared/types/item'
import type { FindingRule } from '../../../shared/types/finding'
import { findAtticFindings, type AtticJudgement } from '../../../shared/utils/upkeep/findAtticFindings'

function item(changes: Partial<AtticItem> = {}): AtticItem {
  return {
    id: 'i1', atticId: 'a1', catalogueKey: null, label: 'Box', category: 'boxes', count: 1, weightSource: 'weighed', lowLb: 100, typicalLb: 100, highLb: 100,
    lengthFt: 3, widthFt: 3, heightFt: 2, placement: null, owner: 'tenant', addedOn: '2026-09-01', removedOn: null, note: null, ...changes,
  }
}

const rated = { ratedPsf: 20, hold: false, basis: 'joists', reasons: [] }

function attic(changes: Partial<AtticJudgement> = {}): AtticJudgement {
  return {
    atticId: 'a1', today: '2026-12-01', rating: rated, load: null, ratedTotalLb: 1000, items: [item()],
    confirmedOn: '2026-09-01', inspectedOn: '2026-09-01', ...changes,
  }
}

function rules(judgement: AtticJudgement): FindingRule[] {
  return findAtticFindings(judgement).map(finding => finding.rule)
}

describe('Findings of an attic', () => {
  it('are none for a small load in a surveyed attic', () => {
    expect(findAtticFindings(attic())).toEqual([])
  })

  it('name what is entered outside the measured joists, whose load nobody can judge', () => {
    expect(findAtticFindings(attic({ outside: ['i1'] }))).toEqual([{
      rule: 'item-outside-joists', subject: { kind: 'attic', id: 'a1' }, severity: 'attention', evidence: { itemId: 'i1', label: 'Box', itemCount: 1 }, adviceCode: 'mend-place',
    }])
  })

  it('are none for an empty attic, even unsurveyed or on hold', () => {
    expect(rules(attic({ items: [], rating: null }))).toEqual([])
    expect(rules(attic({ items: [], rating: { ...rated, hold: true } }))).toEqual([])
  })

  it.each([
    [799, []], [800, ['near', 'attention']], [1000, ['near', 'attention']], [1001, ['over', 'urgent']],
  ])('%i lb of 1,000 lb rated gives %o', (typicalLb, expected) => {
    const [finding] = findAtticFindings(attic({ items: [item({ lowLb: typicalLb, typicalLb, highLb: typicalLb })] }))
    expect(finding?.rule === 'attic-load' ? [finding.evidence.state, finding.severity] : []).toEqual(expected)
  })

  it('carry the numbers at the time', () => {
    const [finding] = findAtticFindings(attic({ items: [item({ lowLb: 1200, typicalLb: 1200, highLb: 1200 })] }))
    expect(finding).toMatchObject({
      rule: 'attic-load', subject: { kind: 'attic', id: 'a1' }, adviceCode: 'stop-adding-and-unload',
      evidence: { totalLb: 1200, ratedTotalLb: 1000, ratedPsf: 20, utilisation: 1.2 },
    })
  })

  it('say an uncertain load may exceed its rating when the chance is over 10 %', () => {
    const wide = item({ weightSource: 'estimate', lowLb: 300, typicalLb: 750, highLb: 1900 })
    expect(findAtticFindings(attic({ items: [wide] }))).toMatchObject([{ rule: 'attic-may-exceed', severity: 'notice', evidence: { totalLb: 750 } }])
    const narrow = item({ weightSource: 'estimate', lowLb: 700, typicalLb: 750, highLb: 800 })
    expect(rules(attic({ items: [narrow] }))).toEqual([])
  })

  it('ask for a survey before anything else is judged', () => {
    expect(findAtticFindings(attic({ rating: null }))).toMatchObject([{ rule: 'contents-without-survey', adviceCode: 'survey-attic' }])
  })

  it('are urgent under a hold, with its reasons, whatever the weight', () => {
    const judgement = attic({ rating: { ratedPsf: 0, hold: true, basis: 'hold', reasons: [{ code: 'condition' }] }, items: [item({ lowLb: 5, typicalLb: 5, highLb: 5 })] })
    expect(findAtticFindings(judgement)).toMatchObject([{ rule: 'contents-under-hold', severity: 'urgent', evidence: { totalLb: 5, holdReasons: ['condition'] } }])
  })

  it('speak up for contents on trusses', () => {
    expect(findAtticFindings(attic({ rating: { ratedPsf: 0, hold: false, basis: 'framing', reasons: [] } })))
      .toMatchObject([{ rule: 'contents-without-storage', evidence: { basis: 'framing', itemCount: 1 } }])
  })

  it('name the worst joist and how many are over', () => {
    const joists = [0.5, 1.1, 1.6, 1].map((utilisation, i) => ({ fieldId: 'f1', joistNumber: i + 1, utilisation }))
    expect(findAtticFindings(attic({ load: { totalLb: 100, ratedTotalLb: 4000, joists, heavyInMiddle: [] } })))
      .toMatchObject([{ rule: 'joist-over', severity: 'urgent', evidence: { joistNumber: 3, utilisation: 1.6, joistsOver: 2 } }])
  })

  it('point at the heaviest item in the middle even when the joists pass', () => {
    const load = { totalLb: 300, ratedTotalLb: 4000, joists: [], heavyInMiddle: ['i1', 'i2'] }
    const items = [item({ lengthFt: 2, widthFt: 2 }), item({ id: 'i2', label: 'Books', lengthFt: 1, widthFt: 2 })]
    expect(findAtticFindings(attic({ load, items })))
      .toMatchObject([{ rule: 'heavy-item-in-middle', evidence: { itemId: 'i2', pressurePsf: 50, ratedPsf: 20, itemCount: 2 }, adviceCode: 'move-to-bearing-walls' }])
  })

  it('take the rated total of the load plan before the floor area’s', () => {
    const load = { totalLb: 100, ratedTotalLb: 110, joists: [], heavyInMiddle: [] }
    expect(rules(attic({ load }))).toEqual(['attic-load'])
  })

  it('say nothing about the total where no area is known', () => {
    expect(rules(attic({ ratedTotalLb: null, items: [item({ lowLb: 9000, typicalLb: 9000, highLb: 9000 })] }))).toEqual([])
  })

  it('name what does not belong in an attic', () => {
    const tile = item({ catalogueKey: 'ceramic-tile-box-for-10-ft2', label: 'Tile' })
    expect(findAtticFindings(attic({ items: [item({ id: 'i0' }), tile] }))).toMatchObject([{ rule: 'refused-item', evidence: { label: 'Tile', reason: 'building-material', itemCount: 1 } }])
  })

  it('ask to confirm the list after twelve months, counted from its first item when never confirmed', () => {
    expect(rules(attic({ confirmedOn: '2025-12-01' }))).toEqual([])
    expect(rules(attic({ confirmedOn: '2025-11-30' }))).toEqual(['inventory-stale'])
    expect(findAtticFindings(attic({ confirmedOn: null, items: [item({ addedOn: '2025-06-01' }), item({ id: 'i2', addedOn: '2026-01-01' })] })))
      .toMatchObject([{ rule: 'inventory-stale', evidence: { confirmedOn: null, dueOn: '2026-06-01' } }])
  })

  it('want an inspection every six months under goods, every twelve without', () => {
    expect(findAtticFindings(attic({ inspectedOn: '2026-05-30' }))).toMatchObject([{ rule: 'inspection-overdue', evidence: { dueOn: '2026-11-30', daysLate: 1 } }])
    expect(rules(attic({ inspectedOn: '2026-05-30', items: [] }))).toEqual([])
    expect(rules(attic({ inspectedOn: '2025-11-30', items: [] }))).toEqual(['inspection-overdue'])
    expect(rules(attic({ inspectedOn: null }))).toEqual([])
  })
})

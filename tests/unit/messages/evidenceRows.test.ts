import { describe, expect, it } from 'vitest'
import type { Finding, FindingEvidence, FindingRule } from '../../../shared/types/finding'
import { FINDING_RULES } from '../../../shared/types/finding'
import { evidenceRows } from '../../../shared/utils/messages/evidenceRows'

const growth = { slopePerYear: 2.4, interval: [1.1, 3.7] as [number, number], readingCount: 9, spanDays: 240 }
const EXAMPLES: FindingEvidence = {
  'attic-load': { state: 'over', totalLb: 5500, ratedTotalLb: 4800, ratedPsf: 20, utilisation: 1.146, chanceOfExceeding: 0.93 },
  'attic-may-exceed': { totalLb: 3600, highLb: 5000, ratedTotalLb: 4800, chanceOfExceeding: 0.2 },
  'joist-over': { fieldId: 'Main', joistNumber: 4, utilisation: 1.3, joistsOver: 2 },
  'item-outside-joists': { itemId: 'x', label: 'Books', itemCount: 1 },
  'heavy-item-in-middle': { itemId: 'x', label: 'Books', pressurePsf: 45, ratedPsf: 20, itemCount: 1 },
  'contents-under-hold': { totalLb: 40, holdReasons: ['condition'] },
  'contents-without-survey': { totalLb: 40, itemCount: 2 },
  'contents-without-storage': { totalLb: 40, itemCount: 2, basis: 'framing' },
  'refused-item': { itemId: 'x', label: 'Water heater', reason: 'holds-water', itemCount: 1 },
  'inventory-stale': { confirmedOn: '2026-01-05', dueOn: '2027-01-05' },
  'new-mark': { firstSeenOn: '2027-03-14' },
  'new-mark-under-load': { totalLb: 900, utilisation: 0.4, firstSeenOn: '2027-03-14' },
  'mark-active': { ...growth, since: '2027-02-01', unit: 'mm' },
  'mark-sudden': { value: 4, previous: 1, rise: 3, threshold: 1, takenOn: '2027-03-14', unit: 'mm' },
  'width-class-up': { fromClass: 1, toClass: 2, widthMm: 1.4, takenOn: '2027-03-14' },
  'nail-pops-growing': { fromCount: 2, toCount: 6, takenOn: '2027-03-14' },
  'nail-pops-in-line': { count: 4, takenOn: '2027-03-14' },
  'sag-over-limit': { dropMm: 20, limitMm: 15, divisor: 240, spanMm: 3600, takenOn: '2027-03-14' },
  'sag-growing': growth,
  'stain-wet': { state: 'dripping', seenOn: '2027-03-14' },
  'danger-sign': { signs: ['bits-falling', 'water-dripping'], seenOn: '2027-03-14' },
  'reading-overdue': { dueOn: '2027-03-14', daysLate: 9 },
  'inspection-overdue': { dueOn: '2027-03-14', daysLate: 9 },
  'job-overdue': { dueOn: '2027-03-14', daysLate: 1, title: 'Gutter' },
  'no-working-contact': { reason: 'address-bounced' },
}
const IDS_AND_UNITS = ['fieldId', 'itemId', 'unit']
const rowsOf = (rule: FindingRule, system: 'us' | 'metric' = 'us') => evidenceRows({ evidence: EXAMPLES[rule] } as Finding, system)

describe('the numbers of a finding', () => {
  it.each(FINDING_RULES)('all show, each with a label, for %s', (rule) => {
    const shown = rowsOf(rule)
    expect(shown.map(row => row.key).sort()).toEqual(Object.keys(EXAMPLES[rule]).filter(key => !IDS_AND_UNITS.includes(key)).sort())
    for (const { label, value } of shown) {
      expect(label).toMatch(/^[A-Z]/)
      expect(value).not.toMatch(/undefined|NaN|null|\[object/)
    }
  })

  it('carry their unit, in the system the reader uses', () => {
    expect(rowsOf('attic-load').find(row => row.key === 'totalLb')?.value.replaceAll('\u00A0', ' ')).toBe('5,500 lb')
    expect(rowsOf('attic-load', 'metric').find(row => row.key === 'totalLb')?.value).toMatch(/kg$/)
    expect(rowsOf('job-overdue').find(row => row.key === 'daysLate')?.value.replaceAll('\u00A0', ' ')).toBe('1 day')
  })
})

import { describe, expect, it } from 'vitest'
import { lookAgainUntilOn, MOST_REST_DAYS } from '../../../shared/utils/upkeep/lookAgain'

describe('how long a finding may rest', () => {
  it('is a week for a danger sign, whatever else it is', () => {
    expect(lookAgainUntilOn({ rule: 'danger-sign', severity: 'urgent' }, '2027-02-25')).toBe('2027-03-04')
  })

  it('is shorter the graver it is', () => {
    expect(MOST_REST_DAYS.danger).toBeLessThan(MOST_REST_DAYS.urgent)
    expect(MOST_REST_DAYS.urgent).toBeLessThan(MOST_REST_DAYS.attention)
    expect(MOST_REST_DAYS.attention).toBeLessThan(MOST_REST_DAYS.notice)
    expect(lookAgainUntilOn({ rule: 'attic-load', severity: 'attention' }, '2027-01-01')).toBe('2027-06-30')
  })
})

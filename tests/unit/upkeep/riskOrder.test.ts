import { expect, it } from 'vitest'
import { FINDING_RULES } from '../../../shared/types/finding'
import { RISK_ORDER } from '../../../shared/utils/upkeep/riskOrder'

it('gives every rule one place in the order of risk', () => {
  expect([...RISK_ORDER].sort()).toEqual([...FINDING_RULES].sort())
})

it('puts what may fall on somebody before anything that is only late', () => {
  expect(RISK_ORDER.indexOf('danger-sign')).toBe(0)
  expect(RISK_ORDER.indexOf('joist-over')).toBeLessThan(RISK_ORDER.indexOf('job-overdue'))
})

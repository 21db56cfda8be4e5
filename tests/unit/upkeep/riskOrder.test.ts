import { expect, it } from 'vitest'
import { FINDING_RULES } from '../../../shared/types/finding'
import { fallRisk } from '../../../shared/utils/upkeep/fallRisk'
import { RISK_ORDER } from '../../../shared/utils/upkeep/riskOrder'

it('gives every rule one place in the order of risk', () => {
  expect([...RISK_ORDER].sort()).toEqual([...FINDING_RULES].sort())
})

it('puts what may fall on somebody before anything that is only late', () => {
  expect(RISK_ORDER.indexOf('danger-sign')).toBe(0)
  expect(RISK_ORDER.indexOf('joist-over')).toBeLessThan(RISK_ORDER.indexOf('job-overdue'))
})

it('of equals puts first what is heavier, what falls further, and what hangs over a bed', () => {
  const board = { ceilingFinish: 'gypsum-half-inch', ceilingHeightIn: 96, isBedroom: false } as const
  expect(fallRisk(board)).toBeCloseTo(2.2 * 8, 12)
  expect(fallRisk({ ...board, ceilingFinish: 'plaster-on-lath' })).toBeGreaterThan(fallRisk(board))
  expect(fallRisk({ ...board, ceilingHeightIn: 120 })).toBeGreaterThan(fallRisk(board))
  expect(fallRisk({ ...board, isBedroom: true })).toBe(2 * fallRisk(board))
})

it('takes a finish nobody named as the heaviest, and a height nobody measured as usual', () => {
  const unknown = { ceilingFinish: 'unknown', ceilingHeightIn: null, isBedroom: false } as const
  expect(fallRisk(unknown)).toBe(fallRisk({ ...unknown, ceilingFinish: 'plaster-on-lath', ceilingHeightIn: 96 }))
})

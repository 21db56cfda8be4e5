import type { FindingRule } from '../../types/finding'

/** Of findings equally grave: what could fall on somebody first, then what weighs, then what moves, then what is only late. Ours. */
export const RISK_ORDER: readonly FindingRule[] = [
  'danger-sign', 'mark-sudden', 'sag-over-limit', 'sag-growing', 'stain-wet', 'nail-pops-in-line',
  'contents-under-hold', 'joist-over', 'item-outside-joists', 'attic-load', 'contents-without-storage', 'refused-item', 'heavy-item-in-middle', 'contents-without-survey',
  'mark-active', 'nail-pops-growing', 'width-class-up', 'new-mark-under-load', 'attic-may-exceed', 'new-mark',
  'job-overdue', 'reading-overdue', 'inspection-overdue', 'inventory-stale', 'no-working-contact',
]

import { z } from 'zod'
import { FINDING_RULES } from '../types/finding'
import { HINDSIGHT_OUTCOMES, LEDGER_LISTS } from '../types/hindsight'
import { shortText } from './fields'

export const HindsightInput = z.strictObject({
  outcome: z.enum(HINDSIGHT_OUTCOMES, { error: 'Was it right or wrong?' }),
  reason: shortText('How do you know? A few words are enough.', 1000),
})
export type HindsightValue = z.output<typeof HindsightInput>

export const LedgerQuery = z.object({
  list: z.enum(LEDGER_LISTS, { error: 'There is no such list.' }).default('all'),
  rule: z.enum(FINDING_RULES, { error: 'There is no such finding.' }).optional(),
  unit: z.uuid('That home is not known.').optional(),
  after: z.string().max(600).optional(),
})
export type LedgerFilter = z.output<typeof LedgerQuery>

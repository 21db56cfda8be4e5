import { z } from 'zod'
import { FINDING_RULES, SEVERITIES } from '../types/finding'
import { FINDING_LISTS } from '../types/findingView'
import { day, shortText, version } from './fields'

export const FindingsQuery = z.object({
  list: z.enum(FINDING_LISTS, { error: 'There is no such list.' }).default('waiting'),
  severity: z.enum(SEVERITIES, { error: 'There is no such severity.' }).optional(),
  rule: z.enum(FINDING_RULES, { error: 'There is no such finding.' }).optional(),
  property: z.uuid('That property is not known.').optional(),
  unit: z.uuid('That home is not known.').optional(),
  search: z.string().trim().max(200, 'At most 200 letters, please.').optional(),
  after: z.string().max(600).optional(),
})

export const AcknowledgementInput = z.object({
  reason: shortText('Why can this wait? A few words are enough.', 1000),
  lookAgainOn: day('On which day should it be looked at again?'),
  version,
}).strict()
export type Acknowledgement = z.output<typeof AcknowledgementInput>

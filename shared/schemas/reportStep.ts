import { z } from 'zod'
import { shortText } from './fields'

export const ReportStep = z.strictObject({
  step: z.enum(['started', 'corrected'], { error: 'Started, or put right?' }),
  note: shortText('Please say what was done or found, in a few words.', 500),
})

export type ReportStepValue = z.output<typeof ReportStep>

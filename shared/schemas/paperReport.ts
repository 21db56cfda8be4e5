import { z } from 'zod'
import { day, shortText } from './fields'
import { ObservationInput } from './observation'

/** A form that somebody filled in by hand, entered later by another person. */
export const PaperReportInput = z.strictObject({
  paper: z.strictObject({
    reporterName: shortText('Whose form is it? Their name is enough.', 160),
    filledInOn: day('On which day was it filled in?'),
  }),
  report: ObservationInput,
})
export type PaperReportValue = z.output<typeof PaperReportInput>

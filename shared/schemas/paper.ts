import { z } from 'zod'
import { PAPER_SIZES } from '../types/paper'

export const PaperQuery = z.object({ paper: z.enum(PAPER_SIZES, { error: 'There is Letter and there is A4.' }).optional() })
export type PaperChoice = z.output<typeof PaperQuery>

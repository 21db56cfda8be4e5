import { z } from 'zod'
import { RECORD_SUBJECTS } from '../types/record'

const search = z.string().trim().max(200, 'At most 200 letters, please.').optional()
const after = z.string().max(600).optional()

export const HomesQuery = z.object({ search, after, archived: z.enum(['yes', 'no']).default('no') })
export const UnitsQuery = z.object({ search, after, sections: z.enum(['yes', 'no']).default('no') })
export const PropertyQuery = z.object({ after })
export const InventoryListQuery = z.object({ units: z.enum(['us', 'metric']).default('us') })
export const RecordQuery = z.object({ after, subject: z.enum(RECORD_SUBJECTS, { error: 'There is no such kind of entry.' }).optional() })

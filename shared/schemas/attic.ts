import { z } from 'zod'
import { DOCUMENT_KINDS } from '../types/attic'
import { day, longText, pageLimit, shortText, version } from './fields'

export const AtticEdit = z.strictObject({ name: shortText('What do you call this attic?'), notes: longText(), version })

export type AtticEditValue = z.output<typeof AtticEdit>

/** The words that go with an uploaded paper; the file itself travels beside them. */
export const AtticDocumentInput = z.strictObject({
  kind: z.enum(DOCUMENT_KINDS, { error: 'What kind of paper is it?' }),
  writtenOn: day('Which date is on it?'),
  writtenBy: shortText('Who wrote it?', 200),
  ratedPsf: z.number().min(0, 'Not less than 0 psf.').max(500, 'That is more than 500 psf. Is it in pounds per square foot?').nullable(),
  liftsHold: z.boolean(),
  acceptsStrongbacks: z.boolean().default(false),
  coversWholeAttic: z.boolean(),
  area: longText(500),
}).refine(value => value.coversWholeAttic || value.area.length > 0, { path: ['area'], message: 'Which part does it cover?' })
  .refine(value => !value.liftsHold || value.kind === 'engineer-letter' || value.kind === 'inspection-record', { path: ['liftsHold'], message: 'Only an engineer’s letter or an inspection record can lift a hold.' })
  .refine(value => !value.acceptsStrongbacks || value.kind === 'engineer-letter', { path: ['acceptsStrongbacks'], message: 'Only an engineer’s letter can say so.' })

export type AtticDocumentValue = z.output<typeof AtticDocumentInput>

export const VersionOnly = z.strictObject({ version })

export const AtticListQuery = z.strictObject({
  search: z.string().trim().max(100, 'At most 100 letters, please.').optional(),
  after: z.string().max(1000).optional(),
  limit: pageLimit,
})

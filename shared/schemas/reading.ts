import { z } from 'zod'
import { READING_METHODS, STAIN_STATES, TIP_STATES } from '../types/mark'
import { day, longText } from './fields'
import { DangerSigns, PhotoIds } from './observation'

const number = (what: string) => z.number({ error: `Please give ${what} as a number.` }).min(0, 'Not less than 0.').max(100_000, 'That is too large. Is it in millimetres?').nullable().default(null)

/** One reading of a mark. Which of the numbers are asked for depends on the mark's kind: measureReading.ts decides. */
export const ReadingInput = z.strictObject({
  takenOn: day('On which day was it measured?'),
  method: z.enum([...READING_METHODS, 'could-not-measure'], { error: 'How was it measured?' }),
  value: number('the size'),
  atLeast: number('what it is thicker than'),
  atMost: number('what it is thinner than'),
  lengthMm: number('the length'),
  spanMm: number('the length of the string'),
  tip: z.enum(TIP_STATES).nullable().default(null),
  stain: z.enum(STAIN_STATES).nullable().default(null),
  dangerSigns: DangerSigns,
  reason: z.string().trim().max(500, 'At most 500 letters, please.').nullable().default(null),
  note: longText(2000).default(''),
  photoIds: PhotoIds,
  /** The person was asked about an unlikely number and says it is right. */
  confirmed: z.boolean().default(false),
}).refine(input => input.method !== 'could-not-measure' || Boolean(input.reason), {
  path: ['reason'], message: 'What was in the way? A few words are enough.',
}).refine(input => input.method !== 'could-not-measure' || [input.value, input.atLeast, input.atMost].every(value => value === null), {
  path: ['value'], message: 'Either a size or that it could not be measured, not both.',
})

export type ReadingValue = z.output<typeof ReadingInput>

import { z } from 'zod'
import { READING_METHODS, STAIN_STATES, TIP_STATES } from '../types/mark'
import { day, id, longText } from './fields'
import { DangerSigns, PhotoIds } from './observation'

const number = (what: string) => z.number({ error: `Please give ${what} as a number.` }).min(0, 'Not less than 0.').max(100_000, 'That is too large. Is it in millimetres?').nullable().default(null)

const sizeMm = z.number({ error: 'Please give it in millimetres, as a number.' }).min(0, 'Not less than 0.').max(100_000, 'That is too large. Is it in millimetres?')
const Point = z.strictObject({ xPx: z.number().min(0).max(20_000), yPx: z.number().min(0).max(20_000) })

const PhotoPoints = z.strictObject({
  photoId: id, widthPx: z.int().min(1).max(20_000), heightPx: z.int().min(1).max(20_000), a: Point, b: Point,
  distanceMm: z.number({ error: 'How far apart are the two points?' }).min(1, 'How far apart are the two points?').max(3000, 'At most 3000 mm, please.'),
  stations: z.array(z.strictObject({ p: Point, q: Point })).max(30, 'At most 30 places, please.'),
})

/** One reading of a mark. Which of the numbers are asked for depends on the mark's kind: measureReading.ts decides. */
export const ReadingInput = z.strictObject({
  takenOn: day('On which day was it measured?'),
  method: z.enum([...READING_METHODS, 'could-not-measure'], { error: 'How was it measured?' }),
  value: number('the size'),
  atLeast: number('what it is thicker than'),
  atMost: number('what it is thinner than'),
  /** Measured once more: how sure this person is comes from such pairs. */
  second: number('the second size'),
  sinceSet: z.strictObject({ nowMm: sizeMm, setMm: sizeMm, widthWhenSetMm: sizeMm }).nullable().default(null),
  photo: PhotoPoints.nullable().default(null),
  checkRulerMm: number('what the check ruler measures'),
  tipPastMm: number('how far it is past the pencil marks'),
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
  /** What was written before the question changed the person's mind. */
  wroteFirst: number('the first number'),
  /** The person was asked about a day that is not the camera's and says it is right. */
  dayConfirmed: z.boolean().default(false),
  /** What this phone's clock says now. */
  phoneAt: z.iso.datetime({ offset: true }).nullable().default(null),
}).refine(input => input.method !== 'could-not-measure' || Boolean(input.reason), {
  path: ['reason'], message: 'What was in the way? A few words are enough.',
}).refine(input => input.method !== 'could-not-measure' || [input.value, input.atLeast, input.atMost, input.second, input.sinceSet, input.photo].every(value => value === null), {
  path: ['value'], message: 'Either a size or that it could not be measured, not both.',
})

export type ReadingValue = z.output<typeof ReadingInput>

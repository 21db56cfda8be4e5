import { z } from 'zod'
import {
  CHANGES_ABOVE, DANGER_SIGNS, DIRECTIONS, DOOR_STATES, MARK_KINDS, MARK_PLACES, MARK_SHAPES, READING_METHODS, RECENT_EVENTS,
  SHAPES_BY_KIND, SOUND_STATES, STAIN_STATES, TIP_STATES, WALL_TYPES, WIDTH_COMPARISONS, type ObservationAnswers,
} from '../types/mark'
import { MAX_PHOTOS_PER_REPORT } from '../types/photo'
import { day, id, longText } from './fields'

const choice = <const T extends readonly string[]>(values: T) => z.enum(values, { error: 'Choose one of these.' })
const sizeMm = (what: string, most: number) =>
  z.number({ error: `Please give ${what} in millimetres.` }).min(0, 'Not less than 0.').max(most, `That is more than ${most} mm. Is it in millimetres?`).nullable().default(null)
const unique = <T>(values: T[]) => [...new Set(values)]

export const Pin = z.strictObject({ xShare: z.number().min(0).max(1), yShare: z.number().min(0).max(1) })
export const DangerSigns = z.array(choice(DANGER_SIGNS)).max(DANGER_SIGNS.length * 2).default([]).transform(unique)
export const PhotoIds = z.array(id).max(MAX_PHOTOS_PER_REPORT, `At most ${MAX_PHOTOS_PER_REPORT} photos, please.`).default([]).transform(unique)

/** Everything but the room and the kind may be left open: 'cannot tell' is an answer. */
const answers = {
  kind: choice(MARK_KINDS),
  roomId: z.uuid('Which room is it in?'),
  pin: Pin.nullable().default(null),
  place: choice(MARK_PLACES).nullable().default(null),
  shape: choice(MARK_SHAPES).nullable().default(null),
  direction: choice(DIRECTIONS).default('not-known'),
  wallType: choice(WALL_TYPES).nullable().default(null),
  widthComparison: choice(WIDTH_COMPARISONS).nullable().default(null),
  widthMm: sizeMm('the width', 300),
  widthMethod: choice(READING_METHODS).nullable().default(null),
  lengthMm: sizeMm('the length', 20_000),
  tip: choice(TIP_STATES).nullable().default(null),
  popCount: z.int('Count whole bumps, please.').min(0, 'Not less than 0.').max(500, 'At most 500, please.').nullable().default(null),
  sagDropMm: sizeMm('how far it hangs', 2000),
  sagSpanMm: sizeMm('how long the string was', 20_000),
  stain: choice(STAIN_STATES).default('none'),
  stainSizeMm: sizeMm('the size of the stain', 20_000),
  doors: choice(DOOR_STATES).default('not-known'),
  sounds: choice(SOUND_STATES).default('none'),
  changeAbove: choice(CHANGES_ABOVE).default('not-known'),
  recentEvents: z.array(choice(RECENT_EVENTS)).max(RECENT_EVENTS.length * 2).default([]).transform(unique),
  heatingOn: z.boolean().nullable().default(null),
  humidityPercent: z.number().min(0, 'Not less than 0 %.').max(100, 'Not more than 100 %.').nullable().default(null),
  dangerSigns: DangerSigns,
  firstSeenOn: day('When did you first see it?').nullable().default(null),
  note: longText(2000).nullable().default(null),
}

export const ObservationInput = z.strictObject({
  ...answers,
  photoIds: PhotoIds,
  /** The person says it is the same as this mark, which is being followed already. */
  sameAsMarkId: id.nullable().default(null),
}).refine(value => value.shape === null || (SHAPES_BY_KIND[value.kind] as readonly string[]).includes(value.shape), {
  path: ['shape'], message: 'That picture belongs to another kind of mark. Choose one of these.',
})

export type ObservationValue = z.output<typeof ObservationInput>

export function answersOf({ photoIds, sameAsMarkId, ...rest }: ObservationValue): ObservationAnswers {
  return rest
}

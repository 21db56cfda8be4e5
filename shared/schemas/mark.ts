import { z } from 'zod'
import { ACTIVITIES, DIRECTIONS, MARK_KINDS, MARK_PLACES, MARK_SHAPES } from '../types/mark'
import { day, id, longText, pageLimit, shortText, version } from './fields'
import { Pin } from './observation'

const facts = {
  label: shortText('Please give it a name.', 160),
  roomId: id,
  atticId: id.nullable(),
  pin: Pin,
  place: z.enum(MARK_PLACES).nullable(),
  shape: z.enum(MARK_SHAPES).nullable(),
  direction: z.enum(DIRECTIONS).nullable(),
  firstSeenOn: day('When was it first seen?'),
  notes: longText(5000),
}

export const MARK_CHANGES = ['repaired', 'reopened', 'closed'] as const

/** Either facts, or one change of state with the day and the reason. */
export const MarkEdit = z.strictObject({
  ...z.object(facts).partial().shape,
  change: z.strictObject({
    to: z.enum(MARK_CHANGES),
    happenedOn: day('On which day?'),
    reason: shortText('Please say why, in a few words.', 500),
  }).optional(),
  version,
}).refine(value => Object.keys(value).length > 1, 'Nothing was changed.')

export type MarkEditValue = z.output<typeof MarkEdit>

const some = <const T extends readonly [string, ...string[]]>(values: T) =>
  z.preprocess(value => typeof value === 'string' ? value.split(',').filter(Boolean) : value, z.array(z.enum(values)).max(20)).optional()

export const MarkListQuery = z.strictObject({
  kind: some(MARK_KINDS),
  activity: some(ACTIVITIES),
  state: some(['open', 'repaired', 'closed']),
  unit: id.optional(),
  property: id.optional(),
  due: z.enum(['late']).optional(),
  search: z.string().trim().max(120).optional(),
  sort: z.enum(['risk', 'newest', 'due']).default('risk'),
  after: z.string().max(1000).optional(),
  limit: pageLimit,
})

export type MarkListValue = z.output<typeof MarkListQuery>

export const MarkJoining = z.strictObject({
  intoId: z.uuid('Which mark is it part of?'),
  reason: shortText('Please say why, in a few words.', 500),
  version,
})
export type MarkJoiningValue = z.output<typeof MarkJoining>

const ids = z.array(id).max(500).default([]).transform(all => [...new Set(all)])

export const MarkSplit = z.strictObject({
  label: facts.label,
  roomId: id,
  pin: Pin,
  readingIds: ids,
  observationIds: ids,
  reason: shortText('Please say why, in a few words.', 500),
  version,
}).refine(value => value.readingIds.length + value.observationIds.length > 0, { path: ['readingIds'], message: 'Choose what belongs to the other mark.' })
export type MarkSplitValue = z.output<typeof MarkSplit>

import { z } from 'zod'
import { JOB_PRIORITIES, JOB_STATES } from '../types/job'
import { day, id, longText, shortText, version } from './fields'

const MOST_CENTS = 1_000_000_000

const title = shortText('What is to be done?', 200)
const priority = z.enum(JOB_PRIORITIES, { error: 'How soon is it needed?' })
const cost = z.int({ error: 'Please give the cost as an amount of money.' }).min(0, 'The cost cannot be below zero.').max(MOST_CENTS, 'That is more than 10 million. Is it right?').nullable()
const assignee = id.nullable()
const optionalDay = day().nullable()

export const JOB_LISTS = ['open', 'late', 'done', 'all'] as const

export const JobsQuery = z.object({
  list: z.enum(JOB_LISTS, { error: 'There is no such list.' }).default('open'),
  unit: z.uuid('That home is not known.').optional(),
  search: z.string().trim().max(200, 'At most 200 letters, please.').optional(),
  after: z.string().max(600).optional(),
})

export const JobInput = z.object({
  unitId: z.uuid('In which home is it?'),
  title, description: longText().default(''), priority: priority.default('routine'),
  findingId: id.nullable().default(null), markId: id.nullable().default(null), atticId: id.nullable().default(null),
  assigneeUserId: assignee.default(null), scheduledOn: optionalDay.default(null),
  /** Left out: worked out from the organisation's response times. */
  dueOn: optionalDay.default(null),
}).strict()
export type NewJob = z.output<typeof JobInput>

export const JobEdit = z.object({
  version, title: title.optional(), description: longText().optional(), priority: priority.optional(),
  assigneeUserId: assignee.optional(), scheduledOn: optionalDay.optional(), dueOn: day('By when is it to be done?').optional(),
  outcome: longText().nullable().optional(), costCents: cost.optional(),
}).strict()
export type JobChanges = z.output<typeof JobEdit>

export const JobMoveInput = z.object({
  version,
  to: z.enum(JOB_STATES, { error: 'There is no such state of a job.' }),
  scheduledOn: optionalDay.default(null), doneOn: optionalDay.default(null),
  outcome: longText().nullable().default(null), costCents: cost.default(null),
}).strict()
export type JobMove = z.output<typeof JobMoveInput>
